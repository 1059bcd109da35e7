/** Standing conditions that somebody should know of: the whole list at every step, told when one begins or ends. */
import { coldestPoint, CONTRADICTED_MS } from './claims/frost';
import { wakeForDay } from './claims/rest';
import { isUnderFloor } from './claims/source-guard';
import { usedMs } from './day';
import { timeOf, valueOf } from './readings';
import { entry, type Run } from './run';
import { isUnsteady } from './steady';
import type { Fault } from './events';
import type { Data } from './types';

type About = Fault['about'];
type Stand = (kind: Fault['kind'], about: About, data?: () => Data) => void;

const NONE: ReadonlyMap<string, Fault> = new Map();

/** The faults at `run.at`; those that stood before keep their beginning. */
export function faultsNow(run: Run, before: readonly Fault[]): Fault[] {
  const faults: Fault[] = [];
  const stood = before.length === 0 ? NONE : new Map(before.map((one) => [one.key, one]));
  const stand: Stand = (kind, about, data) => {
    const key = [kind, ...Object.values(about)].join(':');
    faults.push(stood.get(key) ?? { key, kind, about, since: run.at, data: data?.() ?? {} });
  };
  houseFaults(run, stand);
  for (let index = 0; index < run.plan.points.length; index += 1) pointFaults(run, index, stand);
  for (let index = 0; index < run.plan.sources.length; index += 1) sourceFaults(run, index, stand);
  for (let index = 0; index < run.plan.channels.length; index += 1) channelFaults(run, index, stand);
  if (faults.length === 0 && before.length === 0) return faults;
  for (const fault of faults) if (stood.get(fault.key) !== fault) tell(run, 'fault-begun', fault);
  const stands = new Set(faults);
  for (const fault of before) if (!stands.has(fault)) tell(run, 'fault-ended', fault);
  return faults;
}

function tell(run: Run, kind: 'fault-begun' | 'fault-ended', fault: Fault): void {
  run.events.push({ kind, at: run.at, fault });
}

function houseFaults(run: Run, stand: Stand): void {
  const { frost, plan } = run;
  if (frost.alarm) {
    stand('frost', {}, () => {
      const coldest = coldestPoint(run);
      return {
        point: coldest === null ? null : entry(plan.points, coldest).key,
        value: coldest === null ? null : valueOf(run, coldest),
        limit: plan.house.frostLimit,
        alarm: plan.house.frostAlarm,
      };
    });
  }
  if (frost.blindSince !== null) stand('frost-without-reading', {}, () => ({ blindSince: frost.blindSince }));
}

function pointFaults(run: Run, index: number, stand: Stand): void {
  const memory = entry(run.points, index);
  const { id, quality, why, contradictedSince } = memory;
  const { derived, key, isHouse } = entry(run.plan.points, index);
  // a derived point is bad by its inputs, which stand in this list themselves
  const tells = why !== 'never-spoke' || run.plan.usedPoints.has(index);
  // one that comes and goes is one fault, however it stands just now
  if (isUnsteady(memory))
    stand('point-unsteady', { point: id }, () => ({
      key,
      why: memory.doubts?.why ?? null,
      lastAt: timeOf(run, index),
    }));
  else if (quality === 'bad' && derived === null && tells)
    stand('point-bad', { point: id }, () => ({ key, why, lastAt: timeOf(run, index) }));
  const { frostLimit } = run.plan.house;
  const inFrost = isHouse && frostLimit !== null && contradictedSince !== null;
  if (inFrost && run.at >= contradictedSince + CONTRADICTED_MS)
    stand('frozen-point-in-frost', { point: id }, () => ({ key, contradictedSince }));
}

function sourceFaults(run: Run, index: number, stand: Stand): void {
  const { id, config, core, slug, dailyLimitMs } = entry(run.plan.sources, index);
  const memory = entry(run.sources, index);
  const value = core === null ? null : valueOf(run, core);
  if (isUnderFloor(run, index))
    stand('core-under-floor', { source: id }, () => ({ source: slug, value, floor: config.coreFloor }));
  const needsCore = config.coreFloor !== null || (config.ready !== null && !memory.ready);
  if (needsCore && (core === null || run.usable[core] !== 'good'))
    stand('core-not-good', { source: id }, () => ({ source: slug, point: config.corePoint }));
  // spent is spent, though the source rests besides
  if (dailyLimitMs !== null && usedMs(memory, run.at) >= dailyLimitMs) {
    wakeForDay(run, index, dailyLimitMs);
    stand('daily-limit', { source: id }, () => ({ source: slug, limitS: dailyLimitMs / 1000 }));
  }
  if (memory.ranToMost) stand('rest-ran-to-most', { source: id }, () => ({ source: slug }));
}

function channelFaults(run: Run, index: number, stand: Stand): void {
  const { key, inFrost } = entry(run.plan.channels, index);
  const memory = entry(run.channels, index);
  const { id, hand, relay } = memory;
  const named = () => ({ key });
  if (run.frost.on && hand !== null) {
    const told = () => ({ key, by: hand.by, until: hand.until });
    if (inFrost === 'helps' && hand.state === 'off') stand('hand-off-in-frost', { channel: id }, told);
    if (inFrost === 'cools' && hand.state === 'on') stand('hand-on-in-frost', { channel: id }, told);
  }
  const lock = run.interlocked[index];
  if (lock?.blocksFrost === true) {
    const other = entry(run.plan.channels, lock.other).key;
    stand('interlock-blocks-frost', { channel: id }, () => ({ key, other }));
  }
  if (memory.overHighLimit) stand('high-limit', { channel: id }, named);
  if (memory.noGainUntil !== null && run.at < memory.noGainUntil) stand('no-gain', { channel: id }, named);
  if (memory.standing) stand('fan-standing', { channel: id }, named);
  if (memory.unbidden === true) stand('runs-though-off', { channel: id }, named);
  // an order given in this very step cannot have been followed yet, and `counted` then goes by what is wanted
  // and while its node's fallback runs it, nobody has told the node yet
  const follows = relay === null || memory.counted !== relay.reported || memory.counted === memory.wanted;
  if (!follows && relay.isAlone !== true)
    stand('relay-does-not-follow', { channel: id }, () => ({ key, wanted: memory.wanted }));
}
