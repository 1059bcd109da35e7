/** What the electricity of nights cost, by the hours in which it was used. */
import type { PricedSpan, Tariff } from './money-tariff';
import { pricedSpans } from './money-tariff';
import type { NightSummary } from './nights';

/** Electricity used at one price. */
export interface PriceUse {
  /** Micros a kWh. */
  price: number;
  kWh: number;
  seconds: number;
}

export type NightOfFan = Pick<NightSummary, 'from' | 'to' | 'electricity' | 'channels' | 'strips'>;

export interface FanCost {
  /** Micros; null where a price or the watts lack for a part of it. */
  micros: number | null;
  /** What is not known: `no-power` of a load, or `no-tariff` for some of the hours. */
  missing: 'no-power' | 'no-tariff' | null;
  /** Dearest first. */
  uses: PriceUse[];
}

/**
 * A night's electricity, as it is kept, laid upon the hours in which its channels ran and counted at
 * the price of each. So the cost follows from what the page shows and from the runs.
 * @param zone IANA, of the house
 */
export function fanCostOfNight(night: NightOfFan, tariffs: readonly Tariff[], zone: string): FanCost {
  if (night.electricity === null) return { micros: null, missing: 'no-power', uses: [] };
  const { kWh } = night.electricity;
  if (kWh === 0) return { micros: 0, missing: null, uses: [] };
  const spans = pricedSpans(tariffs, zone, night.from, night.to);
  const uses = new Map<number, PriceUse>();
  let priced = 0;
  let all = 0;
  for (const { channel, spans: strip } of night.strips) {
    const runs = strip.filter(([, , , isOn]) => isOn);
    const seconds = runs.reduce((sum, [, from, to]) => sum + to - from, 0);
    const own = night.channels.find((one) => one.number === channel)?.electricity?.kWh ?? 0;
    if (seconds === 0 || own === 0) continue;
    all += own;
    for (const [, from, to] of runs) {
      for (const { price, seconds: part } of partsOf(
        spans,
        night.from + from * 1000,
        night.from + to * 1000,
      )) {
        if (price === null) continue;
        const use = uses.get(price) ?? { price, kWh: 0, seconds: 0 };
        use.kWh += (own * part) / seconds;
        use.seconds += part;
        priced += (own * part) / seconds;
        uses.set(price, use);
      }
    }
  }
  // tolerance of the arithmetic alone: a second of a watt is 3e-7 kWh
  if (all === 0 || priced < all - 1e-9) return { micros: null, missing: 'no-tariff', uses: [] };
  const found = [...uses.values()].map((use) => ({ ...use, kWh: (use.kWh * kWh) / all }));
  return {
    micros: found.reduce((sum, use) => sum + use.kWh * use.price, 0),
    missing: null,
    uses: found.sort((a, b) => b.price - a.price),
  };
}

function partsOf(spans: readonly PricedSpan[], from: number, to: number) {
  return spans.flatMap((span) => {
    const seconds = (Math.min(to, span.to) - Math.max(from, span.from)) / 1000;
    return seconds > 0 ? [{ price: span.price, seconds }] : [];
  });
}

/** Nights together; not known as soon as one of them is not. */
export function fanCost(nights: readonly NightOfFan[], tariffs: readonly Tariff[], zone: string): FanCost {
  const each = nights.map((night) => fanCostOfNight(night, tariffs, zone));
  const missing = each.find((one) => one.missing !== null)?.missing ?? null;
  const uses = new Map<number, PriceUse>();
  for (const { price, kWh, seconds } of each.flatMap((one) => one.uses)) {
    const use = uses.get(price) ?? { price, kWh: 0, seconds: 0 };
    uses.set(price, { price, kWh: use.kWh + kWh, seconds: use.seconds + seconds });
  }
  return {
    micros: missing === null ? each.reduce((sum, one) => sum + (one.micros ?? 0), 0) : null,
    missing,
    uses: [...uses.values()].sort((a, b) => b.price - a.price),
  };
}

/** Micros a kWh on the mean of what was used; null where that is not known, or nothing was used. */
export function meanPrice({ uses, missing }: FanCost): number | null {
  const kWh = uses.reduce((sum, use) => sum + use.kWh, 0);
  if (missing !== null || kWh === 0) return null;
  return uses.reduce((sum, use) => sum + use.kWh * use.price, 0) / kWh;
}
