// The demo's Long house written out by hand: what a programmer would write who knew this one house and no other. It is
// given what the core is given and must give the core's states, claims and wakeAt at every step of the benchmark's night,
// the calendar's part in them included. It leaves out what that night does not have (bad readings, hands, lock-outs, frost
// without readings) and throws rather than guess if one comes; it keeps its state in place, as nobody asks it for the old.
import type { Claim, Observed, State } from '@/lib/control/types';

/** The demo's points in order. */
const IDS = [
  'point-house-air',
  'point-bench-1',
  'point-bench-2',
  'point-humidity',
  'point-outdoors',
  'point-light',
  'point-loop-intake',
  'point-loop-return',
  'point-gate-core',
  'point-gate-base',
  'point-gate-edge',
  'point-ground',
  'point-ground-return',
  'point-fan-amps',
];
const P = { air: 0, bench1: 1, bench2: 2, intake: 6, back: 7, core: 8, base: 9, amps: 13 } as const;
const MAX_RATE = [0.5, 0.5, 0.5, 0, 0.5, 0, 1, 2, 0.1, 0.2, 0.2, 0.2, 2, 0];
const LEAST = [-40, -40, -40, 0, -40, 0, -40, -40, -40, -40, -40, -40, -40, 0];
const MOST = [85, 85, 85, 110, 85, 1400, 85, 85, 85, 85, 85, 85, 85, 5];
const STALE_MS = 90_001;
const DAY_MS = 86_400_000;
const HOUR_MS = 3_600_000;

interface Load {
  state: State;
  since: number | null;
  claim: Claim;
  latch: boolean;
}
const load = (): Load => ({ state: 'off', since: null, claim: 'idle', latch: false });

interface Store {
  credit: number;
  at: number;
  slope: number;
  resting: boolean;
  restSince: number | null;
}
const store = (at: number): Store => ({ credit: 1, at, slope: 1, resting: false, restSince: null });

export interface StraightState {
  values: number[];
  times: number[];
  fan: Load;
  ground: Load;
  mat: Load;
  vent: Load;
  heap: Store;
  tubes: Store;
  frost: boolean;
  floor: boolean;
  /** Runs of the gate fan: [from, to]. */
  runs: [number, number][];
}

export const straightState = (at: number): StraightState => ({
  values: new Array<number>(14).fill(NaN),
  times: new Array<number>(14).fill(-Infinity),
  fan: load(),
  ground: load(),
  mat: load(),
  vent: load(),
  heap: store(at),
  tubes: store(at),
  frost: false,
  floor: false,
  runs: [],
});

export interface Answer {
  states: State[];
  claims: Claim[];
  wakeAt: number;
}

/** One step. In winter London's clock is UTC: the vent's hours are 9 to 17, and seasons can change at midnight. */
export function straight(s: StraightState, observed: Observed, now: number): Answer {
  const today = now - (now % DAY_MS);
  const opens = today + 9 * HOUR_MS;
  const closes = today + 17 * HOUR_MS;
  const hours = now >= opens && now < closes;
  let wake = now < opens ? opens : now < closes ? closes : today + DAY_MS;
  for (let point = 0; point < 14; point += 1) {
    const seen = observed.points[IDS[point] ?? ''];
    const last = s.times[point] ?? 0;
    if (seen !== undefined && seen.at > last) {
      const { value, at } = seen;
      const rate = MAX_RATE[point] ?? 0;
      const jump = Math.abs(value - (s.values[point] ?? NaN));
      if (value < (LEAST[point] ?? 0) || value > (MOST[point] ?? 0) || value === 85 || value === -127)
        throw new Error('bad');
      if (rate > 0 && jump > (rate * (at - last)) / 1000 + 1e-9) throw new Error('fast');
      s.values[point] = value;
      s.times[point] = at;
    }
    const silent = (s.times[point] ?? 0) + STALE_MS;
    if (now >= silent) throw new Error('silent');
    if (silent < wake) wake = silent;
  }
  const air = s.values[P.air] ?? NaN;
  const bench1 = s.values[P.bench1] ?? NaN;
  const bench2 = s.values[P.bench2] ?? NaN;
  const core = s.values[P.core] ?? NaN;
  const coldest = Math.min(air, bench1, bench2);
  s.frost = coldest < 3 || (s.frost && coldest < 4);
  s.floor = core < 38 || (s.floor && core < 39);
  if ((s.values[P.amps] ?? 0) <= 0.2 && s.fan.state === 'on') throw new Error('standing');
  s.fan.latch = bench1 < 4 ? true : bench1 > 7.5 ? false : s.fan.latch;
  s.ground.latch = air < 5 ? true : air > 7 ? false : s.ground.latch;
  s.mat.latch = bench2 < 2.5 ? true : bench2 > 3.5 ? false : s.mat.latch;
  s.vent.latch = hours && (air > 22 ? true : air < 18 ? false : s.vent.latch);
  if (s.vent.latch || bench2 > 28) throw new Error('not in this night');

  const base = s.values[P.base] ?? NaN;
  const spentHeap = settle(
    s.heap,
    s.fan.state === 'on',
    1_200_000,
    1_800_000,
    base >= 43 ? 0 : 5_400_000,
    now,
  );
  const used = usedMs(s, now);
  const fan = decide(s.fan, s.heap, now, 120_000, 1_200_000, s.frost, s.floor, used, 28_800_000);
  turn(s.fan, fan.state, fan.claim, now, s.runs);
  if (fan.turned) settle(s.heap, s.fan.state === 'on', 1_200_000, 1_800_000, base >= 43 ? 0 : 5_400_000, now);
  settle(s.tubes, s.ground.state === 'on', 3_600_000, 3_600_000, 0, now);
  const ground = decide(s.ground, s.tubes, now, 180_000, 3_600_000, s.frost, false, 0, Infinity);
  turn(s.ground, ground.state, ground.claim, now, null);
  if (ground.turned) settle(s.tubes, s.ground.state === 'on', 3_600_000, 3_600_000, 0, now);
  const mat = decide(s.mat, null, now, 60_000, 0, s.frost, false, 0, Infinity);
  turn(s.mat, mat.state, mat.claim, now, null);
  s.vent.claim = s.fan.state === 'on' ? 'interlock' : s.frost ? 'frost' : 'idle';

  wake = Math.min(wake, fan.until, ground.until, mat.until);
  wake = Math.min(
    wake,
    storeWake(s.heap, 1_800_000, base >= 43 ? 0 : 5_400_000, now),
    storeWake(s.tubes, 3_600_000, 0, now),
  );
  if (s.fan.state === 'on') {
    const looks = (s.fan.since ?? 0) + 600_000;
    if (now < looks) wake = Math.min(wake, looks);
    else if ((s.values[P.back] ?? 0) - (s.values[P.intake] ?? 0) < 3) throw new Error('no gain');
    wake = Math.min(wake, dayWake(s, now));
  }
  if (Number.isNaN(spentHeap)) throw new Error('no credit');
  return {
    states: [s.fan.state, s.ground.state, s.mat.state, s.vent.state],
    claims: [s.fan.claim, s.ground.claim, s.mat.claim, s.vent.claim],
    wakeAt: wake,
  };
}

