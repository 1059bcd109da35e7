import 'server-only';
import { and, desc, eq, isNull, sql } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import type { Holding } from '@/db/client';
import { channel } from '@/db/schema/channel';
import { proof } from '@/db/schema/proof';
import type { ProofOutcome, ProofRecord, ProofRun } from '@/lib/schema/proof';
import { wiringOf, type WiredChannel, type Wiring } from '@/lib/schema/wiring';
import { touchPlan } from './plan';
import { isId } from './reference';

/** A proof as it is kept; how its steps stand is reckoned from it and from the channel as it is (lib/server/proofs). */
export interface KeptProof {
  id: string;
  revision: number;
  channelId: string;
  /** Key of the channel. */
  channel: string;
  begunBy: string;
  begunAt: Date;
  endedBy: string | null;
  endedAt: Date | null;
  outcome: ProofOutcome | null;
  endedWhy: string | null;
  wiring: Wiring;
  records: ProofRecord[];
  runs: ProofRun[];
}
interface Act {
  by: string;
  now: Date;
}

const fields = {
  ...{ id: proof.id, revision: proof.revision, channelId: proof.channelId, channel: channel.key },
  ...{ begunBy: proof.begunBy, begunAt: proof.begunAt, endedBy: proof.endedBy, endedAt: proof.endedAt },
  ...{ outcome: proof.outcome, endedWhy: proof.endedWhy, wiring: proof.wiring },
  ...{ records: proof.records, runs: proof.runs },
};

async function select(
  holding: Holding,
  houseId: string,
  only: ReturnType<typeof eq> | undefined,
): Promise<KeptProof[]> {
  return holding.db
    .select(fields)
    .from(proof)
    .innerJoin(channel, and(eq(channel.holdingId, proof.holdingId), eq(channel.id, proof.channelId)))
    .where(and(eq(proof.holdingId, holding.id), eq(proof.houseId, houseId), only))
    .orderBy(desc(proof.begunAt), desc(proof.id));
}

/** Newest first; those of one channel, or of all. */
export async function listProofs(
  holding: Holding,
  houseId: string,
  channelId?: string,
): Promise<KeptProof[]> {
  return select(holding, houseId, channelId === undefined ? undefined : eq(proof.channelId, channelId));
}

export async function findProof(holding: Holding, houseId: string, id: string): Promise<KeptProof | null> {
  if (!isId(id)) return null;
  return (await select(holding, houseId, eq(proof.id, id)))[0] ?? null;
}

/** The one that goes on; there is one a channel at most. */
export async function openProof(
  holding: Holding,
  houseId: string,
  channelId: string,
): Promise<KeptProof | null> {
  const found = await select(holding, houseId, and(eq(proof.channelId, channelId), isNull(proof.endedAt)));
  return found[0] ?? null;
}

export async function beginProof(
  holding: Holding,
  houseId: string,
  of: WiredChannel & { id: string },
  act: Act,
): Promise<KeptProof> {
  const id = uuid();
  await holding.db.insert(proof).values({
    ...{ id, holdingId: holding.id, houseId, channelId: of.id, wiring: wiringOf(of) },
    ...{ begunBy: act.by, begunAt: act.now },
  });
  return again(holding, houseId, id);
}

const mine = (holding: Holding, id: string) => and(eq(proof.holdingId, holding.id), eq(proof.id, id));
const counted = { revision: sql`${proof.revision} + 1` };

export async function keepRecords(
  holding: Holding,
  houseId: string,
  of: KeptProof,
  records: readonly ProofRecord[],
): Promise<KeptProof> {
  await holding.db
    .update(proof)
    .set({ records: [...of.records, ...records], ...counted })
    .where(mine(holding, of.id));
  return again(holding, houseId, of.id);
}

export async function keepRuns(
  holding: Holding,
  houseId: string,
  of: KeptProof,
  runs: readonly ProofRun[],
): Promise<KeptProof> {
  await holding.db
    .update(proof)
    .set({ runs: [...runs], ...counted })
    .where(mine(holding, of.id));
  return again(holding, houseId, of.id);
}

/** With the outcome `proved` the channel counts as proved from then on. */
export async function endProof(
  holding: Holding,
  houseId: string,
  of: Pick<KeptProof, 'id' | 'channelId'>,
  end: { outcome: ProofOutcome; why: string | null },
  act: Act,
): Promise<KeptProof> {
  await holding.db
    .update(proof)
    .set({ outcome: end.outcome, endedWhy: end.why, endedBy: act.by, endedAt: act.now, ...counted })
    .where(mine(holding, of.id));
  if (end.outcome === 'proved') {
    await holding.db
      .update(channel)
      .set({ provedAt: act.now, revision: sql`${channel.revision} + 1` })
      .where(and(eq(channel.holdingId, holding.id), eq(channel.id, of.channelId)));
    await touchPlan(holding, houseId);
  }
  return again(holding, houseId, of.id);
}

async function again(holding: Holding, houseId: string, id: string): Promise<KeptProof> {
  const found = await findProof(holding, houseId, id);
  if (found === null) throw new Error('the proof was there a moment ago');
  return found;
}

export interface LastProof {
  by: string;
  /** Return minus intake, K; null where no gain run was made. */
  gain: { kelvin: number; sd: number | null; seconds: number } | null;
}

/** What the last finished proof of each channel found, by the channel's id. */
export async function lastProofs(holding: Holding, houseId: string): Promise<Map<string, LastProof>> {
  const rows = await holding.db
    .selectDistinctOn([proof.channelId], {
      ...{ channelId: proof.channelId, by: proof.endedBy, records: proof.records },
    })
    .from(proof)
    .where(and(eq(proof.holdingId, holding.id), eq(proof.houseId, houseId), eq(proof.outcome, 'proved')))
    .orderBy(proof.channelId, desc(proof.endedAt));
  return new Map(
    rows.map(({ channelId, by, records }) => [channelId, { by: by ?? '', gain: gainIn(records) }]),
  );
}

function gainIn(records: readonly ProofRecord[]): LastProof['gain'] {
  const gain = records.findLast((one) => one.step === 'gain' && one.result === 'done');
  const { kelvin, sd, ranS } = gain?.figures ?? {};
  if (typeof kelvin !== 'number' || typeof ranS !== 'number') return null;
  return { kelvin, sd: typeof sd === 'number' ? sd : null, seconds: ranS };
}
