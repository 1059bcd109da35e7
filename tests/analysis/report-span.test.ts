import { expect, it } from 'vitest';
import { spanBefore, spanEnded, spanOfNight } from '@/lib/analysis/report-span';
import { spanWords } from '@/lib/wording/report';

it('a week of nights runs from Monday to Sunday, over the turn of the year too', () => {
  expect(spanOfNight('week', '2026-12-01', 54)).toMatchObject({ from: '2026-11-30', to: '2026-12-06' });
  expect(spanOfNight('week', '2027-01-01', 54)).toMatchObject({ from: '2026-12-28', to: '2027-01-03' });
});
it('a month has its own evenings, those of February in a leap year too', () => {
  expect(spanOfNight('month', '2028-02-29', 54)).toMatchObject({ from: '2028-02-01', to: '2028-02-29' });
  expect(spanBefore(spanOfNight('month', '2027-03-31', 54), 1, 54)).toMatchObject({ to: '2027-02-28' });
});
it('a winter is a season, and south of the equator lies within one year', () => {
  expect(spanOfNight('winter', '2026-12-01', 54)).toMatchObject({ from: '2026-07-01', to: '2027-06-30' });
  expect(spanOfNight('winter', '2026-06-01', -42)).toMatchObject({ from: '2026-01-01', to: '2026-12-31' });
});
it('the span that has ended is the one before that of the lasting night', () => {
  expect(spanEnded('week', '2026-11-30', 54)).toMatchObject({ from: '2026-11-23', to: '2026-11-29' });
  expect(spanEnded('week', '2026-11-29', 54)).toMatchObject({ from: '2026-11-16', to: '2026-11-22' });
});
it('going back and forth by a span leads to the same nights', () => {
  for (const span of ['week', 'month', 'winter'] as const) {
    const one = spanOfNight(span, '2026-12-31', 54);
    expect(spanBefore(spanBefore(one, 1, 54), -1, 54)).toEqual(one);
  }
});
it('a span is called by its dates', () => {
  expect(spanWords(spanOfNight('week', '2026-11-26', 54))).toBe('Week of 23 to 29 November 2026');
  expect(spanWords(spanOfNight('week', '2027-01-01', 54))).toBe('Week of 28 December 2026 to 3 January 2027');
  expect(spanWords(spanOfNight('month', '2026-11-26', 54))).toBe('November 2026');
  expect(spanWords(spanOfNight('winter', '2026-11-26', 54))).toBe('Winter of 2026 to 2027');
  expect(spanWords(spanOfNight('winter', '2026-11-26', -42))).toBe('Winter of 2026');
});
