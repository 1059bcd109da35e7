import type { NightInput } from '@/lib/analysis/nights';
import { nightNamed } from '@/lib/analysis/night';
import type { Series } from '@/lib/analysis/series';

export const minute = 60_000;
export const night = nightNamed('2026-11-26', 'Europe/London');
/** Epoch ms of so many minutes after the night's first noon. */
export const after = (minutes: number) => night.from + minutes * minute;

/** Readings once a minute over the night, ten minutes before it and ten after: what is loaded of a night that ended. */
export function series(key: string, role: string, value: (minutes: number) => number | null): Series {
  const good: Series['good'] = [];
  for (let m = -10; m < (night.to - night.from) / minute + 10; m += 1) {
    const v = value(m);
    if (v !== null) good.push({ at: after(m), value: v });
  }
  return { key, name: key, role, holdS: 180, sd: 0.3, good };
}

/** A night with two draws of 40 min, each followed by 40 min of rest. */
export function scene(change: Partial<NightInput> = {}): NightInput {
  const points = [
    series('bench-1', 'bench', (m) => (m >= 600 && m < 603 ? 2.5 : 5)),
    series('house-air', 'house-air', () => 6),
    series('outdoors', 'outdoors', (m) => -Math.min(m / 100, 8)),
    series('loop-intake', 'loop-intake', () => 5),
    series('loop-return', 'loop-return', () => 15),
    series('gate-core', 'heap-core', () => 52.125),
  ];
  return {
    night,
    nowMs: night.to + minute,
    house: {
      zone: 'Europe/London',
      latitude: 54.2,
      longitude: -2.3,
      altitudeM: 310,
      frostLimitC: 3,
    },
    source: { slug: 'gate-heap', core: 'gate-core', base: null },
    channels: [
      {
        number: 1,
        label: 'Gate-heap fan',
        powerW: 12,
        flow: { m3PerS: 0.0425, sdM3PerS: 0.004, from: 'measured' },
        loop: { intake: 'loop-intake', return: 'loop-return' },
        runProof: null,
        record: {
          decisions: [
            { at: after(-60), state: 'off', claim: 'idle' },
            { at: after(600), state: 'on', claim: 'band' },
            { at: after(640), state: 'off', claim: 'rest' },
            { at: after(680), state: 'on', claim: 'band' },
            { at: after(720), state: 'off', claim: 'rest' },
            { at: after(760), state: 'off', claim: 'idle' },
          ],
          reports: [],
          trips: [],
          silences: [],
          stood: [],
          safe: 'off',
        },
      },
    ],
    points: new Map(points.map((one) => [one.key, one])),
    ...change,
  };
}
