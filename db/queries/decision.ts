/** What decided a channel, and when: the spans between its decisions, and what stood around one instant. */
import { and, asc, desc, eq, gt, gte, inArray, lt, lte } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { decision, switching } from '@/db/schema/running';
import type { Explanation } from '@/lib/control/events';
import type { State } from '@/lib/control/types';
import { asSwitching, type Switching } from './running';

export interface Decision {
  channelId: string;
  at: number;
  state: State;
  claim: string;
}

/** Decisions from `from` to before `to`, ascending, led by the one of each channel that stood at `from`. */
export async function listDecisions(
  holding: Holding,
  channelIds: readonly string[],
  from: number,
  to: number,
): Promise<Decision[]> {
  if (channelIds.length === 0) return [];
  const mine = and(eq(decision.holdingId, holding.id), inArray(decision.channelId, [...channelIds]));
  // without the explanations, which are most of a row
  const { channelId, at, state, claim, id } = decision;
  const columns = { channelId, at, state, claim };
  const standing = await holding.db
    .selectDistinctOn([channelId], columns)
    .from(decision)
    .where(and(mine, lt(at, new Date(from))))
    .orderBy(channelId, desc(at), desc(id));
  const during = await holding.db
    .select(columns)
    .from(decision)
    .where(and(mine, gte(at, new Date(from)), lt(at, new Date(to))))
    .orderBy(asc(at), asc(id));
  return [...standing, ...during].map((row) => ({ ...row, at: row.at.getTime() }));
}

export interface Around {
  /** The newest at or before the instant. */
  switching: Switching | null;
  decision: (Decision & { explanation: Explanation | null }) | null;
  /** The first after it. */
  nextSwitching: Switching | null;
  nextDecision: Decision | null;
  /** When the load last switched before the newest switching or decision began. */
  switchedBefore: number | null;
}

/** What a channel stood under at an instant, and what came before and after. */
export async function decisionsAround(holding: Holding, channelId: string, at: number): Promise<Around> {
  const switchings = (bound: ReturnType<typeof lte>, newest: boolean) =>
    holding.db
      .select()
      .from(switching)
      .where(and(eq(switching.holdingId, holding.id), eq(switching.channelId, channelId), bound))
      .orderBy(
        ...(newest ? [desc(switching.at), desc(switching.id)] : [asc(switching.at), asc(switching.id)]),
      )
      .limit(1);
  const decisions = (bound: ReturnType<typeof lte>, newest: boolean) =>
    holding.db
      .select()
      .from(decision)
      .where(and(eq(decision.holdingId, holding.id), eq(decision.channelId, channelId), bound))
      .orderBy(...(newest ? [desc(decision.at), desc(decision.id)] : [asc(decision.at), asc(decision.id)]))
      .limit(1);
  const instant = new Date(at);
  const [row] = await switchings(lte(switching.at, instant), true);
  const [stood] = await decisions(lte(decision.at, instant), true);
  const [nextRow] = await switchings(gt(switching.at, instant), false);
  const [following] = await decisions(gt(decision.at, instant), false);
  const since = Math.max(row?.at.getTime() ?? -Infinity, stood?.at.getTime() ?? -Infinity);
  const [before] = Number.isFinite(since) ? await switchings(lt(switching.at, new Date(since)), true) : [];
  return {
    switching: row === undefined ? null : asSwitching(row),
    decision: stood === undefined ? null : { ...asDecision(stood), explanation: stood.explanation },
    nextSwitching: nextRow === undefined ? null : asSwitching(nextRow),
    nextDecision: following === undefined ? null : asDecision(following),
    switchedBefore: before?.at.getTime() ?? null,
  };
}

/** When a channel was first decided at all; null: never. */
export async function firstDecisionAt(holding: Holding, channelId: string): Promise<number | null> {
  const [row] = await holding.db
    .select({ at: decision.at })
    .from(decision)
    .where(and(eq(decision.holdingId, holding.id), eq(decision.channelId, channelId)))
    .orderBy(asc(decision.at))
    .limit(1);
  return row?.at.getTime() ?? null;
}

const asDecision = ({ channelId, at, state, claim }: typeof decision.$inferSelect): Decision => ({
  ...{ channelId, at: at.getTime(), state, claim },
});
