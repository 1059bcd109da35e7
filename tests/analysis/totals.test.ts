import { describe, expect, it } from 'vitest';
import type { NightSummary } from '@/lib/analysis/nights';
import { summarise } from '@/lib/analysis/summarise';
import { totalOf } from '@/lib/analysis/totals';
import { scene } from './scene';

const one = summarise(scene());
const withHeat = (kWh: number, sd: number): NightSummary => ({
  ...one,
  heat: { kWh, sd, assumedRunning: false },
});

describe('nights taken together', () => {
  it('add up to what a reader gets from the rows at a tenth of a kilowatt hour', () => {
    const nights = [withHeat(1.14, 0.1), withHeat(1.14, 0.1), withHeat(1.14, 0.1)];
    expect(totalOf(nights).heat?.kWh).toBe(3.3);
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
    const powered: NightSummary = { ...withHeat(4, 0.4), electricity: { kWh: 0.1 } };
    const unknown: NightSummary = { ...withHeat(4, 0.4), electricity: null };
    expect(totalOf([powered, unknown]).heatPerElectricity).toEqual({ value: 40, sd: 4 });
  });

  it('claim no heat for a fan that hardly ran', () => {
    expect(totalOf([{ ...withHeat(0.1, 0.1), electricity: { kWh: 0.0004 } }]).heatPerElectricity).toBeNull();
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
