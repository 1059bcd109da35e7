/** A night of a whole house, with every channel of it: of one without any source as well. */
import { channelNight, heatForPower, measuredShare, shownHeat } from './channel-night';
import { climateOf } from './climate';
import { type Heat, heatSum, NO_HEAT } from './heat';
import { hoursBetween, type Night } from './night';
import {
  type HouseNight,
  LEAST_COVERAGE,
  type NightChannel,
  type NightHouse,
  SUMMARY_VERSION,
} from './nights';
import { round } from './rounding';
import { coverageOf, lowestOf, secondsUnder, type Series } from './series';
import { readingsOf } from './summarise';

export interface HouseNightInput {
  night: Night;
  /** Epoch ms; a night is summed up to here while it lasts. */
  nowMs: number;
  house: NightHouse & { frostAlarmC: number | null };
  channels: NightChannel[];
  points: ReadonlyMap<string, Series>;
}

/** What a house's climate is told by. */
const CLIMATE_ROLES = ['house-air', 'bench', 'outdoors', 'humidity'];

/** Sums a house's night up. Heat and electricity are those of the channels of which they are known. */
export function houseNight(input: HouseNightInput): HouseNight {
  const { night, house, points } = input;
  const to = Math.max(night.from, Math.min(night.to, input.nowMs));
  const extent = { from: night.from, to };
  const work = input.channels.map((one) => channelNight(one, points, house.altitudeM, extent));
  const of = (roles: readonly string[]) => [...points.values()].filter(({ role }) => roles.includes(role));
  const ofHouse = of(['house-air', 'bench']);
  const lowest = lowestOf(ofHouse, night.from, to);
  const coldest = lowestOf(of(['outdoors']), night.from, to);
  const under = (limit: number | null) =>
    limit === null || lowest === null ? null : Math.round(secondsUnder(ofHouse, limit, night.from, to));
  const heats = work.flatMap(({ heat }) => ('why' in heat ? [] : [heat]));
  const powers = work.flatMap(({ powerKWh }) => (typeof powerKWh === 'number' ? [powerKWh] : []));
  const heat =
    heats.length === 0
      ? null
      : shownHeat(
          heats.reduce<Heat>((all, one) => heatSum(all, one), NO_HEAT),
          heats.some((one) => one.assumed),
        );
  const electricity =
    powers.length === 0
      ? null
      : {
          kWh: round(
            powers.reduce((sum, kWh) => sum + kWh, 0),
            4,
          ),
        };
  const heatElectricity = heat === null ? null : warmingPower(work);
  const heatMeasured = measuredShare(heats);
  // a loop that ran and was hardly read has no heat at all: the sum is of the others
  const isPart = work.some(
    ({ heat: own, night: { onSeconds } }) => 'why' in own && own.why === 'no-readings' && onSeconds > 0,
  );
  const { missing, ...climate } = climateOf(points, night.from, to);
  const coverage = round(meanCoverage(of(CLIMATE_ROLES), night.from, to), 4);
  return {
    version: SUMMARY_VERSION,
    night: night.night,
    from: night.from,
    to,
    ends: night.to,
    complete: to === night.to,
    hours: round(hoursBetween(night.from, to), 4),
    lowest: lowest && { ...lowest, value: round(lowest.value, 2) },
    belowFrostLimitSeconds: under(house.frostLimitC),
    belowFrostAlarmSeconds: under(house.frostAlarmC),
    outdoorsLowest: coldest && { value: round(coldest.value, 2), at: coldest.at },
    heat,
    heatMeasured,
    electricity,
    heatElectricity,
    heatForPower: heatForPower(heat, heatElectricity),
    channels: work.map((one) => one.night),
    ...climate,
    coverage,
    coverageLow: isPart || Math.min(coverage, heatMeasured ?? 1) < LEAST_COVERAGE,
    readings: readingsOf(points, night.from, to),
    missing: {
      ...missing,
      ...(lowest === null ? { lowest: 'no-readings' as const } : {}),
      ...(heat === null ? { heat: 'no-loop' as const } : {}),
      ...(electricity === null ? { electricity: 'no-power' as const } : {}),
    },
  };
}

/** Electricity of the channels whose heat is known, while it was: a lamp's would make the loops look poor. */
function warmingPower(work: readonly ReturnType<typeof channelNight>[]): { kWh: number } | null {
  let kWh = 0;
  for (const { heat, powerKWh, heatPowerKWh } of work) {
    if ('why' in heat) continue;
    if (typeof powerKWh !== 'number') return null;
    kWh += heatPowerKWh;
  }
  return { kWh: round(kWh, 4) };
}

function meanCoverage(all: readonly Series[], fromMs: number, toMs: number): number {
  if (all.length === 0) return 0;
  return all.reduce((sum, one) => sum + coverageOf(one, fromMs, toMs), 0) / all.length;
}
