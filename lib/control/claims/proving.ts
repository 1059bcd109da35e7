/**
 * Proving: an installer's timed pulse or gain run. On. It begins no least on time; its end begins least off, or
 * least on where the claims under it want the load on. A lock-out ends it for good.
 */
import type { ProvingReason } from '../because';
import { entry, wakeAt, type Run } from '../run';
import type { ClaimRung } from './claim';

export const proving: ClaimRung<'proving'> = {
  claim: 'proving',
  speaks: (run, channel) => (entry(run.channels, channel).prove === null ? null : 'on'),
  because: (run, channel): ProvingReason => {
    const { prove } = entry(run.channels, channel);
    if (prove === null) throw new Error('Nothing is being proved here.');
    return prove;
  },
};

/** Ends a run whose time is over. Asks what the claims under it want. */
export function settleProving(run: Run, channel: number): void {
  const memory = entry(run.channels, channel);
  if (memory.prove === null) return;
  if (memory.lockouts.length > 0) run.channels[channel] = { ...memory, prove: null };
  else if (run.at < memory.prove.until) wakeAt(run, memory.prove.until);
  else {
    const goesOn = run.lowerState[channel] === 'on' && memory.counted === 'on';
    run.channels[channel] = { ...memory, prove: null, leastSince: goesOn ? run.at : memory.leastSince };
  }
}
