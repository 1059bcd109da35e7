/** Lock-out: somebody isolated the channel for work. Coil off at once, always; only a person removes it. */
import { entry } from '../run';
import type { ClaimRung } from './claim';

export const lockOut: ClaimRung<'lock-out'> = {
  claim: 'lock-out',
  // one on an NC contact is refused when it is given: coil off would run that load
  speaks: (run, channel) => (entry(run.channels, channel).lockouts.length > 0 ? 'off' : null),
  because: (run, channel) => ({ lockouts: entry(run.channels, channel).lockouts }),
};
