/** What the pages People and Account show. */
import { and, desc, eq, gt } from 'drizzle-orm';
import { everyHolding, type Holding } from '@/db/client';
import { session } from '@/db/schema/auth';
import type { Place } from '@/lib/schema/common';
import { listAudit, type AuditRow } from './audit';
import { listHouses } from './house';
import { listInvitations } from './invitation';
import { listKeys, type KeyRow } from './key';
import { listMembers } from './member';

export interface PeoplePage {
  /** Of the first house: a holding has none of its own. */
  zone: string;
  members: { id: string; userId: string; name: string; email: string; role: string; since: number }[];
  /** Null to whom it is not to be shown. */
  invitations: { id: string; email: string; role: string; expiresAt: number }[] | null;
  keys: KeyRow[] | null;
  audit: { items: AuditRow[]; next: string | null } | null;
}

export async function readPeople(
  holding: Holding,
  ask: { people: boolean; keys: boolean; audit: boolean; auditCursor: Place | undefined },
  now: Date,
): Promise<PeoplePage> {
  const members = await listMembers(holding);
  const invitations = ask.people ? await listInvitations(holding, now) : null;
  return {
    zone: (await listHouses(holding))[0]?.zone ?? 'UTC',
    members: members.map((row) => ({ ...row, since: row.since.getTime() })),
    invitations:
      invitations?.map(({ id, email, role, expiresAt }) => ({
        ...{ id, email, role },
        expiresAt: expiresAt.getTime(),
      })) ?? null,
    keys: ask.keys ? await listKeys(holding) : null,
    audit: ask.audit ? await listAudit(holding, { limit: 50, cursor: ask.auditCursor }) : null,
  };
}

export interface OpenSession {
  id: string;
  createdAt: number;
  address: string | null;
  device: string | null;
}

/** A person's sessions that have not run out, newest first. They are the person's, in whichever holding. */
export async function listSessions(userId: string, now: Date): Promise<OpenSession[]> {
  const rows = await everyHolding()
    .select({
      id: session.id,
      createdAt: session.createdAt,
      address: session.ipAddress,
      device: session.userAgent,
    })
    .from(session)
    .where(and(eq(session.userId, userId), gt(session.expiresAt, now)))
    .orderBy(desc(session.createdAt));
  return rows.map((row) => ({ ...row, createdAt: row.createdAt.getTime() }));
}
