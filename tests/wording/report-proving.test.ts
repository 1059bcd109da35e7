import { expect, it } from 'vitest';
import { USUAL } from '@/lib/units/preferences';
import { provingRows } from '@/lib/wording/report-record';
import type { Scene } from '@/lib/wording/scene';

const now = Date.UTC(2026, 10, 30, 12);
const scene: Scene = { now, zone: 'UTC', preferences: USUAL, points: [], channels: [], sources: [] };
const rows = (channels: Parameters<typeof provingRows>[0]) =>
  provingRows(channels, '2026-11-30', scene).map(({ name, value }) => [
    name,
    value.replaceAll('\u00a0', ' '),
  ]);

it('a report tells who proved a channel, when and with what gain, and when its RCD is due', () => {
  const proof = { by: 'installer@larkmoor.example', gain: { kelvin: 6.2, sd: 0.4, seconds: 300 } };
  const provedAt = Date.UTC(2026, 9, 14, 10);
  const protection = {
    ...{ contactor: true, fuseAmps: 10, rcdMilliamps: 30, rcdTestedOn: '2026-04-01' },
    rcdTestEveryMonths: 6,
  };
  expect(
    rows([
      { label: 'Gate-heap fan', provedAt, proof, protection: null },
      { label: 'Bench mat', provedAt: null, proof: null, protection },
    ]),
  ).toEqual([
    ['Gate-heap fan, proved', '14 Oct, 10:00, by installer@larkmoor.example, return +6.2 ± 0.4 °C in 5 min'],
    ['Bench mat, proved', 'not yet'],
    [
      'Bench mat, protection',
      'The residual-current device was last tested on 2026-04-01; a test is due since 2026-10-01.',
    ],
  ]);
});

it('and that no record of the steps is kept, or no device told of, where that is so', () => {
  const provedAt = Date.UTC(2026, 9, 14, 10);
  expect(rows([{ label: 'Fan', provedAt, proof: null, protection: null }])).toEqual([
    ['Fan, proved', '14 Oct, 10:00, no record of its steps is kept'],
    ['Tests of residual-current devices', 'no channel tells of one'],
  ]);
});
