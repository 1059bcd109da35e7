/**
 * People and their holdings. better-auth's tables stand outside row security, since sign-in must find a person before
 * any holding is known; so here, in member.ts and in invitation.ts the where clause alone keeps holdings apart.
 */
import 'server-only';
import { asc, eq } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import { everyHolding, type Db } from '@/db/client';
import { account, member, organization, user } from '@/db/schema/auth';

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

export async function findUserByEmail(email: string): Promise<{ id: string; name: string } | null> {
  const rows = await everyHolding()
    .select({ id: user.id, name: user.name })
    .from(user)
    .where(eq(user.email, email.toLowerCase()));
  return rows[0] ?? null;
}

export async function listHoldingIds(): Promise<string[]> {
  const rows = await everyHolding().select({ id: organization.id }).from(organization);
  return rows.map((row) => row.id);
}
