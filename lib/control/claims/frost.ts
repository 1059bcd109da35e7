/**
 * Frost: the lowest house-air or bench reading that is not bad is under the house's frost limit (it ends 1 K above).
 * On for channels marked to help, off for cooling ones. Ignores season, hours and conditions; breaks rest and daily
 * limit where the rules allow it, never the core floor, which is asked before it.
 */
import type { FrostReason } from '../because';
import { isOver, isUnder } from '../lines';
import { valueOf } from '../readings';
import { entry, wakeAt, type Run } from '../run';
import type { ClaimRung } from './claim';
import { rest, restForbids } from './rest';

export const ENDS_K = 1;
const BLIND_MS = 1_800_000;
/** Wet things freezing stand still at 0 °C, so a frozen point is believed in the cold … */
const STILL_TRUE_C = 2;
/** … but not for ever against another point of the house. */
export const CONTRADICTED_MS = 12 * 3_600_000;

export const frost: ClaimRung<'frost'> = {
  claim: 'frost',
  speaks: (run, channel) => {
    if (!run.frost.on) return null;
    const { inFrost, config, frostMayBreakRest } = entry(run.plan.channels, channel);
    if (inFrost === null) return null;
    if (inFrost === 'cools') return 'off';
    if (config.loadKind === 'heater' && run.frost.blindSince !== null) return null;
    if (!frostMayBreakRest && rest.speaks(run, channel) !== null) return null;
    return 'on';
  },
  because: (run, channel): FrostReason => {
    const limit = run.plan.house.frostLimit ?? 0;
    const coldest = coldestPoint(run);
    const { inFrost } = entry(run.plan.channels, channel);
    const forbidden = restForbids(run, channel);
    const borrows = forbidden === 'credit-spent' ? 'rest' : forbidden;
    const reason = {
      point: coldest === null ? null : entry(run.plan.points, coldest).key,
      value: coldest === null ? null : valueOf(run, coldest),
      limit,
      endsAtOrAbove: limit + ENDS_K,
      frostSince: run.frost.since ?? run.at,
      part: inFrost ?? 'helps',
      borrows: inFrost === 'helps' ? borrows : null,
    } as const;
    const { blindSince } = run.frost;
    return blindSince === null ? reason : { ...reason, until: blindSince + BLIND_MS };
  },
};

/** The coldest of the house's air and bench points that is not bad; null: there is none. */
export function coldestPoint(run: Run): number | null {
  let coldest: number | null = null;
  let lowest = Infinity;
  for (const index of run.plan.housePoints) {
    const value = valueOf(run, index);
    if (value === null || value >= lowest || !isBelieved(run, index)) continue;
    lowest = value;
    coldest = index;
  }
  return coldest;
}

/** Not bad, or bad only for standing still in the cold, or for having come and gone: it speaks again just now. */
function isBelieved(run: Run, index: number): boolean {
  const { hasValue, why, contradictedSince } = entry(run.points, index);
  if (!hasValue) return false;
  if (!isFrozenCold(run, index)) return run.usable[index] !== 'bad' || why === 'unsteady';
  return contradictedSince === null || run.at < contradictedSince + CONTRADICTED_MS;
}

const isFrozenCold = (run: Run, index: number): boolean => {
  const { hasValue, why } = entry(run.points, index);
  return why === 'frozen' && hasValue && !isOver(run, index, STILL_TRUE_C);
};

/** Whether the coldest point is under a limit, without saying which one it is: another that is colder changes nothing. */
function anyUnder(run: Run, limit: number): boolean {
  let any = false;
  for (const index of run.plan.housePoints)
    if (isBelieved(run, index) && isUnder(run, index, limit)) any = true;
  return any;
}

/** Settles the house's frost and the frost alarm. */
export function settleFrost(run: Run): void {
  const { frostLimit, frostAlarm } = run.plan.house;
  const warnsAt = frostAlarm ?? frostLimit;
  const before = run.frost;
  if (warnsAt === null) {
    if (before.on || before.alarm) run.frost = { on: false, since: null, blindSince: null, alarm: false };
    return;
  }
  if (frostLimit !== null) settleContradiction(run, frostLimit);
  let { alarm, blindSince } = before;
  // without a limit there is no frost, blind or not
  let on = before.on && frostLimit !== null;
  if (run.plan.housePoints.some((index) => isBelieved(run, index))) {
    blindSince = null;
    on = frostLimit !== null && anyUnder(run, on ? frostLimit + ENDS_K : frostLimit);
    alarm = anyUnder(run, alarm ? warnsAt + ENDS_K : warnsAt);
  } else if (on) {
    blindSince ??= run.at;
    if (run.at >= blindSince + BLIND_MS) {
      on = false;
      blindSince = null;
    } else wakeAt(run, blindSince + BLIND_MS);
  } else blindSince = null;
  if (on === before.on && alarm === before.alarm && blindSince === before.blindSince) return;
  run.frost = { on, alarm, blindSince, since: on ? (before.since ?? run.at) : null };
}

/** Since when a frozen cold point has been contradicted by a good one well over the limit. */
function settleContradiction(run: Run, limit: number): void {
  for (const index of run.plan.housePoints) {
    const memory = entry(run.points, index);
    let { contradictedSince } = memory;
    if (!isFrozenCold(run, index)) contradictedSince = null;
    else {
      const other = run.plan.housePoints.some(
        // the frozen one itself is not good
        (one) => run.usable[one] === 'good' && !isUnder(run, one, limit + ENDS_K),
      );
      contradictedSince = other ? (contradictedSince ?? run.at) : null;
      if (contradictedSince !== null) wakeAt(run, contradictedSince + CONTRADICTED_MS);
    }
    if (contradictedSince !== memory.contradictedSince) run.points[index] = { ...memory, contradictedSince };
  }
}
