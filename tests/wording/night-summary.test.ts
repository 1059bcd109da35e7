import { expect, it } from 'vitest';
import { USUAL } from '@/lib/units/preferences';
import { hourRows, nightSummary, type NightFacts } from '@/lib/wording/night-summary';
import { at, spaced } from './scene';

const facts: NightFacts = {
  night: { from: at('12:00') - 86_400_000, to: at('12:00') },
  now: at('03:00'),
  zone: 'Europe/London',
  lines: [
    { name: 'House air', at: [at('13:00'), at('02:36'), at('02:50')], value: [11.2, 4, 5.7] },
    { name: 'Outdoors', at: [at('13:00')], value: [null] },
  ],
  strips: [
    {
      label: 'Gate-heap fan',
      spans: [
        { kind: 'off', from: at('12:01'), to: at('01:00'), on: false },
        { kind: 'run', from: at('01:00'), to: at('01:40'), on: true },
        { kind: 'rest', from: at('01:40'), to: at('02:10'), on: false },
        { kind: 'run', from: at('02:10'), to: at('02:30'), on: true },
      ],
    },
    { label: 'Bench mat', spans: [] },
  ],
};

it('a night’s chart is told in words, with what is missing', () =>
  expect(spaced(nightSummary(facts, USUAL))).toBe(
    'Noon to noon, 26 Nov to 27 Nov. House air: 11.2 °C at first, 5.7 °C last, lowest 4.0 °C at 02:36. Outdoors: no reading. Gate-heap fan ran 1 h in 2 starts. Bench mat did not run.',
  ));

it('its hours add up to what the strip shows, and end now', () => {
  const rows = hourRows(facts);
  expect(rows.reduce((sum, row) => sum + (row.ranS[0] ?? 0), 0)).toBe(3600);
  expect(rows).toHaveLength(15);
  expect(rows.map((row) => row.values[0])[1]).toBe(11.2);
  expect(rows.map((row) => row.values[0])[5]).toBeNull();
});
