/**
 * Short-cycle: the claims under it want the other state, and the least on or off time of the present one has not
 * passed. Holds. A hand off breaks least on: a person who says stop is obeyed.
 */
import type { ShortCycleReason } from '../because';
import { entry, wakeAt, type Run } from '../run';
import type { ClaimRung } from './claim';

export const shortCycle: ClaimRung<'short-cycle'> = {
  claim: 'short-cycle',
  speaks: (run, channel) => {
    const memory = entry(run.channels, channel);
    const lower = run.lowerState[channel];
    // a load that does not follow its order cannot be held in a state that it is not in
    if (lower === memory.wanted || memory.counted !== memory.wanted) return null;
    if (lower === 'off' && run.lowerClaim[channel] === 'hand') return null;
    const until = leastUntil(run, channel);
    if (until === null || run.at >= until) return null;
    wakeAt(run, until);
    return memory.wanted;
  },
  because: (run, channel): ShortCycleReason => {
    const memory = entry(run.channels, channel);
    const { minOnMs, minOffMs } = entry(run.plan.channels, channel);
    return {
      holds: memory.wanted,
      holdsSince: memory.leastSince ?? run.at,
      leastS: (memory.wanted === 'on' ? minOnMs : minOffMs) / 1000,
      until: leastUntil(run, channel) ?? run.at,
      wanted: entry(run.lowerState, channel),
      wantedBy: entry(run.lowerClaim, channel),
    };
  },
};

/** When the least time of the present state has passed; null: it began before anybody remembers, or begins none. */
export function leastUntil(run: Run, channel: number): number | null {
  const { leastSince, wanted } = entry(run.channels, channel);
  const { minOnMs, minOffMs } = entry(run.plan.channels, channel);
  return leastSince === null ? null : leastSince + (wanted === 'on' ? minOnMs : minOffMs);
}
