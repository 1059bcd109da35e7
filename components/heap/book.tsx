import { DateTime } from 'luxon';
import type { HeapEntry } from '@/lib/schema/heap-view';
import type { Preferences } from '@/lib/units/preferences';
import { clock } from '@/lib/units/time';
import { kindWord, whatWent } from '@/lib/wording/heap';
import { sensed } from '@/lib/wording/heap-senses';
import { EntryButton } from './entry-button';
import { Photographs } from './photographs';

/** Newest day first; within a day the newest entry first. */
function byDay(entries: readonly HeapEntry[], zone: string): [day: string, entries: HeapEntry[]][] {
  const days = new Map<string, HeapEntry[]>();
  for (const entry of entries) {
    const name = DateTime.fromISO(entry.at, { zone, locale: 'en-GB' }).toFormat('cccc d LLLL yyyy');
    days.set(name, [...(days.get(name) ?? []), entry]);
  }
  return [...days];
}

export interface BookProps {
  house: string;
  heap: string;
  zone: string;
  owner: string;
  entries: HeapEntry[];
  mayWrite: boolean;
  preferences: Preferences;
}

export function Book({ entries, ...rest }: BookProps) {
  return (
    <ol className="flex flex-col gap-5">
      {byDay(entries, rest.zone).map(([name, ofDay]) => (
        <li key={name}>
          <h3 className="border-b border-line pb-1 font-mono text-[0.9rem] text-soft">{name}</h3>
          <ol className="divide-y divide-faint">
            {ofDay.map((entry) => (
              <li key={entry.id} className="flex items-start justify-between gap-3 py-2.5">
                <Entry entry={entry} day={name} {...rest} />
              </li>
            ))}
          </ol>
        </li>
      ))}
    </ol>
  );
}

function Entry({
  entry,
  day,
  mayWrite,
  preferences,
  ...target
}: Omit<BookProps, 'entries'> & { entry: HeapEntry; day: string }) {
  const went = whatWent(entry);
  const felt = sensed(entry.smell, entry.squeeze);
  return (
    <>
      <div className="min-w-0">
        <p>
          <strong className="font-semibold">{kindWord(entry.kind)}</strong>
          {went === '' ? null : <>: {went}</>}
        </p>
        {felt === '' ? null : <p>{felt}</p>}
        {entry.text === '' ? null : (
          <p className="max-w-prose break-words whitespace-pre-line">{entry.text}</p>
        )}
        <Photographs house={target.house} photographs={entry.photographs} mayWrite={mayWrite} of={day} />
        <p className="text-[0.9rem] text-soft">
          <time dateTime={entry.at}>{clock(Date.parse(entry.at), target.zone, preferences)}</time>, {entry.by}
          {entry.amendedAt === null ? null : <>; amended by {entry.amendedBy}</>}
        </p>
      </div>
      {mayWrite ? (
        <EntryButton {...target} kind={entry.kind} entry={entry}>
          Amend
          <span className="sr-only">
            {' '}
            {kindWord(entry.kind).toLowerCase()} of {day}
          </span>
        </EntryButton>
      ) : null}
    </>
  );
}
