/** What a new rule's draft says at first: a careful beginning for its kind of load, to be changed in the editor. */
import type { RuleBodyInput } from '@/lib/schema/rule';
import type { Channel, Source } from '@/lib/schema/yard-view';

/**
 * A vent cools, everything else warms. A heap or ground is rationed from the first draft on, since a rule that was
 * written in a hurry must not wear it out: 40 min of draw, 30 min of rest.
 */
export function firstBody(channel: Channel, source: Source | undefined, point: string): RuleBodyInput {
  const cools = channel.load.kind === 'vent';
  const isStore = source !== undefined && (source.kind === 'heap' || source.kind === 'ground');
  return {
    purpose: cools ? 'cool' : 'warm',
    point,
    band: [cools ? { from: '00:00', low: 18, high: 22 } : { from: '00:00', low: 4, high: 7 }],
    ...(isStore && !cools
      ? { rest: { longestDraw: 2400, least: Math.max(1800, channel.minOff), frostMayBreak: true } }
      : {}),
  };
}
