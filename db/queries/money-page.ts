/** What the page Money and reports show of one source's season: the very nights of Duty, at the prices of the holding. */
import type { Holding } from '@/db/client';
import { type Balance, balanceOf } from '@/lib/analysis/money-balance';
import type { FuelPrice } from '@/lib/analysis/money-fuels';
import { type Season, seasonOf, shareOfSeason } from '@/lib/analysis/money-season';
import type { Tariff } from '@/lib/analysis/money-tariff';
import { nightOf } from '@/lib/analysis/night';
import type { NightSummary } from '@/lib/analysis/nights';
import type { HeapCost, MoneyBook } from '@/lib/schema/money';
import { microsOf } from '@/lib/units/money';
import { listHeapCosts, readMoneyBook } from './money';
import { listNights } from './night';
import { listSources } from './source';

export interface MoneyHouse {
  id: string;
  zone: string;
  latitude: number;
}

export interface MoneyData {
  book: MoneyBook;
  sources: { slug: string; name: string; kind: string }[];
  source: { slug: string; name: string; kind: string } | null;
  season: Season;
  balance: Balance | null;
  /** Newest first, each with what the season bears of it, micros. */
  costs: (HeapCost & { share: number })[];
}

/** A season has no more nights than this. */
const SEASON_NIGHTS = 400;

/**
 * @param slug of the source; left out or unknown, the first of the house
 * @param inSeasonMs an instant of the season that is told; left out, this one
 */
export async function readMoney(
  holding: Holding,
  house: MoneyHouse,
  slug: string | undefined,
  nowMs: number,
  inSeasonMs = nowMs,
): Promise<MoneyData> {
  const book = await readMoneyBook(holding);
  const sources = (await listSources(holding, house.id)).map(({ slug: own, name, kind }) => ({
    ...{ slug: own, name, kind },
  }));
  const source = sources.find((one) => one.slug === slug) ?? sources[0] ?? null;
  const season = seasonOf(nightOf(inSeasonMs, house.zone).night, house.latitude);
  if (source === null) return { book, sources, source, season, balance: null, costs: [] };
  const ask = { sources: [source.slug], from: season.from, to: season.to, limit: SEASON_NIGHTS };
  const nights = (await listNights(holding, house.id, ask, nowMs)).reverse();
  const costs = await listHeapCosts(holding, house.id, source.slug);
  return {
    ...{ book, sources, source, season },
    balance: balance(house, season, nights, book, costs),
    costs: costs.map((cost) => ({ ...cost, share: shareOfSeason(asOwn(cost), season, house.latitude) })),
  };
}

/** Of any nights of one source; the costs borne are those of the season. */
export function balance(
  house: MoneyHouse,
  season: Season,
  nights: readonly NightSummary[],
  book: MoneyBook,
  costs: readonly HeapCost[],
): Balance {
  return balanceOf({
    ...{ nights, season, zone: house.zone, latitude: house.latitude },
    tariffs: book.tariffs.map(asTariff),
    fuels: book.fuels.map((fuel): FuelPrice => ({ ...fuel, price: micros(fuel.price) })),
    costs: costs.map(asOwn),
  });
}

function micros(text: string): number {
  const found = microsOf(text);
  if (found === null) throw new Error(`a price was kept that is none: ${text}`);
  return found;
}

const minutes = (clock: string) => Number(clock.slice(0, 2)) * 60 + Number(clock.slice(3));

function asTariff({ from, price, bands }: MoneyBook['tariffs'][number]): Tariff {
  return {
    from,
    price: micros(price),
    bands: bands.map((band) => ({
      ...{ fromMin: minutes(band.from), toMin: minutes(band.to), days: band.days, price: micros(band.price) },
    })),
  };
}

const asOwn = ({ on, amount, years }: HeapCost) => ({ on, years, micros: micros(amount) });
