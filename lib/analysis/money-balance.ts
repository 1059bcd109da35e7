/** What a source's heat over some nights cost, and what the same heat would have cost from what is bought. Micros. */
import { fanCost, type FanCost, meanPrice, type NightOfFan } from './money-fan';
import { type Fuel, type FuelPrice, heatPrice } from './money-fuels';
import {
  type AllIn,
  allInPrice,
  type NoPrice,
  type OwnCost,
  type Season,
  shareOfSeason,
} from './money-season';
import type { Tariff } from './money-tariff';
import type { NightSummary } from './nights';
import { type NightTotals, totalOf } from './totals';

export interface Alternative {
  kind: 'electricity' | Fuel;
  /** A kWh of heat. */
  perKWh: number;
  /** The heat of these nights; null where that is not known or was below nothing. */
  same: { micros: number; sd: number } | null;
}

export interface Balance {
  totals: NightTotals;
  fan: FanCost;
  /** What the season bears of the costs that were entered; null where none was. */
  own: number | null;
  /** Of a kWh of heat; of part of a season it is told as it stands, for what has been paid lies before the heat. */
  allIn: AllIn | NoPrice;
  /** Cheapest first; electricity at what its hours cost on the mean, and one kWh of heat for each. */
  alternatives: Alternative[];
}

export interface BalanceAsk {
  nights: readonly NightSummary[];
  zone: string;
  latitude: number;
  season: Season;
  tariffs: readonly Tariff[];
  fuels: readonly FuelPrice[];
  costs: readonly OwnCost[];
}

export function balanceOf(ask: BalanceAsk): Balance {
  const totals = totalOf(ask.nights);
  const fan = fanCost(ask.nights satisfies readonly NightOfFan[], ask.tariffs, ask.zone);
  const shares = ask.costs.map((cost) => shareOfSeason(cost, ask.season, ask.latitude));
  const own = shares.some((share) => share > 0) ? shares.reduce((sum, share) => sum + share, 0) : null;
  const { heat } = totals;
  const same = (perKWh: number) =>
    heat === null || heat.kWh <= 0 ? null : { micros: perKWh * heat.kWh, sd: perKWh * heat.sd };
  const electricity = meanPrice(fan);
  const prices: [Alternative['kind'], number | null][] = [
    ['electricity', electricity],
    ...ask.fuels.map((fuel): [Fuel, number | null] => [fuel.fuel, heatPrice(fuel)]),
  ];
  return {
    totals,
    fan,
    own,
    allIn: own === null ? 'no-costs' : (fan.missing ?? allInPrice(heat, own + (fan.micros ?? 0))),
    alternatives: prices
      .flatMap(([kind, perKWh]) => (perKWh === null ? [] : [{ kind, perKWh, same: same(perKWh) }]))
      .sort((a, b) => a.perKWh - b.perKWh),
  };
}
