/**
 * Hand: a person's command that has not ended. It ends by its time; on a channel marked to help, a hand off ends when
 * frost begins unless it was told to hold; a hand on of a cooling channel ends when frost begins; a hand on whose
 * point is dead ends 30 min after the death or the command (a heater's at once). A lock-out ends a hand on: a load
 * must not start by an old command when the lock is taken off.
 */
import type { HandReason } from '../because';
import { counts } from '../credit';
import type { HandMemory } from '../memory';
import { entry, wakeAt, type Run } from '../run';
import type { ClaimRung } from './claim';

const HALF_HOUR_MS = 1_800_000;

export const hand: ClaimRung<'hand'> = {
  claim: 'hand',
  speaks: (run, channel) => entry(run.channels, channel).hand?.state ?? null,
  because: (run, channel): HandReason => {
    const { hand: given, pointDeadSince } = entry(run.channels, channel);
    if (given === null) throw new Error('No hand is on this channel.');
    const { state, by, givenAt, holdInFrost } = given;
    const reason = { state, by, givenAt, holdInFrost, until: handUntil(run, channel, given) };
    return state === 'on' && pointDeadSince !== null ? { ...reason, pointDeadSince } : reason;
  },
};

/** When a hand ends as things stand. */
export function handUntil(run: Run, channel: number, given: HandMemory): number {
  const { config } = entry(run.plan.channels, channel);
  const { pointDeadSince } = entry(run.channels, channel);
  let { until } = given;
  if (given.state === 'on' && pointDeadSince !== null) {
    const deadOrGiven = Math.max(pointDeadSince, given.givenAt);
    until = Math.min(until, config.loadKind === 'heater' ? deadOrGiven : deadOrGiven + HALF_HOUR_MS);
  }
  return until;
}

/** Notes since when none of a channel's rules has a usable point, and ends a hand that is over. */
export function settleHand(run: Run, channel: number): void {
  let memory = entry(run.channels, channel);
  // while the worker was away nobody can say that a point was dead
  const dead = run.undriven ? memory.pointDeadSince !== null : isPointDead(run, channel);
  if (dead !== (memory.pointDeadSince !== null)) {
    memory = { ...memory, pointDeadSince: dead ? run.at : null };
    run.channels[channel] = memory;
  }
  if (memory.hand === null) return;
  if (memory.hand.state === 'on' && memory.lockouts.length > 0) return endHand(run, channel, 'lock-out');
  const until = handUntil(run, channel, memory.hand);
  if (run.at >= until) return endHand(run, channel, until < memory.hand.until ? 'point-dead' : 'time');
  const frostBegan = run.frost.on && memory.hand.givenAt < (run.frost.since ?? Infinity);
  const { inFrost } = entry(run.plan.channels, channel);
  if (!frostBegan) return wakeAt(run, until);
  const { state, holdInFrost } = memory.hand;
  const ends = inFrost === 'helps' ? state === 'off' && !holdInFrost : inFrost === 'cools' && state === 'on';
  if (ends) endHand(run, channel, 'frost');
  else wakeAt(run, until);
}

export function endHand(
  run: Run,
  channel: number,
  cause: 'time' | 'point-dead' | 'frost' | 'limit' | 'lock-out' | 'auto',
): void {
  const memory = entry(run.channels, channel);
  if (memory.hand === null) return;
  const { state, by } = memory.hand;
  run.channels[channel] = { ...memory, hand: null };
  run.events.push({ kind: 'hand-ended', at: run.at, channel: memory.id, why: { cause, state, by } });
}

/** It has rules that count, and none of them has a point or stand-in that is not bad. */
function isPointDead(run: Run, channel: number): boolean {
  const { rules } = entry(run.plan.channels, channel);
  return rules.length > 0 && rules.every((rule) => !counts(run, rules, rule) || !hasUsablePoint(run, rule));
}

export function hasUsablePoint(run: Run, rule: number): boolean {
  return entry(run.plan.rules, rule).points.some(
    ({ point }) => point !== null && run.usable[point] !== 'bad',
  );
}
