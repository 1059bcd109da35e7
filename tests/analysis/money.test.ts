import { expect, it } from 'vitest';
import { type NightOfFan, fanCost, fanCostOfNight, meanPrice } from '@/lib/analysis/money-fan';
import { energyOf, FUEL_UNITS, FUELS, heatPrice } from '@/lib/analysis/money-fuels';
import { allInPrice, seasonOf, shareOfSeason } from '@/lib/analysis/money-season';
import type { Tariff } from '@/lib/analysis/money-tariff';
import { nightNamed } from '@/lib/analysis/night';
import { MICROS, microsOf, microsText, money, perKWh } from '@/lib/units/money';
import { chance } from './chance';
import { FAN, HEAT_PRICE, LOOP_AT_2400_M, LOOP_AT_SEA } from '@/tests/checks/money';

const price = (text: string) => microsOf(text) ?? Number.NaN;
const flat: Tariff[] = [{ from: '2026-01-01', price: price(FAN.price), bands: [] }];

function nightOf(name: string, runs: [number, number][], watts = 12): NightOfFan {
  const { from, to } = nightNamed(name, 'Europe/London');
  const seconds = runs.reduce((sum, [begin, end]) => sum + end - begin, 0);
  const electricity = { kWh: (watts * seconds) / 3_600_000 };
  return {
    ...{ from, to, electricity },
    channels: [
      {
        ...{
          number: 1,
          label: 'Fan',
          onSeconds: seconds,
          restSeconds: 0,
          heldSeconds: 0,
          handSeconds: 0,
          dutyOfNight: 0,
        },
        ...{ dutyOfDraw: null, starts: 1, standingSeconds: 0, heat: null, electricity },
      },
    ],
    strips: [{ channel: 1, label: 'Fan', spans: runs.map(([begin, end]) => ['run', begin, end, true]) }],
  };
}

it('amounts are read and written without a binary fraction between', () => {
  expect(microsOf('0.2875')).toBe(287_500);
  expect(microsOf('0,1')).toBe(100_000);
  expect(Array.from({ length: 10 }, () => price('0.1')).reduce((a, b) => a + b)).toBe(price('1'));
  for (const text of ['0.2875', '3', '1234567.000001', '0']) expect(microsText(price(text))).toBe(text);
  for (const text of ['', '-1', '1.2345678', '1 000', '1e3', 'NaN']) expect(microsOf(text)).toBeNull();
});

it('money is rounded to the coin of its currency, halves away from zero', () => {
  expect(money(price('1.005'), 'EUR')).toBe('1.01\u00a0EUR');
  expect(money(price('1234.5'), 'JPY')).toBe('1235\u00a0JPY');
  expect(perKWh(148_000, 'EUR', 9_400)).toBe('0.148\u00a0±\u00a00.009\u00a0EUR/kWh');
  expect(money(null, 'EUR')).toBe('not known yet');
});

it('a 12 W fan costs what was worked out for a day and for a season', () => {
  const whole = nightOf('2026-11-26', [[0, 86_400]]);
  expect(whole.electricity?.kWh).toBeCloseTo(FAN.kWhADay, 9);
  const half = nightOf('2026-11-26', [[0, 43_200]]);
  const season = Array.from({ length: FAN.seasonDays }, () => half);
  const cost = fanCost(season, flat, 'Europe/London');
  expect(cost.uses[0]?.kWh).toBeCloseTo(FAN.kWhASeason, 9);
  expect((cost.micros ?? 0) / MICROS).toBeCloseTo(FAN.cost, 2);
});

it('a kWh of heat by loop, by resistance and from propane costs what was worked out', () => {
  const electricity = price(HEAT_PRICE.electricity);
  expect(electricity / LOOP_AT_SEA.ratio / MICROS).toBeCloseTo(HEAT_PRICE.loop, 5);
  expect(LOOP_AT_SEA.watts / LOOP_AT_SEA.fanW).toBeCloseTo(LOOP_AT_SEA.ratio, 2);
  expect(LOOP_AT_2400_M.watts / LOOP_AT_SEA.fanW).toBeCloseTo(LOOP_AT_2400_M.ratio, 2);
  const { propane, kWh, efficiency, perKWh: wanted } = HEAT_PRICE;
  const told = heatPrice({ fuel: 'propane', unit: 'US gal', price: price(propane), kWh, efficiency });
  expect((told ?? 0) / MICROS).toBeCloseTo(wanted, 4);
});

