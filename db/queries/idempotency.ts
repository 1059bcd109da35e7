import 'server-only';
import { and, eq, lt, sql } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { idempotency } from '@/db/schema/people';

export interface KeptAnswer {
  requestHash: string;
  status: number;
  /** Sealed by the guard: it may carry a token that is shown once. */
  body: unknown;
}

export interface Asked {
  key: string;
  caller: string;
  requestHash: string;
}

const KEEP = sql`interval '24 hours'`;

/**
 * Takes the key for this request, or gives the answer that was kept for it. A second request with the same key at the
 * same moment waits here until the first is done.
 */
export async function takeKey(holding: Holding, asked: Asked): Promise<KeptAnswer | null> {
  const mine = and(
    eq(idempotency.holdingId, holding.id),
    eq(idempotency.caller, asked.caller),
    eq(idempotency.key, asked.key),
  );
  await holding.db.delete(idempotency).where(and(mine, lt(idempotency.createdAt, sql`now() - ${KEEP}`)));
  const taken = await holding.db
    .insert(idempotency)
    .values({ ...asked, holdingId: holding.id })
    .onConflictDoNothing()
    .returning({ key: idempotency.key });
  if (taken.length > 0) return null;
  const kept = (await holding.db.select().from(idempotency).where(mine))[0];
  if (kept === undefined || kept.status === null) return null;
  return { requestHash: kept.requestHash, status: kept.status, body: kept.body };
}

export async function keepAnswer(
  holding: Holding,
  asked: Asked,
  status: number,
  body: unknown,
): Promise<void> {
  await holding.db
    .update(idempotency)
    .set({ status, body })
    .where(
      and(
        eq(idempotency.holdingId, holding.id),
        eq(idempotency.caller, asked.caller),
        eq(idempotency.key, asked.key),
      ),
    );
}
