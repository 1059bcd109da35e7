import 'server-only';
import { and, asc, eq, isNull, sql } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import { everyHolding, type Holding } from '@/db/client';
import { organization } from '@/db/schema/auth';
import { apiKey } from '@/db/schema/people';
import { isId } from './reference';

export interface KeyRow {
  id: string;
  name: string;
  role: string;
  createdBy: string;
  createdAt: string;
  lastUsedAt: string | null;
}

const iso = (at: Date | null) => at?.toISOString() ?? null;

function toKey(row: typeof apiKey.$inferSelect): KeyRow {
  const { id, name, role, createdBy } = row;
  return {
    id,
    name,
    role,
    createdBy,
    createdAt: row.createdAt.toISOString(),
    lastUsedAt: iso(row.lastUsedAt),
  };
}

export async function listKeys(holding: Holding): Promise<KeyRow[]> {
  const rows = await holding.db
    .select()
    .from(apiKey)
    .where(and(eq(apiKey.holdingId, holding.id), isNull(apiKey.revokedAt)))
    .orderBy(asc(apiKey.id));
  return rows.map(toKey);
}

export async function findKey(holding: Holding, id: string): Promise<KeyRow | null> {
  return isId(id) ? ((await listKeys(holding)).find((row) => row.id === id) ?? null) : null;
}

export async function createKey(
  holding: Holding,
  given: { name: string; role: string; hash: string; createdBy: string },
): Promise<KeyRow> {
  const rows = await holding.db
    .insert(apiKey)
    .values({ ...given, id: uuid(), holdingId: holding.id })
    .returning();
  const row = rows[0];
  if (row === undefined) throw new Error('the key was written and did not come back');
  return toKey(row);
}

export async function revokeKey(holding: Holding, id: string): Promise<void> {
  await holding.db
    .update(apiKey)
    .set({ revokedAt: sql`now()` })
    .where(and(eq(apiKey.holdingId, holding.id), eq(apiKey.id, id)));
}

/** Whose key this is, by its hash; asked before any holding is known. */
export async function findKeyByHash(hash: string) {
  const rows = await everyHolding()
    .select({
      id: apiKey.id,
      name: apiKey.name,
      role: apiKey.role,
      holdingId: apiKey.holdingId,
      holdingName: organization.name,
      lastUsedAt: apiKey.lastUsedAt,
    })
    .from(apiKey)
    .innerJoin(organization, eq(organization.id, apiKey.holdingId))
    .where(and(eq(apiKey.hash, hash), isNull(apiKey.revokedAt)));
  return rows[0] ?? null;
}

/** At most once a minute, so that a busy program does not write a row with every question it asks. */
export async function noteKeyUse(id: string): Promise<void> {
  await everyHolding()
    .update(apiKey)
    .set({ lastUsedAt: sql`now()` })
    .where(and(eq(apiKey.id, id), sql`coalesce(last_used_at, 'epoch') < now() - interval '1 minute'`));
}
