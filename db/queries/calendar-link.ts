import 'server-only';
import { and, desc, eq, isNull, sql } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import { everyHolding, type Holding } from '@/db/client';
import { member } from '@/db/schema/auth';
import { calendarLink } from '@/db/schema/heap';
import type { CalendarLink } from '@/lib/schema/heap-job';
import { isId } from './reference';

export type OwnLink = CalendarLink & { userId: string };

/** Links in use; of one person where given. */
export async function listCalendarLinks(holding: Holding, userId?: string): Promise<OwnLink[]> {
  const rows = await holding.db
    .select()
    .from(calendarLink)
    .where(
      and(
        eq(calendarLink.holdingId, holding.id),
        isNull(calendarLink.revokedAt),
        userId === undefined ? undefined : eq(calendarLink.userId, userId),
      ),
    )
    .orderBy(desc(calendarLink.createdAt), desc(calendarLink.id));
  return rows.map((row) => ({
    id: row.id,
    userId: row.userId,
    createdAt: row.createdAt.toISOString(),
    lastUsedAt: row.lastUsedAt?.toISOString() ?? null,
  }));
}

export async function findCalendarLink(holding: Holding, id: string): Promise<OwnLink | null> {
  return isId(id) ? ((await listCalendarLinks(holding)).find((one) => one.id === id) ?? null) : null;
}

export async function createCalendarLink(
  holding: Holding,
  given: { userId: string; hash: string; now: Date },
): Promise<CalendarLink> {
  const id = uuid();
  const { userId, hash, now } = given;
  await holding.db.insert(calendarLink).values({ holdingId: holding.id, id, userId, hash, createdAt: now });
  return { id, createdAt: now.toISOString(), lastUsedAt: null };
}

export async function revokeCalendarLink(holding: Holding, id: string, now: Date): Promise<void> {
  await holding.db
    .update(calendarLink)
    .set({ revokedAt: now })
    .where(and(eq(calendarLink.holdingId, holding.id), eq(calendarLink.id, id)));
}

/** Whose calendar asks: asked before any holding is known. Who is no longer of the holding has no link any more. */
export async function findLinkByHash(hash: string): Promise<{ id: string; holdingId: string } | null> {
  const [row] = await everyHolding()
    .select({ id: calendarLink.id, holdingId: calendarLink.holdingId })
    .from(calendarLink)
    .innerJoin(
      member,
      and(eq(member.userId, calendarLink.userId), eq(member.organizationId, calendarLink.holdingId)),
    )
    .where(and(eq(calendarLink.hash, hash), isNull(calendarLink.revokedAt)));
  return row ?? null;
}

/** At most once a minute: a calendar asks as often as it likes. */
export async function noteLinkUse(holding: Holding, id: string, now: Date): Promise<void> {
  await holding.db
    .update(calendarLink)
    .set({ lastUsedAt: now })
    .where(
      and(
        eq(calendarLink.holdingId, holding.id),
        eq(calendarLink.id, id),
        sql`coalesce(last_used_at, 'epoch') < ${now.toISOString()}::timestamptz - interval '1 minute'`,
      ),
    );
}
