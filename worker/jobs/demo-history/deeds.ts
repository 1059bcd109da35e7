/** The winter's deeds in order of time, each as what has to be done when the history comes to it. */
import { DateTime } from 'luxon';
import { heapBook } from '@/db/seed/heap-book';
import { heapRounds, type RoundDeed } from '@/db/seed/heap-rounds';
import { personDeeds, plugsOut, type HeapDeed, type PersonDeed } from '@/db/seed/winter';

export type Deed = { at: number; house: string } & (
  { what: 'heap'; deed: HeapDeed } | { what: 'round'; deed: RoundDeed } | { what: 'person'; deed: PersonDeed }
);

interface When {
  daysAgo: number;
  time: string;
}

/** @param to end of the history, epoch ms: days are counted back from its local day */
function instantOf({ daysAgo, time }: When, to: number, zone: string): number {
  const [hour = 0, minute = 0] = time.split(':').map(Number);
  return DateTime.fromMillis(to, { zone })
    .startOf('day')
    .minus({ days: daysAgo })
    .set({ hour, minute })
    .toMillis();
}

/** Everything that people did until `to`, heap entries from before the history among them. */
export function deedsUntil(to: number, zoneOf: (house: string) => string): Deed[] {
  const at = (deed: When & { house: string }) => instantOf(deed, to, zoneOf(deed.house));
  const deeds: Deed[] = [
    ...heapBook.map((deed) => ({ at: at(deed), house: deed.house, what: 'heap' as const, deed })),
    ...heapRounds.map((deed) => ({ at: at(deed), house: deed.house, what: 'round' as const, deed })),
    ...personDeeds.map((deed) => ({ at: at(deed), house: deed.house, what: 'person' as const, deed })),
  ];
  return deeds.filter((one) => one.at < to).sort((a, b) => a.at - b.at);
}

export interface Silence {
  house: string;
  point: string;
  from: number;
  to: number;
}

export function silencesUntil(to: number, zoneOf: (house: string) => string): Silence[] {
  return plugsOut.map(({ house, point, minutes, ...when }) => {
    const from = instantOf(when, to, zoneOf(house));
    return { house, point, from, to: from + minutes * 60_000 };
  });
}
