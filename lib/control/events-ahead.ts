/** What somebody's deed, or another load's report, would bring for a channel that waits for it. */
import type { NextWhen } from './next';
import type { ChannelMemory, Memory } from './memory';
import { entry, type Run } from './run';
import type { Claim, State } from './types';
import { changesBy, ifInstead, type Future, type Told } from './what-if';

/** @param run as it is; `base`, in which nobody reports, may be ahead of it */
export function eventsAhead(
  run: Run,
  base: Future,
  told: { state: State; claim: Claim },
  until: number,
): NextWhen[] {
  const { plan, memory, channel } = base;
  switch (told.claim) {
    case 'lock-out':
      return brings(base, told, until, { what: 'unlocked' }, withChannel(memory, channel, { lockouts: [] }));
    case 'hand':
      return brings(base, told, until, { what: 'given-back' }, withChannel(memory, channel, { hand: null }));
    case 'interlock':
      return partnerAhead(run, base, told, until);
    case 'source-guard': {
      const place = entry(plan.channels, channel).source;
      if (place === null || entry(memory.sources, place).ready) return [];
      const sources = memory.sources.map((one, at) => (at === place ? { ...one, ready: true } : one));
      const { slug } = entry(plan.sources, place);
      return brings(base, told, until, { what: 'ready', source: slug }, { sources });
    }
    case 'fail-safe':
    case 'limit':
      return answersAhead(base, told);
    default:
      return [];
  }
}

function withChannel(memory: Memory, channel: number, change: Partial<ChannelMemory>): Partial<Memory> {
  return { channels: memory.channels.map((one, at) => (at === channel ? { ...one, ...change } : one)) };
}

function brings(
  base: Future,
  told: { state: State; claim: Claim },
  until: number,
  event: Pick<NextWhen, 'what' | 'other' | 'source'>,
  change: Partial<Memory>,
): NextWhen[] {
  const future = ifInstead(base, { memory: change });
  const isNews = future.claim !== told.claim || future.state !== told.state;
  const after: Told | null = isNews ? future : changesBy(future, until).change;
  if (after === null) return [];
  const at = after.at > base.at ? { at: after.at } : {};
  return [{ kind: 'when', ...event, ...at, state: after.state, claim: after.claim }];
}

/** The other load goes off, or, where it is needed, on: as if by a person, whatever else it is to do. */
function partnerAhead(
  run: Run,
  base: Future,
  told: { state: State; claim: Claim },
  until: number,
): NextWhen[] {
  const verdict = run.interlocked[base.channel] ?? null;
  if (verdict === null) return [];
  const other = entry(base.plan.channels, verdict.other);
  const event = { what: verdict.kind === 'needs' ? 'other-on' : 'other-off', other: other.key } as const;
  const hand = {
    state: 'on',
    by: '',
    number: 0,
    givenAt: base.at,
    until: Infinity,
    holdInFrost: false,
  } as const;
  const lockouts = [{ id: '', why: '', by: '', placedAt: base.at }];
  const change = verdict.kind === 'needs' ? { hand } : { lockouts };
  return brings(base, told, until, event, withChannel(base.memory, verdict.other, change));
}

/** A missing point that answers again: what then runs hangs on what it reads, so only that it is asked again is told. */
function answersAhead(base: Future, told: { claim: Claim }): NextWhen[] {
  const { plan, run, memory, channel } = base;
  const { rules, highLimitPoint } = entry(plan.channels, channel);
  const places =
    told.claim === 'limit'
      ? [highLimitPoint]
      : rules
          .filter((rule) => run.calendars[rule]?.inSeason === true)
          .map((rule) => entry(entry(plan.rules, rule).points, 0).point);
  return [...new Set(places)].flatMap((point) => {
    if (point === null || run.usable[point] === 'good') return [];
    const points = memory.points.map((one, at) =>
      at === point ? { ...one, hasValue: true, dropped: null, why: null, uncertainSince: null } : one,
    );
    if (ifInstead(base, { memory: { points } }).claim === told.claim) return [];
    return [{ kind: 'when', what: 'answers', point: entry(plan.points, point).key } as const];
  });
}
