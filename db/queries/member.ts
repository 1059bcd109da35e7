/** Who belongs to a holding, and as what. Kept apart by the where clause alone: people.ts says why. */
import 'server-only';
import { and, asc, count, eq, ne, sql } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import { everyHolding, type Db, type Holding } from '@/db/client';
import { member, session, user } from '@/db/schema/auth';

export async function addMember(holdingId: string, userId: string, role: string, db: Db = everyHolding()) {
  const id = uuid();
  await db.insert(member).values({ id, organizationId: holdingId, userId, role });
  return id;
}

export interface MemberRow {
  id: string;
  userId: string;
  name: string;
  email: string;
  role: string;
  since: Date;
}

export async function listMembers(holding: Holding): Promise<MemberRow[]> {
  return holding.db
    .select({
      id: member.id,
      userId: user.id,
      name: user.name,
      email: user.email,
      role: member.role,
      since: member.createdAt,
    })
    .from(member)
    .innerJoin(user, eq(user.id, member.userId))
    .where(eq(member.organizationId, holding.id))
    .orderBy(asc(user.name), asc(member.id));
}

export async function findMember(holding: Holding, id: string): Promise<MemberRow | null> {
  return (await listMembers(holding)).find((row) => row.id === id || row.userId === id) ?? null;
}

/** Owners of the holding, locked, so that two removals at once cannot both find another owner left. */
export async function countOtherOwners(
  holding: Holding,
  memberId: string,
  ownerRole: string,
): Promise<number> {
  await holding.db.execute(
    sql`select id from member where organization_id = ${holding.id} and role = ${ownerRole} for update`,
  );
  const rows = await holding.db
    .select({ others: count() })
    .from(member)
    .where(and(eq(member.organizationId, holding.id), eq(member.role, ownerRole), ne(member.id, memberId)));
  return rows[0]?.others ?? 0;
}

export async function changeRole(holding: Holding, memberId: string, role: string): Promise<void> {
  await holding.db
    .update(member)
    .set({ role })
    .where(and(eq(member.organizationId, holding.id), eq(member.id, memberId)));
}

/** Takes a person out of the holding and ends the sessions they had in it. */
export async function removeMember(holding: Holding, row: MemberRow): Promise<void> {
  await holding.db.delete(member).where(and(eq(member.organizationId, holding.id), eq(member.id, row.id)));
  await holding.db
    .delete(session)
    .where(
      and(
        eq(session.userId, row.userId),
        sql`coalesce(active_organization_id, ${holding.id}) = ${holding.id}`,
      ),
    );
}

/** First owner of a holding: in whose name a program's key invites, since an invitation names a person. */
export async function findFirstOwner(holding: Holding, ownerRole: string): Promise<string | null> {
  return (await listMembers(holding)).find((row) => row.role === ownerRole)?.userId ?? null;
}
