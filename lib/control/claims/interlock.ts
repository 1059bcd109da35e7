/**
 * Interlock: `never-with` keeps a channel off while another is on; `needs` keeps it off until another has been
 * reported on for the delay, and holds that other on until this one is reported off. Worked out for all channels at
 * once, from what each asks for (its demand), before the ladder is asked.
 */
import type { InterlockReason } from '../because';
import type { InterlockVerdict, PlanInterlock } from '../interlocks';
import type { PlanPart } from '../plan';
import { entry, wakeAt, type Run } from '../run';
import { CLAIMS } from '../types';
import type { ClaimRung } from './claim';
import { shortCycle } from './short-cycle';

export const interlock: ClaimRung<'interlock'> = {
  claim: 'interlock',
  speaks: (run, channel) => run.interlocked[channel]?.wants ?? null,
  because: (run, channel): InterlockReason => {
    const verdict = entry(run.interlocked, channel);
    if (verdict === null) throw new Error('This interlock does not speak.');
    return {
      kind: verdict.kind,
      other: entry(run.plan.channels, verdict.other).key,
      otherState: entry(run.channels, verdict.other).known,
      delayS: verdict.delayMs / 1000,
      until: verdict.until,
    };
  },
};

/** Works out `run.interlocked` of a part of the house from its demands. */
export function settleInterlocks(run: Run, { order, needsOrder, hasInterlocks }: PlanPart): void {
  for (const channel of order) run.interlocked[channel] = null;
  if (!hasInterlocks) return;
  for (const channel of needsOrder) run.interlocked[channel] = needs(run, channel);
  neverWith(run, order);
  for (let place = needsOrder.length - 1; place >= 0; place -= 1) {
    const channel = entry(needsOrder, place);
    const verdict = entry(run.interlocked, channel);
    if (verdict === null) run.interlocked[channel] = holds(run, channel);
    else if (verdict.kind === 'needs') run.interlocked[channel] = lastInChain(run, channel) ?? verdict;
  }
}

/** Off while a needed channel is not yet on for the delay, or is itself to go off now: not while its least on holds it. */
function needs(run: Run, channel: number): InterlockVerdict | null {
  for (const lock of entry(run.plan.channels, channel).needs) {
    const other = entry(run.channels, lock.other);
    const leaves =
      (run.demandState[lock.other] === 'off' && !isHeldOn(run, lock.other)) ||
      run.interlocked[lock.other]?.wants === 'off';
    if (leaves || other.known !== 'on') return verdict(run, lock, channel, null);
    const readyAt = other.knownSince === null ? run.at : other.knownSince + lock.delayMs;
    if (run.at >= readyAt) continue;
    wakeAt(run, readyAt);
    return verdict(run, lock, channel, readyAt);
  }
  return null;
}

/**
 * Among channels that want on, the higher claim keeps, least times counting for nothing; among equals the one that
 * runs, else the lower number. The one that keeps starts once the other has been off for the delay; frost may start
 * at once where the interlock allows it.
 */
function neverWith(run: Run, order: readonly number[]): void {
  const wanting = order.filter(
    (channel) =>
      run.demandState[channel] === 'on' &&
      run.interlocked[channel] === null &&
      partners(run, channel).length > 0,
  );
  const rank = (channel: number) => CLAIMS.indexOf(entry(run.demandClaim, channel));
  const runs = (channel: number) => (entry(run.channels, channel).counted === 'on' ? 0 : 1);
  wanting.sort((a, b) => rank(a) - rank(b) || runs(a) - runs(b) || order.indexOf(a) - order.indexOf(b));
  const keeps = new Set<number>();
  for (const channel of wanting) {
    const beaten = partners(run, channel).find(({ other }) => keeps.has(other));
    if (beaten !== undefined) run.interlocked[channel] = verdict(run, beaten.lock, channel, null);
    else {
      keeps.add(channel);
      run.interlocked[channel] = waits(run, channel);
    }
  }
  for (const channel of order) {
    if (keeps.has(channel) || run.interlocked[channel] !== null) continue;
    // one that only its least on keeps running gives way to one that wants to, and does so till that one runs
    const { claim, wanted: own } = entry(run.channels, channel);
    const givesWay = isHeldOn(run, channel) || (own === 'off' && claim === 'interlock');
    const on = partners(run, channel).find(({ other }) => {
      if (givesWay && keeps.has(other)) return true;
      const { wanted, known } = entry(run.channels, other);
      return known === 'on' || (wanted === 'on' && run.demandState[other] === 'on');
    });
    if (on !== undefined) run.interlocked[channel] = verdict(run, on.lock, channel, null);
  }
}

/** Whether a channel that keeps must still wait for the others' relays. */
function waits(run: Run, channel: number): InterlockVerdict | null {
  const running = entry(run.channels, channel).wanted === 'on';
  for (const { lock, other } of partners(run, channel)) {
    if (lock.frostMayBreak && run.demandClaim[channel] === 'frost') continue;
    const { known, knownSince } = entry(run.channels, other);
    if (known === 'on') return verdict(run, lock, channel, null);
    if (running) continue;
    if (known === null) return verdict(run, lock, channel, null);
    const freeAt = knownSince === null ? run.at : knownSince + lock.delayMs;
    if (run.at >= freeAt) continue;
    wakeAt(run, freeAt);
    return verdict(run, lock, channel, freeAt);
  }
  return null;
}

/** On: a channel that is to go off waits for those that need it; lock-out, limit and never-with do not wait. */
function holds(run: Run, channel: number): InterlockVerdict | null {
  if (run.demandState[channel] !== 'off' || isCutShort(run, channel)) return null;
  return waitsForDependants(run, channel);
}

/** In a chain too: one that goes because what it needs is to go waits for its own dependants, if that one still waits. */
function lastInChain(run: Run, channel: number): InterlockVerdict | null {
  const stillOn = ({ other }: { other: number }) => entry(run.channels, other).known === 'on';
  if (partners(run, channel).some(stillOn)) return null;
  const { needs: needed } = entry(run.plan.channels, channel);
  if (!needed.every((lock) => stillOn(lock) && !isCutShort(run, lock.other))) return null;
  return waitsForDependants(run, channel);
}

/** Goes off at once, whoever needs it. */
const isCutShort = (run: Run, channel: number): boolean =>
  run.demandClaim[channel] === 'lock-out' ||
  run.demandClaim[channel] === 'limit' ||
  run.interlocked[channel]?.kind === 'never-with';

function waitsForDependants(run: Run, channel: number): InterlockVerdict | null {
  if (entry(run.channels, channel).wanted !== 'on') return null;
  for (const lock of entry(run.plan.channels, channel).neededBy) {
    if (entry(run.channels, lock.channel).known === 'off') continue;
    const { delayMs } = lock;
    return { wants: 'on', kind: 'holds', other: lock.channel, delayMs, until: null, blocksFrost: false };
  }
  return null;
}

/** Nothing but the least on time keeps it running. */
const isHeldOn = (run: Run, channel: number): boolean =>
  run.demandClaim[channel] === run.lowerClaim[channel] && shortCycle.speaks(run, channel) === 'on';

const partners = (run: Run, channel: number): { lock: PlanInterlock; other: number }[] =>
  entry(run.plan.channels, channel).neverWith;

function verdict(run: Run, lock: PlanInterlock, channel: number, until: number | null): InterlockVerdict {
  const other = lock.channel === channel ? lock.other : lock.channel;
  const blocksFrost = run.demandClaim[channel] === 'frost' && run.demandState[channel] === 'on';
  return { wants: 'off', kind: lock.kind, other, delayMs: lock.delayMs, until, blocksFrost };
}
