import { expect, it } from 'vitest';
import { balanceOf, type BalanceAsk } from '@/lib/analysis/money-balance';
import { seasonOf } from '@/lib/analysis/money-season';
import type { NightSummary } from '@/lib/analysis/nights';
import { totalOf } from '@/lib/analysis/totals';
import { moneySentence } from '@/lib/wording/money';
import { plainText } from '@/lib/wording/phrase';
import { summarise } from '@/lib/analysis/summarise';
import { scene } from '../analysis/scene';

const electricity = { kWh: 0.12 };
const one = summarise(scene());
/** Ten hours on in each. */
const night: NightSummary = {
  ...{ ...one, electricity, heat: { kWh: 4.04, sd: 0.5, assumedRunning: false } },
  channels: one.channels.map((channel) => ({ ...channel, electricity })),
  strips: one.strips.map((strip) => ({ ...strip, spans: [['run', 3600, 39_600, true]] })),
};
const nights = Array.from({ length: 10 }, () => night);
const ask: BalanceAsk = {
  nights,
  zone: 'Europe/London',
  latitude: 54,
  season: seasonOf('2026-12-01', 54),
  tariffs: [{ from: '2026-01-01', price: 300_000, bands: [] }],
  fuels: [{ fuel: 'propane', unit: 'US gal', price: 3_000_000, kWh: 26.82, efficiency: 0.8 }],
  costs: [{ on: '2026-10-01', micros: 40_000_000, years: 2 }],
};
const say = (change: Partial<BalanceAsk>, currency: string | null = 'EUR') =>
  plainText(
    moneySentence({
      source: 'Gate heap',
      season: '2026/27',
      currency,
      balance: balanceOf({ ...ask, ...change }),
    }),
  ).replaceAll('\u00a0', ' ');

it('the sentence tells what was worked out on paper', () => {
  // 10 nights of 4.04 kWh; half of 40.00 and 1.200 kWh of fan at 0.30: 20.36 over 40.4 kWh, 5.0 of deviation
  expect(say({})).toBe(
    'In the season 2026/27 a kWh of heat from the gate heap has cost 0.504 ± 0.067 EUR/kWh, all in. ' +
      'Its fan used 1.200 kWh for 0.36 EUR, for 40.4 ± 5.0 kWh of heat. ' +
      'A kWh of heat costs 0.140 EUR/kWh from propane and 0.300 EUR/kWh from electricity.',
  );
});
it('heat and electricity are those of Duty, to the last digit', () => {
  const { totals } = balanceOf(ask);
  expect(totals).toEqual(totalOf(nights));
});
it('what is not known is said to be not known, with its reason', () => {
  expect(say({}, null)).toContain('is not known yet. Choose the currency');
  expect(say({ costs: [] })).toContain('not known yet: none of its own costs is entered');
  expect(say({ tariffs: [] })).toContain('not known yet: no tariff covers all the hours');
  expect(say({ nights: nights.map((one) => ({ ...one, heat: null })) })).toContain(
    'its heat is not measured',
  );
});
it('the same heat bears the deviation of the heat', () => {
  const [propane] = balanceOf(ask).alternatives;
  expect(propane?.same?.micros).toBeCloseTo((3_000_000 / (26.82 * 0.8)) * 40.4, 3);
  expect((propane?.same?.sd ?? 0) / (propane?.same?.micros ?? 1)).toBeCloseTo(5 / 40.4, 9);
});
