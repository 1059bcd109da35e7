/** From how a house stands to what its sentence is made of. */
import type { WatchBand, WatchChannel, WatchSource } from '@/lib/schema/watch-view';
import type { HouseState } from '@/lib/schema/house-state';
import type { HouseStanding } from '@/lib/wording/watch-standing';

/** Of a bad cable a night has dozens; the wiring page tells each point's latest. */
const DOUBTS_SHOWN = 4;
const MINUTE_MS = 60_000;
/** So many at once are a line or a node, not a probe. */
const MANY = 3;

interface Parts {
  house: { name: string; frostLimit: number | null };
  channels: WatchChannel[];
  sources: WatchSource[];
  bands: WatchBand[];
  coldest: { value: number; at: number } | null;
}

/** The band that the house is judged by: the first warming one, of a heap's channel if there is such. */
export function mainBand(parts: Pick<Parts, 'bands' | 'channels' | 'sources'>): WatchBand | null {
  const heaps = parts.sources.filter((source) => source.kind === 'heap').map((source) => source.slug);
  const ofHeap = parts.channels.filter((one) => heaps.includes(one.source ?? '')).map((one) => one.label);
  const warm = parts.bands.filter((band) => band.purpose === 'warm');
  return warm.find((band) => ofHeap.includes(band.channel)) ?? warm[0] ?? null;
}

/** @param now epoch ms: which period of the band decides */
export function standingOf(parts: Parts, state: HouseState, now: number): HouseStanding {
  // a version that was put into force in the night has a band of its own under the same channel
  const main = mainBand(parts);
  const period = parts.bands
    .filter((band) => band.channel === main?.channel && band.point === main.point && band.purpose === 'warm')
    .flatMap((band) => band.periods)
    .findLast((one) => now >= one.from && now < one.to);
  const heaps = parts.sources.filter((source) => source.kind === 'heap');
  return {
    houseName: parts.house.name,
    frostLimit: parts.house.frostLimit,
    points: state.points,
    channels: state.channels,
    band:
      main === null || period === undefined
        ? null
        : { point: main.point, low: period.low, high: period.high },
    draws: parts.channels.flatMap((channel) => {
      const heap = heaps.find((source) => source.slug === channel.source);
      return heap === undefined ? [] : [{ channel: channel.key, base: heap.base }];
    }),
    coldest: parts.coldest,
  };
}

export interface NightDoubt {
  name: string;
  why: string | null;
  /** Epoch ms. */
  from: number;
  to: number;
}

/** Doubts of a minute and more that were over since `from`, the latest first; what fell silent together is told together. */
export function pastDoubts(state: HouseState | null, from: number): NightDoubt[] {
  const doubts = (state?.points ?? [])
    .flatMap(({ name, quality, lastDoubt }): NightDoubt[] => {
      if (quality !== 'good' || !lastDoubt) return [];
      return [{ name, why: lastDoubt.why, from: Date.parse(lastDoubt.from), to: Date.parse(lastDoubt.to) }];
    })
    .filter((doubt) => doubt.to >= from && doubt.to - doubt.from >= MINUTE_MS);
  const together = new Map<string, NightDoubt[]>();
  for (const doubt of doubts) {
    const key = `${doubt.why} ${Math.floor(doubt.to / MINUTE_MS)}`;
    together.set(key, [...(together.get(key) ?? []), doubt]);
  }
  return [...together.values()]
    .flatMap((group) => {
      const [first] = group;
      if (first === undefined || group.length < MANY) return group;
      return [{ ...first, name: `${group.length} points`, from: Math.min(...group.map((one) => one.from)) }];
    })
    .sort((one, other) => other.to - one.to)
    .slice(0, DOUBTS_SHOWN);
}
