/** Idle: nothing else. Off, with how each rule stands. */
import type { IdleReason } from '../because';
import { entry } from '../run';
import { ruleStanding } from './band';
import type { ClaimRung } from './claim';

export const idle: ClaimRung<'idle'> = {
  claim: 'idle',
  speaks: () => 'off',
  because: (run, channel): IdleReason => ({
    rules: entry(run.plan.channels, channel).rules.map((rule) => ruleStanding(run, rule)),
  }),
};
