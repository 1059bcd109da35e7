import { describe, expect, it } from 'vitest';
import { heatSum, loopHeat, NO_HEAT } from '@/lib/analysis/heat';
import { houseNight } from '@/lib/analysis/house-night';
import { nightNamed, nightsBetween } from '@/lib/analysis/night';
import type { NightInput } from '@/lib/analysis/nights';
import type { Series } from '@/lib/analysis/series';
import { summarise } from '@/lib/analysis/summarise';
import { nightLengths } from '../checks/nights';
import { scene } from './scene';

const minute = 60_000;
/** A fan that runs all the time, and points read once a minute, over any span. */
function always(from: number, to: number, zone: string): NightInput {
  const input = scene();
  const line = (key: string, role: string, value: (at: number) => number): Series => ({
    ...{ key, name: key, role, holdS: 180, sd: 0.3 },
    good: Array.from({ length: Math.ceil((to - from) / minute) + 10 }, (_, i) => {
      const at = from + (i - 5) * minute;
      return { at, value: value(at) };
    }),
  });
  const day = (at: number) => Math.sin((2 * Math.PI * at) / 86_400_000);
  const points = [
    line('bench-1', 'bench', (at) => 5 + day(at)),
    line('outdoors', 'outdoors', () => -3),
    line('loop-intake', 'loop-intake', (at) => 6 + day(at)),
    line('loop-return', 'loop-return', (at) => 18 + 2 * day(at)),
  ];
  const [fan] = input.channels;
  if (fan === undefined) throw new Error('the scene has a fan');
  const decisions = [{ at: from - minute, state: 'on' as const, claim: 'band' as const }];
  return {
    ...input,
    nowMs: to + minute,
    house: { ...input.house, zone },
    channels: [{ ...fan, record: { ...fan.record, decisions } }],
    points: new Map(points.map((one) => [one.key, one])),
  };
}

describe('a night in which the clock is changed', () => {
  it.each(nightLengths)(
    'in %s of %s is summed over the hours that it has',
    (zone, name, _from, _to, hours) => {
      const night = nightNamed(name, zone);
      const summary = summarise({ ...always(night.from, night.to, zone), night });
      expect([summary.hours, summary.onSeconds, summary.dutyOfNight]).toEqual([hours, hours * 3600, 1]);
      expect(summary.electricity?.kWh).toBeCloseTo(0.012 * hours, 4);
      expect(summary.coverage).toBeGreaterThan(0.3);
    },
  );
});

describe('nights in a row', () => {
  const zone = 'Australia/Lord_Howe';
  const nights = nightsBetween(
    nightNamed('2026-04-02', zone).from,
    nightNamed('2026-04-06', zone).from,
    zone,
  );
  const [first, last] = [nights[0]?.from ?? 0, nights.at(-1)?.to ?? 0];
  const input = always(first, last, zone);
  const summaries = nights.map((night) => summarise({ ...input, night }));
  const sum = (of: (night: (typeof summaries)[number]) => number) =>
    summaries.reduce((all, one) => all + of(one), 0);

  it('have together the seconds, heat and lift of the whole span, across a clock change', () => {
    const { loop, flow } = input.channels[0] ?? {};
    const [intake, back] = [input.points.get(loop?.intake ?? ''), input.points.get(loop?.return ?? '')];
    if (!flow || intake === undefined || back === undefined) throw new Error('the scene has a loop');
    const whole = [loopHeat([{ from: first, to: last }], intake, back, flow, 310)].reduce(heatSum, NO_HEAT);
    expect(nights).toHaveLength(5);
    expect(sum((night) => night.onSeconds)).toBe((last - first) / 1000);
    expect(sum((night) => night.heat?.kWh ?? 0)).toBeCloseTo(whole.kWh, 2);
    expect(sum((night) => night.readings)).toBe(
      [...input.points.values()].flatMap(({ good }) => good).filter(({ at }) => at >= first && at < last)
        .length,
    );
  });

  it('have for the house the heat of its sources', () => {
    const night = nights[1];
    if (night === undefined) throw new Error('five nights');
    const house = houseNight({ ...input, night, house: { ...input.house, frostAlarmC: 2 } });
    expect(house.heat).toEqual(summaries[1]?.heat);
    expect(house.liftDegreeHours).toBe(summaries[1]?.liftDegreeHours);
    expect([house.belowFrostLimitSeconds, house.belowFrostAlarmSeconds]).toEqual([0, 0]);
  });
});
