import 'server-only';
import { sql } from 'drizzle-orm';
import type { Holding } from '@/db/client';

/** Holds back other changes of this holding until the transaction ends; readers are not held. */
export async function lockHolding(holding: Holding): Promise<void> {
  await holding.db.execute(sql`select pg_advisory_xact_lock(hashtext(${`holding ${holding.id}`}))`);
}
