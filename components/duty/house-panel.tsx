import Link from 'next/link';
import { ButtonLink } from '@/components/ui/button';
import { Panel } from '@/components/ui/panel';
import { count, temperature, UNKNOWN } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { markWords } from '@/lib/wording/duty-notes';
import { oldWords } from '@/lib/wording/houses';
import type { HouseWeek } from './houses-data';
import { SourceWeeks } from './source-weeks';

/** One house among all: how it stands, its last night, and what its sources gave. */
export function HousePanel({
  house,
  now,
  preferences,
}: {
  house: HouseWeek;
  now: number;
  preferences: Preferences;
}) {
  const { slug, lastNight, coldest, frostLimit, alarms } = house;
  const low = lastNight?.lowest?.value ?? null;
  const isCold = (value: number | null) => value !== null && frostLimit !== null && value < frostLimit;
  const running = house.running.length === 0 ? 'nothing runs' : `${house.running.join(', ')} on`;
  const standing = house.isLaidUp
    ? 'laid up: nobody controls it'
    : [oldWords(house.at, now), running].filter(Boolean).join(', ');
  return (
    <Panel
      title={
        <Link
          href={`/${slug}/watch`}
          className="inline-flex min-h-11 items-center font-serif text-[1.15rem] underline decoration-line underline-offset-4 hover:decoration-ink"
        >
          {house.name}
        </Link>
      }
      actions={<ButtonLink href={`/${slug}/duty`}>Its nights</ButtonLink>}
    >
      <div className="grid gap-x-8 gap-y-4 border-t border-line pt-3 lg:grid-cols-[12rem_minmax(0,1fr)]">
        <dl className="grid grid-cols-3 gap-x-4 gap-y-3 lg:grid-cols-1">
          <Fact
            name="Now"
            value={temperature(coldest, preferences)}
            note={standing}
            isAlarm={isCold(coldest)}
          />
          <Fact
            name="Lowest last night"
            value={temperature(low, preferences)}
            note={lowNote(lastNight)}
            isAlarm={isCold(low)}
          />
          <Fact
            name="Alarms"
            value={alarms === 0 ? 'none' : count(alarms, 'open alarm')}
            isAlarm={alarms > 0}
            href={alarms === 0 ? null : `/${slug}/alarms`}
          />
        </dl>
        {house.sources.length === 0 ? (
          <p className="text-soft">It has no source of heat yet.</p>
        ) : (
          <SourceWeeks house={slug} sources={house.sources} preferences={preferences} />
        )}
      </div>
    </Panel>
  );
}

function lowNote(night: HouseWeek['lastNight']): string {
  if (night === null) return 'no whole night is kept yet';
  const mark = markWords(night);
  if (mark !== null) return mark;
  return night.lowest?.name ?? `${UNKNOWN}: no point of the house was read`;
}

function Fact({
  name,
  value,
  note,
  isAlarm,
  href = null,
}: {
  name: string;
  value: string;
  note?: string;
  isAlarm: boolean;
  href?: string | null;
}) {
  return (
    <div>
      <dt className="text-[0.9rem] text-soft">{name}</dt>
      <dd className={`font-mono text-[1.05rem] ${isAlarm ? 'font-semibold text-alarm' : ''}`}>
        {href === null ? (
          value
        ) : (
          <Link href={href} className="inline-flex min-h-6 items-center underline underline-offset-4">
            {value}
          </Link>
        )}
        {note === undefined ? null : (
          <span className="block font-sans text-[0.85rem] font-normal text-soft">{note}</span>
        )}
      </dd>
    </div>
  );
}
