import 'server-only';
import type { Holding } from '@/db/client';
import { decisionsAround, type Around } from '@/db/queries/decision';
import { ruleNames } from '@/db/queries/rule-names';
import { readMemory } from '@/db/queries/running';
import type { Explanation, LadderStep } from '@/lib/control/events';
import type { State } from '@/lib/control/types';
import type { Why } from '@/lib/schema/running';
import type { Channel, House } from '@/lib/schema/yard-view';
import { controlGaps } from './control-gaps';
import { explainNow } from './explain-now';
import { downTo, withRemovals } from './why-ladder';
import { isoIn, isoOrNull, wireData, wireLadder } from './wire';

/** A load whose commands stop runs on for a relay's lease at most. */
const LEASE_MS = 30_000;

/** What a channel stood under, as it was stored. */
interface Stood {
  at: number;
  state: State;
  claim: string;
  explanation: Explanation | null;
  ruleId: string | null;
  version: number | null;
}

/**
 * Why a channel was on or off at a time, from what was stored then: its newest switching, or, where the claim changed since
 * without a switching, the newest decision. Never reckoned anew with today's rules.
 * @param now app time, and real time in epoch ms: until when what is not over can last
 * @returns null where nothing is known of that time
 */
export async function whyThen(
  holding: Holding,
  house: House,
  channel: Channel,
  at: number,
  now: { app: number; real: number },
): Promise<Why | null> {
  const around = await decisionsAround(holding, channel.id, at);
  const stored = stoodUnder(around);
  if (stored === null) return null;
  const ended = endedBy(around);
  const gaps = await controlGaps(holding.db, stored.at, ended?.at ?? now.app, now.real);
  const gap = gaps.find((one) => one.from + LEASE_MS <= at && (one.to === null || at < one.to));
  const stood = gap !== undefined && stored.at < gap.from ? dropped(channel, stored, gap.from) : stored;
  const { explanation } = stood;
  const ladder = explanation?.ladder ?? downTo(stood.claim, stood.state);
  return {
    ...{ at: isoIn(house.zone, at), channel: channel.number, state: stood.state, claim: stood.claim },
    until: isoOrNull(house.zone, explanation?.until ?? null),
    ladder: wireLadder(house.zone, await withRemovals(holding, house.id, ladder)),
    next: (explanation?.next ?? []).map((one) => wireData(house.zone, one)),
    version: stood.version,
    under: wireLadder(house.zone, explanation?.under ?? []),
    foreseenAt: explanation === null ? null : isoIn(house.zone, stood.at),
    since: isoIn(house.zone, stood.at),
    ended: ended === null ? null : { ...ended, at: isoIn(house.zone, ended.at) },
    ...switchingsBeside(house, around),
    rule: stood.ruleId === null ? null : await ruleNames(holding, stood.ruleId),
    gaps: gaps.map(({ from, to }) => ({ from: isoIn(house.zone, from), to: isoOrNull(house.zone, to) })),
  };
}

/**
 * Why it is so now. The worker's last step says what holds; the core is asked for the whole ladder and what would follow,
 * and believed as far as it comes to the same decision from what is stored.
 */
export async function whyNow(
  holding: Holding,
  house: House,
  channel: Channel,
  now: { app: number; real: number },
): Promise<Why> {
  const kept = await readMemory(holding, house.id);
  const state = kept?.state?.channels.find((one) => one.key === channel.key);
  const then = await whyThen(holding, house, channel, now.app, now);
  const stored = then ?? unstepped(house, channel, now.app);
  if (kept === null || state === undefined) return stored;
  const explained = await explainNow(holding, house.id, channel.id, kept, now.app);
  const isSame = explained?.claim === state.claim && explained.state === state.state;
  const told = isSame
    ? {
        ladder: wireLadder(house.zone, explained.ladder),
        under: wireLadder(house.zone, explained.under ?? []),
        next: explained.next.map((one) => wireData(house.zone, one)),
        version: explained.rule?.version ?? null,
        rule: explained.rule === null ? null : await ruleNames(holding, explained.rule.id),
      }
    : { ladder: downTo(state.claim, state.state), under: [], next: [] };
  const at = kept.state?.at ?? isoIn(house.zone, now.app);
  return {
    ...stored,
    ...{ at, state: state.state, claim: state.claim, until: state.until, ...told },
    foreseenAt: isSame ? at : null,
    // a decision that is still on its way into the database has no beginning there yet
    since: stored.claim === state.claim && stored.state === state.state ? stored.since : null,
    ended: null,
    ladder: told.ladder.map((step) =>
      step.claim === state.claim ? { ...step, because: state.because } : step,
    ),
  };
}

/** Control has not looked at this channel yet: it stands as its wiring lets it stand, coil off. */
function unstepped(house: House, channel: Channel, now: number): Why {
  const state = safeState(channel);
  return {
    ...{ at: isoIn(house.zone, now), channel: channel.number, state, claim: 'fail-safe', until: null },
    ...{ ladder: downTo('fail-safe', state), next: [], version: null, under: [], foreseenAt: null },
    ...{ since: null, ended: null, earlier: null, later: null, rule: null, gaps: [] },
  };
}

const safeState = ({ contact }: Channel): State => (contact === 'NC' ? 'on' : 'off');

function stoodUnder({ switching, decision }: Around): Stood | null {
  if (decision !== null && (switching === null || decision.at > switching.at)) {
    const { at, state, claim, explanation } = decision;
    const of = explanation === null ? ruleAt(switching) : ruleIn(explanation);
    return { at, state, claim, explanation, ...of };
  }
  if (switching === null) return null;
  const { at, to, claim, explanation } = switching;
  return { at, state: to, claim, explanation, ...ruleAt(switching) };
}

const ruleIn = ({ rule }: Explanation) => ({ ruleId: rule?.id ?? null, version: rule?.version ?? null });

const ruleAt = (switching: Around['switching']) => ({
  ruleId: switching?.ruleId ?? null,
  version: switching?.version ?? null,
});

/** The first switching or decision after it; a switching of the same instant says more. */
function endedBy({
  nextSwitching,
  nextDecision,
}: Around): { at: number; state: State; claim: string } | null {
  if (nextSwitching !== null && nextSwitching.at <= (nextDecision?.at ?? Infinity))
    return { at: nextSwitching.at, state: nextSwitching.to, claim: nextSwitching.claim };
  if (nextDecision === null) return null;
  return { at: nextDecision.at, state: nextDecision.state, claim: nextDecision.claim };
}

/** Nobody commanded: the load fell with its lease, though nobody was there to write that down. */
function dropped(channel: Channel, stored: Stood, stoppedAt: number): Stood {
  const state = safeState(channel);
  const at = stoppedAt + LEASE_MS;
  const because = { safe: state, points: [], stoppedAt };
  const ladder: LadderStep[] = [{ claim: 'fail-safe', speaks: true, wants: state, because }];
  const head = { channel: channel.id, at, state, claim: 'fail-safe' as const, until: null };
  return {
    ...stored,
    at,
    state,
    claim: 'fail-safe',
    explanation: { ...head, ladder, next: [], rule: null },
  };
}

function switchingsBeside(house: House, { switchedBefore, nextSwitching }: Around) {
  return {
    earlier: isoOrNull(house.zone, switchedBefore),
    later: isoOrNull(house.zone, nextSwitching?.at ?? null),
  };
}
