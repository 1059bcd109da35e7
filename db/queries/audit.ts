import 'server-only';
import { and, desc, eq, lt, or } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import type { Holding } from '@/db/client';
import { auditLog } from '@/db/schema/people';
import { cut, type Listed, type Page } from './page';

export interface AuditRow {
  id: string;
  at: string;
  by: string;
  action: string;
  subject: string;
  detail: Record<string, unknown>;
}

export async function addAudit(
  holding: Holding,
  row: { at: Date; by: string; action: string; subject: string; detail: Record<string, unknown> },
): Promise<void> {
  await holding.db.insert(auditLog).values({ ...row, id: uuid(), holdingId: holding.id });
}

/** Newest first. */
export async function listAudit(holding: Holding, page: Page): Promise<Listed<AuditRow>> {
  const { cursor } = page;
  const behind =
    cursor?.at === undefined
      ? undefined
      : or(
          lt(auditLog.at, new Date(cursor.at)),
          and(eq(auditLog.at, new Date(cursor.at)), lt(auditLog.id, cursor.id)),
        );
  const rows = await holding.db
    .select()
    .from(auditLog)
    .where(and(eq(auditLog.holdingId, holding.id), behind))
    .orderBy(desc(auditLog.at), desc(auditLog.id))
    .limit(page.limit + 1);
  const listed = cut(rows, page.limit, (row) => ({ id: row.id, at: row.at.getTime() }));
  const items = listed.items.map(({ id, at, by, action, subject, detail }) => ({
    id,
    at: at.toISOString(),
    by,
    action,
    subject,
    detail,
  }));
  return { items, next: listed.next };
}
