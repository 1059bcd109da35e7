import 'server-only';
import { and, asc, count, eq, gt, ne, sql } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import { everyHolding, type Db, type Holding } from '@/db/client';
import { account, invitation, member, organization, session, user } from '@/db/schema/auth';

/**
 * People and their holdings. better-auth's tables stand outside row security, since sign-in must find a person before
 * any holding is known; so here the where clause alone keeps holdings apart.
 */
export interface Membership {
  holdingId: string;
  holdingName: string;
  role: string;
}

/** The holding a session works in: its active one while the person still belongs there, else the first they joined. */
export async function findMembership(
  userId: string,
  activeHoldingId: string | null,
): Promise<Membership | null> {
  const rows = await everyHolding()
    .select({ holdingId: organization.id, holdingName: organization.name, role: member.role })
    .from(member)
    .innerJoin(organization, eq(organization.id, member.organizationId))
    .where(eq(member.userId, userId))
    .orderBy(asc(member.createdAt), asc(member.id));
  return rows.find((row) => row.holdingId === activeHoldingId) ?? rows[0] ?? null;
}

export async function listMemberships(userId: string): Promise<Membership[]> {
  return everyHolding()
    .select({ holdingId: organization.id, holdingName: organization.name, role: member.role })
    .from(member)
    .innerJoin(organization, eq(organization.id, member.organizationId))
    .where(eq(member.userId, userId))
    .orderBy(asc(organization.name));
}

export async function createHolding(name: string, slug: string, db: Db = everyHolding()): Promise<string> {
  const id = uuid();
  await db.insert(organization).values({ id, name, slug });
  return id;
}

/** A person with a password. The hash comes from `hashPassword` of lib/server/auth. */
export async function createUser(
  person: { email: string; name: string; passwordHash: string },
  db: Pick<Db, 'insert'> = everyHolding(),
): Promise<string> {
  const id = uuid();
  await db
    .insert(user)
    .values({ id, email: person.email.toLowerCase(), name: person.name, emailVerified: true });
  await db.insert(account).values({
    id: uuid(),
    accountId: id,
    providerId: 'credential',
    userId: id,
    password: person.passwordHash,
  });
  return id;
}

export async function addMember(holdingId: string, userId: string, role: string, db: Db = everyHolding()) {
  const id = uuid();
  await db.insert(member).values({ id, organizationId: holdingId, userId, role });
  return id;
}

export async function findUserByEmail(email: string): Promise<{ id: string; name: string } | null> {
  const rows = await everyHolding()
    .select({ id: user.id, name: user.name })
    .from(user)
    .where(eq(user.email, email.toLowerCase()));
  return rows[0] ?? null;
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

export interface InvitationRow {
  id: string;
  email: string;
  role: string;
  expiresAt: Date;
  createdAt: Date;
}

const invitationFields = {
  id: invitation.id,
  email: invitation.email,
  role: sql<string>`coalesce(${invitation.role}, '')`,
  expiresAt: invitation.expiresAt,
  createdAt: invitation.createdAt,
};

export async function listInvitations(holding: Holding, now: Date): Promise<InvitationRow[]> {
  return holding.db
    .select(invitationFields)
    .from(invitation)
    .where(
      and(
        eq(invitation.organizationId, holding.id),
        eq(invitation.status, 'pending'),
        gt(invitation.expiresAt, now),
      ),
    )
    .orderBy(asc(invitation.createdAt), asc(invitation.id));
}

/** A new invitation takes the place of an older one to the same address. */
export async function createInvitation(
  holding: Holding,
  given: { email: string; role: string; inviterId: string; expiresAt: Date },
): Promise<InvitationRow> {
  const email = given.email.toLowerCase();
  await holding.db
    .update(invitation)
    .set({ status: 'canceled' })
    .where(
      and(
        eq(invitation.organizationId, holding.id),
        eq(invitation.email, email),
        eq(invitation.status, 'pending'),
      ),
    );
  const rows = await holding.db
    .insert(invitation)
    .values({
      id: uuid(),
      organizationId: holding.id,
      email,
      role: given.role,
      inviterId: given.inviterId,
      expiresAt: given.expiresAt,
    })
    .returning(invitationFields);
  return rows[0] ?? fail();
}

export async function cancelInvitation(holding: Holding, id: string): Promise<boolean> {
  const rows = await holding.db
    .update(invitation)
    .set({ status: 'canceled' })
    .where(
      and(eq(invitation.organizationId, holding.id), eq(invitation.id, id), eq(invitation.status, 'pending')),
    )
    .returning({ id: invitation.id });
  return rows.length > 0;
}

/** What the invited person's page shows; found by the invitation's id alone, since no holding is known yet. */
export async function findInvitation(id: string, now: Date) {
  const rows = await everyHolding()
    .select({
      ...invitationFields,
      holdingId: organization.id,
      holdingName: organization.name,
      inviter: user.name,
    })
    .from(invitation)
    .innerJoin(organization, eq(organization.id, invitation.organizationId))
    .innerJoin(user, eq(user.id, invitation.inviterId))
    .where(and(eq(invitation.id, id), eq(invitation.status, 'pending'), gt(invitation.expiresAt, now)));
  return rows[0] ?? null;
}

/** Makes the invited person a member, once: a second acceptance of the same invitation finds nothing pending. */
export async function acceptInvitation(
  id: string,
  person: { userId: string } | { name: string; passwordHash: string },
  now: Date,
): Promise<{ holdingId: string; userId: string; email: string } | null> {
  return everyHolding().transaction(async (db) => {
    const taken = await db
      .update(invitation)
      .set({ status: 'accepted' })
      .where(and(eq(invitation.id, id), eq(invitation.status, 'pending'), gt(invitation.expiresAt, now)))
      .returning({ holdingId: invitation.organizationId, email: invitation.email, role: invitation.role });
    const row = taken[0];
    if (row === undefined || row.role === null) return null;
    const userId = 'userId' in person ? person.userId : await createUser({ ...person, email: row.email }, db);
    await db
      .insert(member)
      .values({ id: uuid(), organizationId: row.holdingId, userId, role: row.role })
      .onConflictDoNothing();
    return { holdingId: row.holdingId, userId, email: row.email };
  });
}

/** First owner of a holding: in whose name a program's key invites, since an invitation names a person. */
export async function findFirstOwner(holding: Holding, ownerRole: string): Promise<string | null> {
  return (await listMembers(holding)).find((row) => row.role === ownerRole)?.userId ?? null;
}

function fail(): never {
  throw new Error('a row was written and did not come back');
}

export async function listHoldingIds(): Promise<string[]> {
  const rows = await everyHolding().select({ id: organization.id }).from(organization);
  return rows.map((row) => row.id);
}
