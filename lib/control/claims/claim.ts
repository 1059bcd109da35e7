import type { Reasons } from '../because';
import type { Run } from '../run';
import type { Claim, State } from '../types';

/** One rung of the ladder: whether it speaks for a channel at `run.at`, what it wants, and why. */
export interface ClaimRung<C extends Claim> {
  claim: C;
  /** null: it does not speak. */
  speaks: (run: Run, channel: number) => State | null;
  /** Only to be asked where it speaks. */
  because: (run: Run, channel: number) => Reasons[C];
}
