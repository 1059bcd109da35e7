import 'server-only';
import { and, asc, eq, sql } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import type { z } from 'zod';
import type { Holding } from '@/db/client';
import { interlock } from '@/db/schema/channel';
import { needsCycle } from '@/lib/control/interlocks';
import type { InterlockCreate } from '@/lib/schema/channel';
import { Interlock } from '@/lib/schema/yard-view';
import { touchPlan } from './plan';
import { houseNames, inUse } from './reference';
import { Refusal } from './refusal';

type Given = z.infer<typeof InterlockCreate>;

export async function listInterlocks(holding: Holding, houseId: string): Promise<Interlock[]> {
  const rows = await holding.db
    .select()
    .from(interlock)
    .where(inUse(holding, houseId, interlock))
    .orderBy(asc(interlock.id));
  const names = await houseNames(holding, houseId);
  return rows.map((row) =>
    Interlock.parse({
      id: row.id,
      revision: row.revision,
      channel: names.channels.key(row.channelId) ?? '',
      kind: row.kind,
      other: names.channels.key(row.otherId) ?? '',
      delay: row.delayS,
      frostMayBreak: row.frostMayBreak,
    }),
  );
}

export async function findInterlock(
  holding: Holding,
  houseId: string,
  id: string,
): Promise<Interlock | null> {
  return (await listInterlocks(holding, houseId)).find((row) => row.id === id) ?? null;
}

/**
 * Refused: what is there already; a channel that could never run, since it needs one that it never runs with; and a
 * ring of needs, in which every channel waits for itself.
 */
function refuseContradiction(given: Given, others: Interlock[]): void {
  const isPair = (row: { channel: string; other: string }) =>
    (row.channel === given.channel && row.other === given.other) ||
    (row.channel === given.other && row.other === given.channel);
  for (const row of others.filter(isPair)) {
    const isSame = row.kind === given.kind && (given.kind === 'never-with' || row.channel === given.channel);
    if (isSame) throw new Refusal(null, 'These two channels are interlocked like this already.');
    if (row.kind !== given.kind) {
      throw new Refusal(
        null,
        `${given.channel} and ${given.other} would need each other and never run together.`,
      );
    }
  }
  if (given.kind !== 'needs') return;
  const [first, ...ring] = needsCycle([given, ...others.filter((one) => one.kind === 'needs')]);
  if (first !== undefined) {
    throw new Refusal(null, `Each would wait for the next: ${[first, ...ring, first].join(' needs ')}.`);
  }
}

async function columns(holding: Holding, houseId: string, given: Given, others: Interlock[]) {
  const { channels } = await houseNames(holding, houseId);
  const channel = channels.find(given.channel, 'channel');
  const other = channels.find(given.other, 'other');
  if (channel.id === other.id) throw new Refusal('other', 'A channel cannot be interlocked with itself.');
  refuseContradiction({ ...given, channel: channel.key, other: other.key }, others);
  return {
    channelId: channel.id,
    kind: given.kind,
    otherId: other.id,
    delayS: given.delay,
    frostMayBreak: given.frostMayBreak,
  };
}

export async function createInterlock(holding: Holding, houseId: string, given: Given): Promise<Interlock> {
  const id = uuid();
  const set = await columns(holding, houseId, given, await listInterlocks(holding, houseId));
  await holding.db.insert(interlock).values({ ...set, id, houseId, holdingId: holding.id });
  await touchPlan(holding, houseId);
  return found(holding, houseId, id);
}

export async function amendInterlock(
  holding: Holding,
  houseId: string,
  id: string,
  given: Given,
): Promise<Interlock> {
  const others = (await listInterlocks(holding, houseId)).filter((row) => row.id !== id);
  await holding.db
    .update(interlock)
    .set({
      ...(await columns(holding, houseId, given, others)),
      revision: sql`${interlock.revision} + 1`,
    })
    .where(and(eq(interlock.holdingId, holding.id), eq(interlock.id, id)));
  await touchPlan(holding, houseId);
  return found(holding, houseId, id);
}

export async function removeInterlock(
  holding: Holding,
  houseId: string,
  id: string,
  now: Date,
): Promise<void> {
  await holding.db
    .update(interlock)
    .set({ removedAt: now, revision: sql`${interlock.revision} + 1` })
    .where(and(eq(interlock.holdingId, holding.id), eq(interlock.id, id)));
  await touchPlan(holding, houseId);
}

async function found(holding: Holding, houseId: string, id: string): Promise<Interlock> {
  const row = await findInterlock(holding, houseId, id);
  if (row === null) throw new Error('the interlock was there a moment ago');
  return row;
}