function settle(
  store: Store,
  draws: boolean,
  longest: number,
  least: number,
  most: number,
  now: number,
): number {
  let credit = Math.min(1, Math.max(0, store.credit + store.slope * (now - store.at)));
  if (!store.resting && store.slope < 0 && now >= store.at + Math.ceil(store.credit / -store.slope - 1e-6)) {
    store.resting = true;
    store.restSince = null;
    credit = 0;
  }
  if (store.resting) {
    if (draws) store.restSince = null;
    else {
      store.restSince ??= now;
      if (now >= store.restSince + Math.max(least, most)) {
        store.resting = false;
        store.restSince = null;
        credit = 1;
      } else credit = 0;
    }
  }
  const slope = store.resting ? 0 : draws ? -1 / longest : 1 / least;
  if (slope !== store.slope || credit === 0 || credit === 1) {
    store.credit = credit;
    store.at = now;
    store.slope = slope;
  }
  return credit;
}

function storeWake(store: Store, least: number, most: number, now: number): number {
  if (!store.resting)
    return store.slope < 0 ? store.at + Math.ceil(store.credit / -store.slope - 1e-6) : Infinity;
  if (store.restSince === null) return Infinity;
  return now < store.restSince + least ? store.restSince + least : store.restSince + most;
}

interface Decision {
  state: State;
  claim: Claim;
  until: number;
  turned: boolean;
}

function decide(
  load: Load,
  store: Store | null,
  now: number,
  leastMs: number,
  longest: number,
  frost: boolean,
  floor: boolean,
  used: number,
  limit: number,
): Decision {
  const credit = store === null ? 1 : Math.min(1, Math.max(0, store.credit + store.slope * (now - store.at)));
  let state: State = 'off';
  let claim: Claim = 'idle';
  let until = Infinity;
  const starts = load.latch && load.state === 'off';
  if (floor) claim = 'source-guard';
  else if (frost) {
    state = 'on';
    claim = 'frost';
  } else if (store?.resting === true || used >= limit) claim = 'rest';
  else if (starts && store !== null && credit * longest + 1e-6 < leastMs) {
    claim = 'rest';
    if (store.slope > 0)
      until = store.at + Math.ceil((leastMs / longest - store.credit) / store.slope - 1e-6);
  } else if (starts && limit - used < leastMs) claim = 'rest';
  else if (load.latch) {
    state = 'on';
    claim = 'band';
  }
  if (state !== load.state && load.since !== null && now < load.since + leastMs)
    return { state: load.state, claim: 'short-cycle', until: load.since + leastMs, turned: false };
  return { state, claim, until, turned: state !== load.state };
}

function turn(load: Load, state: State, claim: Claim, now: number, runs: [number, number][] | null): void {
  load.claim = claim;
  if (state === load.state) return;
  load.state = state;
  load.since = now;
  if (runs === null) return;
  const last = runs.at(-1);
  if (state === 'on') runs.push([now, Infinity]);
  else if (last !== undefined) last[1] = now;
}

function usedMs(s: StraightState, now: number): number {
  let sum = 0;
  for (const [from, to] of s.runs) sum += Math.max(0, Math.min(to, now) - Math.max(from, now - DAY_MS));
  return sum;
}

function dayWake(s: StraightState, now: number): number {
  const left = 28_800_000 - usedMs(s, now);
  let wake = left > 0 ? now + left : Infinity;
  for (const [from, to] of s.runs) {
    if (from + DAY_MS > now) wake = Math.min(wake, from + DAY_MS);
    if (to + DAY_MS > now) wake = Math.min(wake, to + DAY_MS);
  }
  return wake;
}
