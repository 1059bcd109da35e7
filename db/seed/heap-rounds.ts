/**
 * The demo's rounds with the probe. Only where the probe went and how warm each place lies between outdoors and the core
 * stands here; what it read is made of the yard's temperatures at that hour.
 */
import type { z } from 'zod';
import { ProbeSetCreate } from '@/lib/schema/probe-set';

export interface RoundDeed {
  house: string;
  daysAgo: number;
  /** HH:MM in the house's zone. */
  time: string;
  by: string;
  source: string;
  corePoint: string;
  text: string;
  section: z.input<typeof ProbeSetCreate>['section'];
  /** Rows from the top, places from the left: 0 is outdoors, 1 the core; null was not probed. */
  warmth: (number | null)[][];
}

const GROWER = 'grower@larkmoor.example';
const gateSection = { widthM: 3.4, heightM: 1.1, sunkM: 0.5, columns: 4, rows: 3, left: 'N', right: 'S' };

export const heapRounds: RoundDeed[] = [
  {
    ...{ house: 'long-house', daysAgo: 12, time: '09:10', by: GROWER },
    ...{ source: 'gate-heap', corePoint: 'gate-core', section: gateSection },
    text: 'Before the turning. Cold in the north corner, hot in the middle.',
    warmth: [
      [0.28, 0.62, 0.7, 0.54],
      [0.41, 0.93, 1, 0.72],
      [0.49, 0.76, 0.84, 0.66],
    ],
  },
  {
    ...{ house: 'long-house', daysAgo: 1, time: '08:20', by: GROWER },
    ...{ source: 'gate-heap', corePoint: 'gate-core', section: gateSection },
    text: 'North edge dry to the hand.',
    warmth: [
      [0.35, 0.7, 0.78, 0.62],
      [0.52, 0.96, 1.01, 0.8],
      [0.58, 0.82, 0.88, 0.74],
    ],
  },
  {
    ...{ house: 'prop-house', daysAgo: 6, time: '10:30', by: GROWER },
    ...{ source: 'yew-heap', corePoint: 'yew-core' },
    section: { widthM: 2.6, heightM: 1, sunkM: 0.9, columns: 3, rows: 3, left: 'W', right: 'E' },
    text: 'Roots in the lower east corner, not probed.',
    warmth: [
      [0.48, 0.69, 0.5],
      [0.71, 1, 0.73],
      [0.66, 0.83, null],
    ],
  },
];

/** @param now °C at that hour */
export function roundOf(deed: RoundDeed, now: { core: number; outdoors: number }, at: Date) {
  const places = deed.warmth.flatMap((shares, row) =>
    shares.flatMap((share, column) => {
      if (share === null) return [];
      // a hand-held probe shows tenths
      return [
        { column, row, celsius: Math.round((now.outdoors + share * (now.core - now.outdoors)) * 10) / 10 },
      ];
    }),
  );
  const { source, section, text } = deed;
  return ProbeSetCreate.parse({ source, section, text, places, at: at.toISOString() });
}
