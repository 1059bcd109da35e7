/** Nights of one source taken together: sums of the nights as they are kept and exported, rounded once, where they are shown. */
import { round } from './rounding';
import { LEAST_POWER_KWH } from './channel-night';
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
  /** kWh of heat for 1 kWh of fan while it was measured, over the nights that have both; null under 1 Wh of fan. */
  heatPerElectricity: { value: number; sd: number } | null;
  lowest: { value: number; at: number; night: string } | null;
  outdoorsLowest: { value: number; night: string } | null;
  /** Over the nights of which it is known; null where it is of none. */
  belowFrostLimitSeconds: number | null;
}

/** A night's heat is kept to 1 Wh and its electricity to 0.1 Wh: so cut, a sum is free of what binary fractions add. */
const HEAT_PLACES = 3;
const ELECTRICITY_PLACES = 4;

/**
 * Sums of nights, to all the digits that nights are kept and exported with. A sum of rounded rows would be off by some
 * 0.2 kWh over a season, and by another 0.2 in another choice of nights. Deviations add as they are, since the same flow and
 * the same sensors err the same way every night (see heat.ts).
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
            kWh: round(
              sum((night) => night.heat?.kWh ?? 0),
              HEAT_PLACES,
            ),
            sd: round(
              sum((night) => night.heat?.sd ?? 0),
              HEAT_PLACES,
            ),
            nights: warmed.length,
          },
    electricity:
      powered.length === 0
        ? null
        : {
            kWh: round(
              sum((night) => night.electricity?.kWh ?? 0),
              ELECTRICITY_PLACES,
            ),
            nights: powered.length,
          },
    heatPerElectricity: heatPerElectricity(warmed.filter((night) => night.heatElectricity !== null)),
    lowest: least(lows),
    outdoorsLowest: least(colds),
    belowFrostLimitSeconds: nights.every((night) => night.belowFrostLimitSeconds === null)
      ? null
      : sum((night) => night.belowFrostLimitSeconds ?? 0),
  };
}

function heatPerElectricity(nights: readonly NightSummary[]): { value: number; sd: number } | null {
  const fan = nights.reduce((sum, night) => sum + (night.heatElectricity?.kWh ?? 0), 0);
  if (fan < LEAST_POWER_KWH) return null;
  const heat = nights.reduce((sum, night) => sum + (night.heat?.kWh ?? 0), 0);
  const sd = nights.reduce((sum, night) => sum + (night.heat?.sd ?? 0), 0);
  return { value: heat / fan, sd: sd / fan };
}

function least<T extends { value: number }>(rows: readonly T[]): T | null {
  return rows.reduce<T | null>((low, row) => (low === null || row.value < low.value ? row : low), null);
}
