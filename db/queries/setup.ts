import 'server-only';
import { and, eq } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { house } from '@/db/schema/house';
import { CAN_WAIT, type SetupFacts } from '@/lib/analysis/setup';
import { listRules } from './rule';
import { readWiring, type WiringPage } from './wiring-page';

/** What a house's set-up is judged by, made of what Wiring shows. */
export async function setupFacts(
  holding: Holding,
  wiring: Pick<WiringPage, 'house' | 'nodes' | 'points' | 'sources' | 'channels' | 'loops'>,
): Promise<SetupFacts> {
  const [row] = await holding.db
    .select({ putOff: house.setupSkipped })
    .from(house)
    .where(and(eq(house.holdingId, holding.id), eq(house.id, wiring.house.id)));
  const rules = await listRules(holding, wiring.house.id);
  return {
    nodes: wiring.nodes.map((one) => ({
      key: one.key,
      relays: one.channels,
      isHeard: one.lastHeardAt !== null,
    })),
    points: wiring.points.map((one) => ({ key: one.key, role: one.role, isMeasured: one.node !== null })),
    sources: wiring.sources.map((one) => ({ slug: one.slug, kind: one.kind })),
    channels: wiring.channels.map((one) => ({
      ...{ key: one.key, label: one.label, source: one.source },
      isProved: one.provedAt !== null,
    })),
    loops: wiring.loops.map((one) => ({ source: one.source })),
    rulesInForce: rules.filter((rule) => rule.inForce !== null).length,
    drafts: rules.filter((rule) => rule.inForce === null && rule.draft !== null).length,
    putOff: row?.putOff ?? [],
  };
}

export interface SetupPage extends WiringPage {
  facts: SetupFacts;
}

export async function readSetup(holding: Holding, ofHouse: WiringPage['house']): Promise<SetupPage> {
  const wiring = await readWiring(holding, ofHouse);
  return { ...wiring, facts: await setupFacts(holding, wiring) };
}

/** Nothing that control reads changes by it, so the plan is not touched and the house's revision stays. */
export async function putOffSteps(
  holding: Holding,
  houseId: string,
  putOff: readonly string[],
): Promise<void> {
  await holding.db
    .update(house)
    .set({ setupSkipped: CAN_WAIT.filter((step) => putOff.includes(step)) })
    .where(and(eq(house.holdingId, holding.id), eq(house.id, houseId)));
}