it('a run over midnight is paid at the price of each of its hours, and the hours that are run twice twice', () => {
  // noon to noon of the night in which London's clock goes back; run from 23:00 to 07:00 is nine hours
  const tariffs: Tariff[] = [
    { from: '2026-01-01', price: 300_000, bands: [{ fromMin: 0, toMin: 300, days: 'all', price: 100_000 }] },
  ];
  const told = fanCostOfNight(
    nightOf('2026-10-24', [[11 * 3600, 20 * 3600]], 1000),
    tariffs,
    'Europe/London',
  );
  // 23 to 0 and 5 to 7: 3 kWh at 0.30; 0 to 5 with one hour twice: 6 kWh at 0.10
  expect(told.uses.map((use) => [use.price, Math.round(use.kWh * 1e6) / 1e6, use.seconds])).toEqual([
    [300_000, 3, 10_800],
    [100_000, 6, 21_600],
  ]);
  expect(told.micros).toBeCloseTo(1_500_000, 3);
  expect(meanPrice(told)).toBeCloseTo(1_500_000 / 9, 3);
});

it('a cost of which a price or the watts lack is not known', () => {
  const night = nightOf('2026-11-26', [[0, 3600]]);
  const later: Tariff[] = [{ from: '2026-11-27', price: 1, bands: [] }];
  expect(fanCostOfNight(night, later, 'Europe/London')).toMatchObject({ micros: null, missing: 'no-tariff' });
  expect(fanCostOfNight({ ...night, electricity: null }, flat, 'Europe/London').missing).toBe('no-power');
  expect(fanCost([night, { ...night, electricity: null }], flat, 'Europe/London').micros).toBeNull();
  expect(meanPrice(fanCost([], flat, 'Europe/London'))).toBeNull();
});

it('units of one fuel agree with each other, and each says where its figure comes from', () => {
  const kWh = (fuel: 'propane' | 'oil', unit: string) => energyOf({ fuel, unit, kWh: null })?.kWh ?? 0;
  for (const fuel of ['propane', 'oil'] as const)
    expect(Math.abs(kWh(fuel, 'US gal') / 3.785411784 / kWh(fuel, 'L') - 1)).toBeLessThan(0.002);
  for (const fuel of FUELS) for (const one of FUEL_UNITS[fuel]) expect(one.source).not.toBe('');
  expect(energyOf({ fuel: 'wood', unit: 'US gal', kWh: null })).toBeNull();
});

it('a cost over some years is borne by its seasons, and their parts make the whole exactly', () => {
  const pipe = { on: '2026-10-03', micros: price('100'), years: 3 };
  const season = (date: string) => shareOfSeason(pipe, seasonOf(date, 54), 54);
  const parts = ['2026-12-01', '2027-12-01', '2028-12-01'].map(season);
  expect(parts).toEqual([33_333_333, 33_333_333, 33_333_334]);
  expect([season('2026-06-30'), season('2029-07-01')]).toEqual([0, 0]);
});

it('a season runs from July to June in the north and through the year in the south', () => {
  expect(seasonOf('2027-06-30', 54)).toMatchObject({ name: '2026/27', from: '2026-07-01', to: '2027-06-30' });
  expect(seasonOf('2099-07-01', 54).name).toBe('2099/00');
  expect(seasonOf('2026-06-30', -42)).toMatchObject({ name: '2026', from: '2026-01-01', to: '2026-12-31' });
});

it.each([0.05, 0.13, 0.2])(
  "the deviation and the range of a price agree with chance where heat's is %f of it",
  (share) => {
    const heat = { kWh: 140, sd: 140 * share };
    const told = allInPrice(heat, price('60'));
    if (typeof told === 'string') throw new Error(told);
    const { normal } = chance(20_261_201);
    const prices = Array.from({ length: 100_000 }, () => price('60') / (heat.kWh + heat.sd * normal()));
    const mean = prices.reduce((a, b) => a + b) / prices.length;
    const sd = Math.sqrt(prices.reduce((sum, one) => sum + (one - mean) ** 2, 0) / prices.length);
    expect(Math.abs(told.sd / sd - 1)).toBeLessThan(0.06);
    const inside = prices.filter((one) => one >= told.low && one <= told.high).length / prices.length;
    expect(Math.abs(inside - 0.95)).toBeLessThan(0.003);
  },
);

it('a price is not told where heat is none, negative or too poorly known', () => {
  expect(allInPrice(null, 1)).toBe('no-heat');
  expect(allInPrice({ kWh: -2, sd: 0.1 }, 1)).toBe('heat-not-told');
  expect(allInPrice({ kWh: 10, sd: 4 }, 1)).toBe('heat-not-told');
});
