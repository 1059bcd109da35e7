/** Nights of one source taken together, so that what stands under a table is what its rows add up to. */
import type { NightSummary } from './nights';

export interface NightTotals {
  nights: number;
  hours: number;
  onSeconds: number;
  restSeconds: number;
  heldSeconds: number;
  handSeconds: number;
  /** Weighted by the nights' lengths. */
  dutyOfNight: number;
  dutyOfDraw: number | null;
  starts: number;
  /** Null where no night has a figure; `nights` says how many have. */
  heat: { kWh: number; sd: number; nights: number } | null;
  electricity: { kWh: number; nights: number } | null;
  /** kWh of heat for 1 kWh of fan, over the nights that have both; null under 1 Wh of fan. */
  heatPerElectricity: { value: number; sd: number } | null;
  lowest: { value: number; at: number; night: string } | null;
  outdoorsLowest: { value: number; night: string } | null;
  belowFrostLimitSeconds: number;
}

const tenth = (value: number) => Math.round(value * 10) / 10;
const thousandth = (value: number) => Math.round(value * 1000) / 1000;

/**
 * Sums of nights. Heat is summed as rows show it, to 0.1 kWh, and fan power to 1 Wh: a reader who adds the column up gets
 * the total. That moves the sum of 35 nights by some 0.2 kWh, far inside its deviation; deviations add as they are, since
 * the same flow and the same sensors err the same way every night (see heat.ts).
 */
export function totalOf(nights: readonly NightSummary[]): NightTotals {
  const sum = (of: (night: NightSummary) => number) => nights.reduce((total, night) => total + of(night), 0);
  const onSeconds = sum((night) => night.onSeconds);
  const restSeconds = sum((night) => night.restSeconds);
  const channelSeconds = sum((night) => night.hours * 3600 * Math.max(night.strips.length, 1));
  const warmed = nights.filter((night) => night.heat !== null);
  const powered = nights.filter((night) => night.electricity !== null);
  const lows = nights.flatMap((night) => (night.lowest ? [{ ...night.lowest, night: night.night }] : []));
  const colds = nights.flatMap((night) =>
    night.outdoorsLowest ? [{ ...night.outdoorsLowest, night: night.night }] : [],
  );
  return {
    nights: nights.length,
    hours: sum((night) => night.hours),
    onSeconds,
    restSeconds,
    heldSeconds: sum((night) => night.heldSeconds),
    handSeconds: sum((night) => night.handSeconds),
    dutyOfNight: channelSeconds === 0 ? 0 : onSeconds / channelSeconds,
    dutyOfDraw: onSeconds + restSeconds === 0 ? null : onSeconds / (onSeconds + restSeconds),
    starts: sum((night) => night.starts),
    heat:
      warmed.length === 0
        ? null
        : {
            kWh: tenth(sum((night) => tenth(night.heat?.kWh ?? 0))),
            sd: sum((night) => night.heat?.sd ?? 0),
            nights: warmed.length,
          },
    electricity:
      powered.length === 0
        ? null
        : {
            kWh: thousandth(sum((night) => thousandth(night.electricity?.kWh ?? 0))),
            nights: powered.length,
          },
    heatPerElectricity: heatPerElectricity(warmed.filter((night) => night.electricity !== null)),
    lowest: least(lows),
    outdoorsLowest: least(colds),
    belowFrostLimitSeconds: sum((night) => night.belowFrostLimitSeconds),
  };
}

function heatPerElectricity(nights: readonly NightSummary[]): { value: number; sd: number } | null {
  const fan = nights.reduce((sum, night) => sum + (night.electricity?.kWh ?? 0), 0);
  if (fan < 0.001) return null;
  const heat = nights.reduce((sum, night) => sum + (night.heat?.kWh ?? 0), 0);
  const sd = nights.reduce((sum, night) => sum + (night.heat?.sd ?? 0), 0);
  return { value: heat / fan, sd: sd / fan };
}

function least<T extends { value: number }>(rows: readonly T[]): T | null {
  return rows.reduce<T | null>((low, row) => (low === null || row.value < low.value ? row : low), null);
}
