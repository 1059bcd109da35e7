import { hashPassword, verifyPassword } from 'better-auth/crypto';
import { eq, inArray, like } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import { z } from 'zod';
import { everyHolding, type Holding } from '@/db/client';
import { account, member, organization, user } from '@/db/schema/auth';
import { point } from '@/db/schema/node';
import { reading, rollup } from '@/db/series';

const Metadata = z.object({ password: z.string() });

export interface DemoPerson {
  email: string;
  name: string;
  role: string;
}

/** Makes a holding with its people, all with one password. `ready` stays false until its history is there. */
export async function writeHolding(
  name: string,
  slug: string,
  people: DemoPerson[],
  password: string,
  at: Date,
): Promise<Holding> {
  const db = everyHolding();
  const id = uuid();
  await db
    .insert(organization)
    .values({ id, name, slug, createdAt: at, metadata: JSON.stringify({ demo: 'begun' }) });
  const hash = await hashPassword(password);
  for (const person of people) {
    const userId = uuid();
    await db
      .insert(user)
      .values({ id: userId, name: person.name, email: person.email, emailVerified: true, createdAt: at });
    await db.insert(account).values({
      id: uuid(),
      accountId: userId,
      providerId: 'credential',
      userId,
      password: hash,
      createdAt: at,
    });
    await db
      .insert(member)
      .values({ id: uuid(), organizationId: id, userId, role: person.role, createdAt: at });
  }
  return { id, db };
}

/** The seeding is whole; which password it was made with is kept as a hash, to notice a changed DEMO_PASSWORD. */
export async function markReady(password: string): Promise<void> {
  const metadata = JSON.stringify({ demo: 'ready', password: await hashPassword(password) });
  await everyHolding().update(organization).set({ metadata }).where(like(organization.metadata, '%"begun"%'));
}

export async function passwordIsSeeded(password: string): Promise<boolean> {
  const rows = await everyHolding()
    .select({ metadata: organization.metadata })
    .from(organization)
    .where(like(organization.metadata, '%"ready"%'));
  for (const row of rows) {
    const kept = Metadata.parse(JSON.parse(row.metadata ?? '{}'));
    if (!(await verifyPassword({ hash: kept.password, password }))) return false;
  }
  return true;
}

/** 'none' before any holding exists; 'half' after a seeding that was cut short. */
export async function seedState(): Promise<'none' | 'half' | 'ready'> {
  const rows = await everyHolding().select({ metadata: organization.metadata }).from(organization);
  if (rows.length === 0) return 'none';
  return rows.some((row) => row.metadata?.includes('"begun"')) ? 'half' : 'ready';
}

/** Takes away what a seeding that was cut short left, readings too. */
export async function removeHalfSeeded(holdings: { slug: string; emails: string[] }[]): Promise<void> {
  const db = everyHolding();
  for (const { slug, emails } of holdings) {
    const [found] = await db
      .select({ id: organization.id })
      .from(organization)
      .where(eq(organization.slug, slug));
    if (found) {
      const points = await db
        .select({ number: point.number })
        .from(point)
        .where(eq(point.holdingId, found.id));
      // a point at a time: millions of rows in one statement could outlast the pool's limit
      for (const { number } of points) {
        await db.delete(reading).where(eq(reading.point, number));
        await db.delete(rollup).where(eq(rollup.point, number));
      }
      await db.delete(organization).where(eq(organization.id, found.id));
    }
    await db.delete(user).where(inArray(user.email, emails));
  }
}

/** Gives the demo people a new password, as when DEMO_PASSWORD was changed between two starts. */
export async function setPassword(emails: string[], password: string): Promise<void> {
  const hash = await hashPassword(password);
  const db = everyHolding();
  const people = db.select({ id: user.id }).from(user).where(inArray(user.email, emails));
  await db.update(account).set({ password: hash }).where(inArray(account.userId, people));
  await db
    .update(organization)
    .set({ metadata: JSON.stringify({ demo: 'ready', password: hash }) })
    .where(like(organization.metadata, '%"ready"%'));
}
