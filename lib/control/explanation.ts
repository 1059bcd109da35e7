/** Why a channel is as it is, at an instant that is settled. */
import { becauseOf, ladderOf, ladderUnder } from './ladder';
import { entry, told, type Run } from './run';
import type { Explanation } from './events';

/** The ladder of a channel at `run.at`; `next` is left to whoever can look ahead. */
export function explainSettled(run: Run, channel: number): Explanation {
  return told(run, () => explanationOf(run, channel));
}

function explanationOf(run: Run, channel: number): Explanation {
  const { id, wanted, claim } = entry(run.channels, channel);
  const decided = claim ?? 'idle';
  const because = becauseOf(run, channel, decided);
  const rule = ruleOf(run, channel);
  return {
    channel: id,
    at: run.at,
    state: wanted,
    claim: decided,
    until: typeof because.until === 'number' ? because.until : null,
    ladder: ladderOf(run, channel, decided),
    under: ladderUnder(run, channel, decided),
    next: [],
    rule,
  };
}

/** The rule that wants the channel on, else its first: whose version a switching is kept with. */
function ruleOf(run: Run, channel: number): Explanation['rule'] {
  const { rules } = entry(run.plan.channels, channel);
  const index = rules.find((one) => run.standing[one] === 'wants') ?? rules[0];
  if (index === undefined) return null;
  const { id, config } = entry(run.plan.rules, index);
  return { id, version: config.version };
}
