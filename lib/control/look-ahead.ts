/** What comes next for a channel: by the clock alone, and sooner if a reading passes a threshold. */
import type { NextReason } from './because';
import { entry, type Run } from './run';
import type { Memory } from './memory';
import type { Plan } from './plan';
import { play } from './play';
import type { Data, Explanation, Observed } from './types';

const AHEAD_MS = 24 * 3_600_000;
const WAKES = 60;

/** Adds what follows to an explanation of the instant at which `run` stands. */
export function addLookAhead(run: Run, memory: Memory, explanation: Explanation): Explanation {
  const channel = memory.channels.findIndex((one) => one.id === explanation.channel);
  if (channel < 0) return explanation;
  const reasons = [byTheClock(run.plan, memory, channel), ...byReadings(run, channel, explanation)];
  // reasons are plain JSON by their types; an interface only lacks the index that Data asks for
  const next = reasons.filter((one) => one !== null).map((one) => one as unknown as Data);
  return { ...explanation, next };
}

/** The first change of state or claim within a day if no reading changes. */
function byTheClock(plan: Plan, from: Memory, channel: number): NextReason | null {
  const at = from.at ?? 0;
  const { wanted, claim } = entry(from.channels, channel);
  // nobody will report or be unplugged in this future
  let memory: Memory = { ...from, channels: from.channels.map((one) => ({ ...one, relay: null })) };
  const observed: Observed = { workerStartedAt: 0, points: {}, relays: {}, commands: [] };
  for (let look = 0; look < WAKES && memory.wakeAt !== null && memory.wakeAt <= at + AHEAD_MS; look += 1) {
    const played = play(plan, memory, observed, memory.wakeAt, { explains: false, readingsHold: true });
    memory = played.memory;
    const then = entry(memory.channels, channel);
    if (then.wanted !== wanted || then.claim !== claim)
      return { kind: 'then', at: memory.at ?? at, state: then.wanted, claim: then.claim ?? 'idle' };
  }
  return null;
}

/** Thresholds that would change what was decided. */
function byReadings(run: Run, channel: number, { claim }: Explanation): NextReason[] {
  const { inFrost, frostMayBreakRest, rules } = entry(run.plan.channels, channel);
  const reasons: NextReason[] = [];
  const { frostLimit } = run.plan.house;
  const yieldsToFrost =
    ['fail-safe', 'band', 'idle'].includes(claim) || (claim === 'rest' && frostMayBreakRest);
  if (frostLimit !== null && inFrost !== null && yieldsToFrost && claim !== 'band') {
    const state = inFrost === 'helps' ? 'on' : 'off';
    reasons.push({ kind: 'if', point: null, side: 'below', value: frostLimit, state, claim: 'frost' });
  }
  for (const rule of rules) {
    const { warm, points } = entry(run.plan.rules, rule);
    const { low, high } = entry(run.calendars, rule);
    const { key, offset } = entry(points, entry(run.rules, rule).using);
    const standing = run.standing[rule];
    if (claim === 'idle' && standing === 'satisfied') {
      const side = warm ? 'below' : 'above';
      reasons.push({
        kind: 'if',
        point: key,
        side,
        value: (warm ? low : high) - offset,
        state: 'on',
        claim: 'band',
      });
    }
    if (claim === 'band' && standing === 'wants') {
      const side = warm ? 'above' : 'below';
      reasons.push({
        kind: 'if',
        point: key,
        side,
        value: (warm ? high : low) - offset,
        state: 'off',
        claim: 'idle',
      });
    }
  }
  return reasons;
}
