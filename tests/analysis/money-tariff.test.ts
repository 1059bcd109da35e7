// Worked out on paper with a calendar: clocks of Zurich go forward on 29 March 2026 at 02:00 and back on 25 October at 03:00.
import { DateTime } from 'luxon';
import { expect, it } from 'vitest';
import { pricedSpans, type Tariff } from '@/lib/analysis/money-tariff';

const ZONE = 'Europe/Zurich';
const at = (text: string) => DateTime.fromISO(text, { zone: ZONE }).toMillis();
const NIGHT_RATE: Tariff = {
  from: '2026-01-01',
  price: 300_000,
  bands: [{ fromMin: 22 * 60, toMin: 6 * 60, days: 'all', price: 200_000 }],
};
const hours = (tariffs: Tariff[], from: string, to: string, zone = ZONE) =>
  pricedSpans(tariffs, zone, at(from), at(to)).map((span) => [span.price, (span.to - span.from) / 3_600_000]);

it('a band over midnight is one span of a night', () => {
  expect(hours([NIGHT_RATE], '2026-11-26T12:00', '2026-11-27T12:00')).toEqual([
    [300_000, 10],
    [200_000, 8],
    [300_000, 6],
  ]);
});

it('the cheap hours of the night in which the clock goes back are nine, and seven where it goes forward', () => {
  expect(hours([NIGHT_RATE], '2026-10-24T12:00', '2026-10-25T12:00')).toEqual([
    [300_000, 10],
    [200_000, 9],
    [300_000, 6],
  ]);
  expect(hours([NIGHT_RATE], '2026-03-28T12:00', '2026-03-29T12:00')).toEqual([
    [300_000, 10],
    [200_000, 7],
    [300_000, 6],
  ]);
});

it('a band within the hour that runs twice holds twice, and one within the hour left out never', () => {
  const half: Tariff = { ...NIGHT_RATE, bands: [{ fromMin: 130, toMin: 160, days: 'all', price: 1 }] };
  expect(hours([half], '2026-10-25T00:00', '2026-10-25T04:00')).toEqual([
    [300_000, 2 + 10 / 60],
    [1, 0.5],
    [300_000, 0.5],
    [1, 0.5],
    [300_000, 1 + 20 / 60],
  ]);
  expect(hours([half], '2026-03-29T00:00', '2026-03-29T04:00')).toEqual([[300_000, 3]]);
});

it('a band that begins in the hour left out begins when the clock has passed it', () => {
  const late: Tariff = { ...NIGHT_RATE, bands: [{ fromMin: 150, toMin: 240, days: 'all', price: 1 }] };
  expect(hours([late], '2026-03-29T00:00', '2026-03-29T05:00')).toEqual([
    [300_000, 2],
    [1, 1],
    [300_000, 1],
  ]);
});

it('a weekday band that began on Friday evening lasts into Saturday, and none begins on Saturday or Sunday', () => {
  const weekdays: Tariff = {
    ...NIGHT_RATE,
    bands: [{ fromMin: 22 * 60, toMin: 6 * 60, days: 'weekdays', price: 200_000 }],
  };
  // 27 November 2026 is a Friday
  expect(hours([weekdays], '2026-11-27T12:00', '2026-11-30T12:00')).toEqual([
    [300_000, 10],
    [200_000, 8],
    [300_000, 54],
  ]);
});

it('a new tariff begins at midnight of its day, and before the first there is no price', () => {
  const dearer: Tariff = { from: '2026-11-27', price: 400_000, bands: [] };
  expect(
    hours([dearer, { ...NIGHT_RATE, from: '2026-11-26' }], '2026-11-25T12:00', '2026-11-27T12:00'),
  ).toEqual([
    [null, 12],
    [200_000, 6],
    [300_000, 16],
    [200_000, 2],
    [400_000, 12],
  ]);
});

it('spans have neither gap nor overlap over a year of any zone', () => {
  for (const zone of ['Australia/Lord_Howe', 'Asia/Kathmandu', 'America/St_Johns', 'UTC']) {
    const [from, to] = [Date.UTC(2026, 0, 1), Date.UTC(2027, 0, 1)];
    const spans = pricedSpans([{ ...NIGHT_RATE, from: '2025-01-01' }], zone, from, to);
    expect(spans[0]?.from).toBe(from);
    expect(spans.at(-1)?.to).toBe(to);
    for (const [i, span] of spans.entries()) if (i > 0) expect(span.from).toBe(spans[i - 1]?.to);
    for (const span of spans) {
      const hour = DateTime.fromMillis(span.from, { zone }).hour;
      expect(span.price).toBe(hour >= 22 || hour < 6 ? 200_000 : 300_000);
    }
  }
});
