import 'server-only';
import type { z } from 'zod';
import type { Holding } from '@/db/client';
import { readMemory, listDecisions, switchingAt } from '@/db/queries/running';
import { CLAIMS, type LadderStep, type State } from '@/lib/control/types';
import { explainNow } from './explain-now';
import type { Why } from '@/lib/schema/running';
import type { Channel, House } from '@/lib/schema/yard-view';
import { isoIn, isoOrNull, wireData, wireLadder } from './wire';

type WhyAnswer = z.infer<typeof Why>;

/**
 * Why a channel was on or off at a time, from what was stored then: the switching that it stood under, or, where the
 * claim changed since without a switching, the decision. Never reckoned anew with today's rules.
 * @returns null where nothing is known of that time
 */
export async function whyThen(
  holding: Holding,
  house: House,
  channel: Channel,
  at: number,
): Promise<WhyAnswer | null> {
  const switching = await switchingAt(holding, channel.id, at);
  const decision = (await listDecisions(holding, [channel.id], at + 1, at + 1)).at(-1);
  if (switching === null && decision === undefined) return null;
  const head = { at: isoIn(house.zone, at), channel: channel.number };
  if (decision !== undefined && (switching === null || decision.at > switching.at)) {
    return {
      ...head,
      ...{ state: decision.state, claim: decision.claim, until: null, version: switching?.version ?? null },
      ladder: downTo(decision.claim, decision.state),
      next: [],
    };
  }
  if (switching === null) return null;
  const { to, claim, explanation, version } = switching;
  return {
    ...head,
    ...{ state: to, claim, version },
    until: isoOrNull(house.zone, explanation.until),
    ladder: wireLadder(house.zone, explanation.ladder),
    next: explanation.next.map((one) => wireData(house.zone, one)),
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
  now: number,
): Promise<WhyAnswer> {
  const kept = await readMemory(holding, house.id);
  const state = kept?.state?.channels.find((one) => one.key === channel.key);
  const then = await whyThen(holding, house, channel, now);
  if (kept === null || state === undefined) return then ?? unstepped(house, channel, now);
  const explained = await explainNow(holding, house.id, channel.id, kept, now);
  const isSame = explained?.claim === state.claim && explained.state === state.state;
  const told = isSame
    ? {
        ladder: wireLadder(house.zone, explained.ladder),
        next: explained.next.map((one) => wireData(house.zone, one)),
        version: explained.rule?.version ?? null,
      }
    : { ladder: downTo(state.claim, state.state), next: [], version: then?.version ?? null };
  return {
    at: kept.state?.at ?? isoIn(house.zone, now),
    channel: channel.number,
    ...{ state: state.state, claim: state.claim, until: state.until, next: told.next, version: told.version },
    ladder: told.ladder.map((step) =>
      step.claim === state.claim ? { ...step, because: state.because } : step,
    ),
  };
}

/** Control has not looked at this channel yet: it stands as its wiring lets it stand, coil off. */
function unstepped(house: House, channel: Channel, now: number): WhyAnswer {
  const state = channel.contact === 'NC' ? 'on' : 'off';
  return {
    ...{ at: isoIn(house.zone, now), channel: channel.number, state, claim: 'fail-safe', until: null },
    ...{ ladder: downTo('fail-safe', state), next: [], version: null },
  };
}

/** The ladder as far as it went; of the claims above the one that decided it is only known that they kept still. */
function downTo(claim: string, wants: State): LadderStep[] {
  const place = CLAIMS.findIndex((one) => one === claim);
  return CLAIMS.slice(0, place + 1).map((one, at) =>
    at === place
      ? { claim: one, speaks: true, wants: one === 'short-cycle' ? 'hold' : wants }
      : { claim: one, speaks: false },
  );
}
