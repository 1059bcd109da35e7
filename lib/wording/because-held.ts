/** Why a load is held: the claims that stand above the night's own business. */
import type { LockOutPlaced, Reasons } from '@/lib/control/because';
import { duration } from '@/lib/units/time';
import { temperature } from '@/lib/units/format';
import { fallbackReason } from './alone';
import { begin, channelName, pointName, said, sourceName, timeWords, valueOf, type Scene } from './scene';
import { CLAIM_NAMES } from './claims';
import { level, withoutZero } from './settings';

type Reason<Claim extends keyof Reasons> = Partial<Reasons[Claim]>;

export function lockOutWords(reason: Reason<'lock-out'>, scene: Scene): string {
  const lockouts = reason.lockouts ?? [];
  if (lockouts.length === 0) return 'Locked out. Only a person removes it.';
  return said(...lockouts.map((one) => lockOutOf(one, scene)));
}

function lockOutOf({ by, placedAt, why, removedAt, removedBy }: LockOutPlaced, scene: Scene): string {
  const since = timeWords(placedAt, scene);
  const removed = timeWords(removedAt, scene);
  return said(
    `Locked out by ${by}${since === null ? '' : ` since ${since}`}: ${ended(why)}`,
    removed === null
      ? 'Only a person removes it.'
      : `Removed at ${removed}${removedBy === undefined ? '' : ` by ${removedBy}`}.`,
  );
}

/** What somebody wrote, as a sentence of its own. */
const ended = (text: string): string => {
  const plain = text.replace(/\s+/g, ' ').trim();
  return /[.!?…]$/.test(plain) ? plain : `${plain}.`;
};

export function interlockWords(reason: Reason<'interlock'>, scene: Scene): string {
  const other = channelName(reason.other ?? '', scene);
  const until = timeWords(reason.until, scene);
  if (reason.kind === 'holds') return `Kept on because ${other} needs it, till that reports off.`;
  if (reason.kind === 'needs') {
    if (reason.otherState !== 'on') return `Needs ${other} to run first.`;
    return until === null
      ? `Needs ${other}, which has just begun.`
      : `Needs ${other} to have run till ${until}.`;
  }
  if (reason.otherState === 'on') return `Never together with ${other}, which runs.`;
  if (reason.otherState === null)
    return `Never together with ${other}, whose relay has not yet said that it is off.`;
  return until === null ? `Never together with ${other}.` : `Waits till ${until}, after ${other}.`;
}

export function limitWords(reason: Reason<'limit'>, scene: Scene): string {
  const until = timeWords(reason.until, scene);
  switch (reason.cause) {
    case 'high-limit-point-bad':
      return `${begin(pointName(reason.point ?? '', scene))} guards its high limit and cannot be trusted, so it stays off.`;
    case 'longest-on':
      return said(
        `Has run for its longest time, ${duration(reason.longestOnS ?? 0)}.`,
        until !== null && `Off at least till ${until}.`,
        'It must have been wanted off once before it runs again.',
      );
    default:
      return said(
        `${begin(pointName(reason.point ?? '', scene))} is at ${valueOf(reason.point ?? null, reason.value ?? null, scene)}, over the limit of ${withoutZero(valueOf(reason.point ?? null, reason.above ?? 0, scene))}.`,
        reason.againAtOrBelow !== undefined &&
          `Again from ${withoutZero(valueOf(reason.point ?? null, reason.againAtOrBelow, scene))} down.`,
      );
  }
}

export function provingWords(reason: Reason<'proving'>, scene: Scene): string {
  const until = timeWords(reason.until, scene);
  return said(
    `${reason.by ?? 'An installer'} proves it with a run of ${duration(reason.seconds ?? 0)}${until === null ? '' : `, till ${until}`}.`,
  );
}

export function shortCycleWords(reason: Reason<'short-cycle'>, scene: Scene): string {
  const until = timeWords(reason.until, scene);
  const next =
    reason.wantedBy === undefined
      ? ''
      : `; then ${CLAIM_NAMES[reason.wantedBy]} turns it ${reason.wanted ?? 'over'}`;
  return `Kept ${reason.holds ?? 'so'} for at least ${duration(reason.leastS ?? 0)}${until === null ? '' : `, till ${until}`}${next}.`;
}

export function sourceGuardWords(reason: Reason<'source-guard'>, scene: Scene): string {
  const source = sourceName(reason.source ?? '', scene);
  const value = temperature(reason.value ?? null, scene.preferences);
  if (reason.cause === 'not-ready') {
    const until = timeWords(reason.until, scene);
    const asked = `its core must stay above ${level(reason.level ?? 0, scene.preferences)} for ${duration(reason.forS ?? 0)}`;
    return said(
      `${begin(source)} is not ready yet: ${asked}.`,
      typeof reason.aboveSince === 'number'
        ? `It has been since ${timeWords(reason.aboveSince, scene) ?? ''}${until === null ? '' : `, so it is ready ${until} at the earliest`}.`
        : `It is at ${value}.`,
    );
  }
  return said(
    `The core of ${source} is at ${value}, under its floor of ${level(reason.floor ?? 0, scene.preferences)}.`,
    reason.againAtOrAbove !== undefined &&
      `Drawn on again from ${level(reason.againAtOrAbove, scene.preferences)}.`,
  );
}

const FAULTS: Record<string, string> = {
  silent: 'silent',
  'never-spoke': 'never heard',
  'never-heard': 'never heard',
  'no-such-point': 'no longer there',
  'out-of-range': 'out of its range',
  'one-wire-fault': 'its probe answers with a fault',
  'too-fast': 'changing faster than it can',
  frozen: 'frozen at one value',
  unsteady: 'coming and going',
  'input-bad': 'made of a sensor that cannot be trusted',
  'input-uncertain': 'made of a sensor in doubt',
  'window-not-full': 'not read for long enough yet',
  'cannot-be-reckoned': 'not to be reckoned from what its sensors say',
  'worker-was-away': 'not heard again yet',
  contradicted: 'contradicted by its neighbours',
};

/** What is wrong with a point. @example faultWords('silent') === 'silent' */
export function faultWords(why: string | null | undefined): string {
  return why === null || why === undefined ? 'not to be trusted' : (FAULTS[why] ?? 'not to be trusted');
}

export function failSafeWords(reason: Reason<'fail-safe'>, scene: Scene): string {
  const { fallback } = reason;
  if (fallback !== undefined) {
    const on = fallback.state === 'on';
    return fallbackReason(fallback, on, (key) => pointName(key, scene), scene.preferences);
  }
  const safe = reason.safe ?? 'its safe state';
  if (reason.trip !== undefined)
    return `Nobody commanded it for longer than its relay waits, so it fell to ${safe} by itself.`;
  if (reason.stoppedAt !== undefined)
    return `Control did not run from ${timeWords(reason.stoppedAt, scene) ?? ''} on, so it fell to ${safe} by itself.`;
  const points = (reason.points ?? []).map((one) => {
    // the newest reading's time is the beginning of nothing but a silence
    const since = one.why === 'silent' ? timeWords(one.lastAt, scene) : null;
    return `${pointName(one.point, scene)}, ${faultWords(one.why)}${since === null ? '' : ` since ${since}`}`;
  });
  return said(
    `${points.length > 1 ? 'Its sensors are' : 'Its sensor is'} missing${points.length === 0 ? '' : `: ${points.join('; ')}`}.`,
    reason.safe === 'on' && 'Runs, as its wiring makes it when nothing commands it.',
  );
}
