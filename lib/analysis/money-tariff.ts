/**
 * What electricity costs at an instant: tariffs with dates, and in each a price with other prices for times of the day, by
 * the clock of the house. The hour that is run twice in autumn has its price twice; the one that is left out in spring has
 * none. All prices are micros a kWh (lib/units/money.ts).
 */
import { DateTime, IANAZone } from 'luxon';

export type Days = 'all' | 'weekdays' | 'weekend';

export interface PriceBand {
  /** Minutes from midnight by the clock; where `to` is not after `from` it is of the next day. Both equal: the whole day. */
  fromMin: number;
  toMin: number;
  /** Of the day on which it begins. */
  days: Days;
  price: number;
}

export interface Tariff {
  /** First day, `YYYY-MM-DD`; in force until the next begins. */
  from: string;
  /** Where no band holds. */
  price: number;
  /** The first that holds goes. */
  bands: PriceBand[];
}

export interface PricedSpan {
  /** Epoch ms. */
  from: number;
  to: number;
  /** Null before the first tariff. */
  price: number | null;
}

const MINUTE = 60_000;
const DAY = 86_400_000;
const CHUNK = 6 * 3_600_000;

/**
 * [fromMs, toMs) in spans of one price, without gap or overlap, neighbours different.
 * @example a night from noon to noon with a band 22:00 to 06:00 gives three
 */
export function pricedSpans(
  tariffs: readonly Tariff[],
  zone: string,
  fromMs: number,
  toMs: number,
): PricedSpan[] {
  const dated = [...tariffs].sort((a, b) => (a.from < b.from ? -1 : 1));
  const marks = new Set([
    0,
    ...dated.flatMap((one) => one.bands.flatMap((band) => [band.fromMin, band.toMin])),
  ]);
  const spans: PricedSpan[] = [];
  for (const piece of evenPieces(zone, fromMs, toMs)) {
    const shift = piece.offsetMin * MINUTE;
    const cuts = [piece.from];
    for (let day = Math.floor((piece.from + shift) / DAY) * DAY; day <= piece.to + shift; day += DAY)
      for (const mark of marks) cuts.push(day + mark * MINUTE - shift);
    const inside = [...new Set(cuts)].filter((at) => at >= piece.from && at < piece.to).sort((a, b) => a - b);
    inside.forEach((from, i) => {
      const to = inside[i + 1] ?? piece.to;
      const price = priceByClock(dated, from + shift);
      const last = spans.at(-1);
      if (last !== undefined && last.price === price) last.to = to;
      else spans.push({ from, to, price });
    });
  }
  return spans;
}

interface Piece {
  from: number;
  to: number;
  /** Of the clock, ahead of UTC. */
  offsetMin: number;
}

/** Pieces in which the clock is not put forward or back. */
function evenPieces(zone: string, fromMs: number, toMs: number): Piece[] {
  const place = IANAZone.create(zone);
  const pieces: Piece[] = [];
  const add = (from: number, to: number) => {
    const offsetMin = place.offset(from);
    const last = pieces.at(-1);
    if (last !== undefined && last.offsetMin === offsetMin) last.to = to;
    else pieces.push({ from, to, offsetMin });
  };
  for (let from = fromMs; from < toMs; from += CHUNK) {
    const to = Math.min(toMs, from + CHUNK);
    const before = place.offset(from);
    if (place.offset(to - 1) === before) add(from, to);
    else {
      let [low, high] = [from, to - 1];
      while (high - low > 1) {
        const middle = Math.floor((low + high) / 2);
        if (place.offset(middle) === before) low = middle;
        else high = middle;
      }
      add(from, high);
      add(high, to);
    }
  }
  return pieces;
}

/** @param localMs what the clock shows, counted as if it were UTC */
function priceByClock(dated: readonly Tariff[], localMs: number): number | null {
  const clock = DateTime.fromMillis(localMs, { zone: 'UTC' });
  const date = clock.toFormat('yyyy-MM-dd');
  const tariff = dated.findLast((one) => one.from <= date);
  if (tariff === undefined) return null;
  const minute = clock.hour * 60 + clock.minute;
  const yesterday = clock.weekday === 1 ? 7 : clock.weekday - 1;
  const band = tariff.bands.find(({ fromMin, toMin, days }) =>
    fromMin < toMin
      ? minute >= fromMin && minute < toMin && isOf(days, clock.weekday)
      : minute >= fromMin
        ? isOf(days, clock.weekday)
        : minute < toMin && isOf(days, yesterday),
  );
  return band?.price ?? tariff.price;
}

/** @param weekday 1 is Monday, 7 Sunday */
function isOf(days: Days, weekday: number): boolean {
  return days === 'all' || (days === 'weekend') === weekday > 5;
}
