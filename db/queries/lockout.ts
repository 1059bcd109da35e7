import 'server-only';
import { and, desc, eq, isNull, sql } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import type { Holding } from '@/db/client';
import { channel, lockout } from '@/db/schema/channel';
import type { Lockout } from '@/lib/schema/yard-view';
import { addPersonCommand } from './person-command';
import { touchPlan } from './plan';
import { houseNames, inUse, isId } from './reference';
import { Refusal } from './refusal';

const fields = {
  id: lockout.id,
  channel: channel.key,
  channelId: lockout.channelId,
  why: lockout.why,
  by: lockout.by,
  at: lockout.at,
  removedAt: lockout.removedAt,
  removedBy: lockout.removedBy,
};
type Row = Omit<Lockout, 'at' | 'removedAt' | 'revision'> & {
  channelId: string;
  at: Date;
  removedAt: Date | null;
};

function toLockout({ id, channel, why, by, at, removedAt, removedBy }: Row): Lockout {
  return {
    ...{ id, channel, why, by, removedBy },
    revision: removedAt === null ? 1 : 2,
    at: at.toISOString(),
    removedAt: removedAt?.toISOString() ?? null,
  };
}

async function select(
  holding: Holding,
  houseId: string,
  only: ReturnType<typeof eq> | undefined,
): Promise<Row[]> {
  return holding.db
    .select(fields)
    .from(lockout)
    .innerJoin(channel, and(eq(channel.holdingId, lockout.holdingId), eq(channel.id, lockout.channelId)))
    .where(and(eq(lockout.holdingId, holding.id), eq(lockout.houseId, houseId), only))
    .orderBy(desc(lockout.at), desc(lockout.id));
}

/** Standing ones first, newest first. */
export async function listLockouts(holding: Holding, houseId: string): Promise<Lockout[]> {
  const rows = (await select(holding, houseId, undefined)).map(toLockout);
  return [...rows.filter((row) => row.removedAt === null), ...rows.filter((row) => row.removedAt !== null)];
}

/** What stands, and what people call the channels of it: for the bar over every page of the house. */
export async function readStandingLockouts(
  holding: Holding,
  houseId: string,
): Promise<{ lockouts: Lockout[]; channels: { key: string; label: string; number: number }[] }> {
  const rows = await select(holding, houseId, isNull(lockout.removedAt));
  if (rows.length === 0) return { lockouts: [], channels: [] };
  const channels = await holding.db
    .select({ key: channel.key, label: channel.label, number: channel.number })
    .from(channel)
    .where(inUse(holding, houseId, channel));
  return { lockouts: rows.map(toLockout), channels };
}

export async function findLockout(holding: Holding, houseId: string, id: string): Promise<Lockout | null> {
  if (!isId(id)) return null;
  const row = (await select(holding, houseId, eq(lockout.id, id)))[0];
  return row === undefined ? null : toLockout(row);
}

interface Act {
  by: string;
  at: Date;
}

/** @returns the lock-out and the number of the order that makes the core obey it */
export async function placeLockout(
  holding: Holding,
  houseId: string,
  given: { channel: string; why: string },
  act: Act,
): Promise<{ lockout: Lockout; number: number }> {
  const channelId = (await houseNames(holding, houseId)).channels.find(given.channel, 'channel').id;
  const wired = await holding.db
    .select({ contact: channel.contact })
    .from(channel)
    .where(and(eq(channel.holdingId, holding.id), eq(channel.id, channelId)));
  // A normally closed contact runs its load while the coil is off: no relay state makes that load dead.
  if (wired[0]?.contact === 'NC')
    throw new Refusal(null, 'A relay cannot make this load dead; use its isolator.');
  const standing = await select(
    holding,
    houseId,
    and(eq(lockout.channelId, channelId), isNull(lockout.removedAt)),
  );
  if (standing.length > 0) throw new Refusal(null, 'This channel is locked out already.');
  const id = uuid();
  await holding.db
    .insert(lockout)
    .values({ id, holdingId: holding.id, houseId, channelId, why: given.why, by: act.by, at: act.at });
  const body = { kind: 'lock-out', channel: channelId, lockout: id, why: given.why } as const;
  const number = await addPersonCommand(holding, houseId, { ...act, body });
  await touchPlan(holding, houseId);
  const placed = await findLockout(holding, houseId, id);
  if (placed === null) throw new Error('the lock-out was written and is not there');
  return { lockout: placed, number };
}

export async function removeLockout(
  holding: Holding,
  houseId: string,
  id: string,
  act: Act,
): Promise<number | null> {
  const rows = await holding.db
    .update(lockout)
    .set({ removedAt: sql`${act.at.toISOString()}::timestamptz`, removedBy: act.by })
    .where(and(eq(lockout.holdingId, holding.id), eq(lockout.id, id), isNull(lockout.removedAt)))
    .returning({ channelId: lockout.channelId });
  const row = rows[0];
  if (row === undefined) return null;
  const body = { kind: 'unlock', channel: row.channelId, lockout: id } as const;
  const number = await addPersonCommand(holding, houseId, { ...act, body });
  await touchPlan(holding, houseId);
  return number;
}
