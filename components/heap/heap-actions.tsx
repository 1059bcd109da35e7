import type { Preferences } from '@/lib/units/preferences';
import { HEAP_KINDS } from '@/lib/wording/heap';
import { EntryButton } from './entry-button';
import type { HeapOnPage, HeapViewData, HeapViewHouse } from './heap-view-data';
import { RoundButton } from './round-button';
import { Waiting } from './waiting';

/** What can be written down, most often done first, and what waits to be sent. */
export function HeapActions({
  house,
  data,
  heap,
  mayWrite,
  reader,
  preferences,
}: {
  house: HeapViewHouse;
  data: HeapViewData;
  heap: HeapOnPage;
  mayWrite: boolean;
  reader: { owner: string; person: string };
  preferences: Preferences;
}) {
  if (!mayWrite) return <p className="text-soft">Growers and owners write in this book; you can read it.</p>;
  const { slug, name, zone } = house;
  const section = heap.rounds[0]?.section ?? null;
  const target = { house: slug, heap: heap.slug, zone, owner: reader.owner };
  const heaps = data.heaps.map((one) => ({
    ...{ slug: one.slug, name: one.name },
    section: one.slug === heap.slug ? section : null,
  }));
  const facts = { ...reader, preferences, house: { slug, name, zone, heaps } };
  return (
    <div className="not-on-paper flex flex-col gap-3">
      <div className="flex flex-wrap gap-2">
        <RoundButton look="primary" {...target} section={section} preferences={preferences} />
        {HEAP_KINDS.map(({ kind, label }) => (
          <EntryButton key={kind} {...target} kind={kind}>
            {label}
          </EntryButton>
        ))}
      </div>
      <Waiting owner={reader.owner} facts={facts} />
    </div>
  );
}
