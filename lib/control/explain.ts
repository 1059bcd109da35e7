/** Why a channel is as it is now, on request. */
import { explainSettled } from './explanation';
import { addLookAhead } from './look-ahead';
import type { Memory } from './memory';
import type { Plan } from './plan';
import { play } from './play';
import type { Explanation } from './events';
import type { Observed } from './types';

/**
 * The ladder of a channel (by id) at `now`, and what comes next. Asks without moving anything: the memory given is
 * the one to go on with. Null for a channel that the plan does not have.
 */
export function explain(
  plan: Plan,
  memory: Memory,
  observed: Observed,
  now: number,
  channelId: string,
): Explanation | null {
  const channel = plan.channels.findIndex((one) => one.id === channelId);
  if (channel < 0) return null;
  const played = play(plan, memory, observed, now, { explains: false });
  return addLookAhead(played.run, played.memory, explainSettled(played.run, channel));
}
