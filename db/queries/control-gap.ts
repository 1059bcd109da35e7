/** Hours in which control did not run. */
import { and, asc, gt, lte } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { controlGap } from '@/db/schema/running';

export interface ControlGap {
  from: number;
  /** null: it goes on. */
  to: number | null;
}

/** Epoch ms of app time. One that is known already is left as it is. */
export async function noteGap(db: Db, gap: { from: number; to: number }): Promise<void> {
  await db
    .insert(controlGap)
    .values({ from: new Date(gap.from), to: new Date(gap.to) })
    .onConflictDoNothing();
}

/** Gaps that are over and overlap a span, ascending. */
export async function gapsBetween(db: Db, from: number, to: number): Promise<ControlGap[]> {
  const rows = await db
    .select()
    .from(controlGap)
    .where(and(lte(controlGap.from, new Date(to)), gt(controlGap.to, new Date(from))))
    .orderBy(asc(controlGap.from));
  return rows.map((row) => ({ from: row.from.getTime(), to: row.to.getTime() }));
}
