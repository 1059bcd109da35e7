/** Who is invited into a holding, and what becomes of it. Kept apart by the where clause alone: people.ts says why. */
import 'server-only';
import { and, asc, eq, gt, sql } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import { everyHolding, type Holding } from '@/db/client';
import { invitation, member, organization, user } from '@/db/schema/auth';
import { createUser } from './people';

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

function fail(): never {
  throw new Error('a row was written and did not come back');
}
