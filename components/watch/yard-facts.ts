/** What the yard drawing shows, from how the house stands. Pure. */
import type { WatchChannel, WatchLoop, WatchPoint, WatchSource } from '@/lib/schema/watch-view';
import type { HouseState } from '@/lib/schema/house-state';

/** A value that may be shown: null where there is no reading that can be trusted. */
type Value = number | null;

export interface YardLoop {
  label: string;
  /** By the relay's report: what is drawn moving must move. */
  runs: boolean;
  /** Ordered on, but not reported so yet. */
  isOrdered: boolean;
  intake: Value;
  back: Value;
  /** W into the house; null while it rests or its ends are not read. */
  heatW: Value;
}

export interface YardHeap {
  name: string;
  core: Value;
  base: Value;
  edge: Value;
  underFloor: boolean;
  loop: YardLoop | null;
}

export interface YardFacts {
  house: Value;
  bench: Value;
  humidity: Value;
  outdoors: Value;
  heap: YardHeap | null;
  ground: { name: string; temperature: Value; loop: YardLoop | null } | null;
  heater: { label: string; on: boolean; watts: number | null } | null;
  vent: { label: string; open: boolean } | null;
  /** Names of further heaps, which have no room in the drawing. */
  more: string[];
}

interface Parts {
  points: WatchPoint[];
  channels: WatchChannel[];
  sources: WatchSource[];
  loops: WatchLoop[];
}

export function yardFacts({ channels, sources, loops }: Parts, state: HouseState): YardFacts {
  const value = (key: string | null): Value => {
    const point = state.points.find((one) => one.key === key);
    return point === undefined || point.quality === 'bad' ? null : point.value;
  };
  const ofRole = (role: string) => state.points.find((one) => one.role === role)?.key ?? null;
  const standing = (key: string | null) => state.channels.find((one) => one.key === key);
  const loopOf = (source: WatchSource): YardLoop | null => {
    const loop = loops.find((one) => one.source === source.slug);
    const channel = channels.find((one) => one.key === loop?.channel);
    const now = standing(loop?.channel ?? null);
    if (loop === undefined || channel === undefined || now === undefined) return null;
    const runs = now.reported === 'on';
    const [intake, back] = [value(loop.intake), value(loop.return)];
    const worth = runs ? loop.wattPerK : null;
    return {
      label: channel.label,
      ...{ runs, intake, back },
      isOrdered: now.state === 'on' && !runs,
      heatW: worth === null || intake === null || back === null ? null : worth * (back - intake),
    };
  };
  const [heap, ...more] = sources.filter((source) => source.kind === 'heap');
  const ground = sources.find((source) => source.kind === 'ground');
  const heater = channels.find((one) => one.loadKind === 'heater');
  const vent = channels.find((one) => one.loadKind === 'vent');
  return {
    house: value(ofRole('house-air')),
    bench: value(ofRole('bench')),
    humidity: value(ofRole('humidity')),
    outdoors: value(ofRole('outdoors')),
    heap:
      heap === undefined
        ? null
        : {
            name: heap.name,
            ...{
              core: value(heap.core),
              base: value(heap.base),
              edge: value(ofRole('heap-edge')),
              loop: loopOf(heap),
            },
            underFloor: state.sources.find((one) => one.slug === heap.slug)?.underFloor ?? false,
          },
    ground:
      ground === undefined
        ? null
        : { name: ground.name, temperature: value(ground.core ?? ofRole('ground')), loop: loopOf(ground) },
    heater:
      heater === undefined
        ? null
        : { label: heater.label, on: standing(heater.key)?.reported === 'on', watts: heater.watts },
    vent: vent === undefined ? null : { label: vent.label, open: standing(vent.key)?.reported === 'on' },
    more: more.map((one) => one.name),
  };
}
