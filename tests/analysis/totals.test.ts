import { describe, expect, it } from 'vitest';
import type { NightSummary } from '@/lib/analysis/nights';
import { summarise } from '@/lib/analysis/summarise';
import { totalOf } from '@/lib/analysis/totals';
import { decimal } from '@/lib/units/format';
import { scene } from './scene';

const one = summarise(scene());
const withHeat = (kWh: number, sd: number): NightSummary => ({
  ...one,
  heat: { kWh, sd, assumedRunning: false },
});

describe('nights taken together', () => {
  it('are sums of what is kept and exported, to its last digit, and not of rounded rows', () => {
    const nights = [withHeat(1.14, 0.1), withHeat(1.14, 0.1), withHeat(1.141, 0.101)];
    // each shows as 1.1; an outside script that adds the exported column up gets this, and shows 3.4
    expect(totalOf(nights).heat).toEqual({ kWh: 3.421, sd: 0.301, nights: 3 });
    const fan = [0.0894, 0.0894, 0.0894].map((kWh) => ({ ...one, electricity: { kWh } }));
    expect(totalOf(fan).electricity?.kWh).toBe(0.2682);
  });

  it('show a half of a tenth below nothing as its row does', () => {
    const shown = (kWh: number) => decimal(totalOf([withHeat(kWh, 0.1)]).heat?.kWh ?? NaN, 1);
    expect(shown(-0.25)).toBe(decimal(-0.25, 1));
    expect(shown(0.25)).toBe(decimal(0.25, 1));
  });

  it('tell time under the limit of the nights of which it is known, and none where it is of none', () => {
    const unread: NightSummary = { ...one, belowFrostLimitSeconds: null };
    expect(totalOf([unread, { ...one, belowFrostLimitSeconds: 60 }]).belowFrostLimitSeconds).toBe(60);
    expect(totalOf([unread, unread]).belowFrostLimitSeconds).toBeNull();
  });

  it('keep the deviation of a wrong flow, which does not average out', () => {
    expect(totalOf([withHeat(4, 0.5), withHeat(4, 0.5)]).heat?.sd).toBe(1);
  });

  it('weigh duty by the length of the nights', () => {
    const short: NightSummary = { ...one, hours: 6, onSeconds: 6 * 3600 };
    const idle: NightSummary = { ...one, hours: 24, onSeconds: 0 };
    expect(totalOf([short, idle]).dutyOfNight).toBeCloseTo(0.2, 9);
  });

  it('leave a night without heat out of the heat, and say how many have one', () => {
    expect(totalOf([withHeat(2, 0.2), { ...one, heat: null }]).heat).toEqual({ kWh: 2, sd: 0.2, nights: 1 });
  });

  it('compare heat with the fan only over nights that have both', () => {
    const powered: NightSummary = { ...withHeat(4, 0.4), heatElectricity: { kWh: 0.1 } };
    const unknown: NightSummary = { ...withHeat(4, 0.4), heatElectricity: null };
    expect(totalOf([powered, unknown]).heatPerElectricity).toEqual({ value: 40, sd: 4 });
  });

  it('claim no heat for a fan that hardly ran', () => {
    expect(
      totalOf([{ ...withHeat(0.1, 0.1), heatElectricity: { kWh: 0.0004 } }]).heatPerElectricity,
    ).toBeNull();
  });

  it('are empty, not wrong, without any night', () => {
    const none = totalOf([]);
    expect([none.nights, none.heat, none.dutyOfNight, none.dutyOfDraw, none.lowest]).toEqual([
      0,
      null,
      0,
      null,
      null,
    ]);
  });
});
