import { and, eq, isNull, lt, or, sql } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { leader } from '@/db/schema/running';

/** Seconds of real time. Together with a relay's 30 s a takeover fits in one relay lease. */
export const LEASE_S = 15;

const ONLY = 1;

export interface Lead {
  epoch: number;
  /** Real time, epoch ms, of the last heartbeat of whoever led before; null where nobody has. */
  formerHeartbeatAt: number | null;
  /** Whoever led before gave its lead back: that nobody led since was meant so. */
  wasReleased: boolean;
}

export interface LeaderRow {
  holder: string | null;
  epoch: number;
  until: number;
  heartbeat: number;
  spool: number;
  lastStep: number | null;
}

const leaseEnd = sql`now() + make_interval(secs => ${LEASE_S})`;

/**
 * Takes the lead where it is free, run out, or held by this very instance before it was restarted. The epoch grows by one
 * each time, so nodes fence off whoever led before. Times are the database's own, so workers need not agree on one.
 * @returns null while another leads
 */
export async function takeLead(db: Db, instance: string): Promise<Lead | null> {
  return db.transaction(async (tx) => {
    const [former] = await tx.select().from(leader).where(eq(leader.id, ONLY)).for('update');
    const taken = { holder: instance, until: leaseEnd, heartbeat: sql`now()` };
    if (former === undefined) {
      const made = await tx
        .insert(leader)
        .values({ id: ONLY, epoch: 1, ...taken })
        .onConflictDoNothing()
        .returning({ epoch: leader.epoch });
      return made[0] === undefined
        ? null
        : { epoch: made[0].epoch, formerHeartbeatAt: null, wasReleased: true };
    }
    const free = or(isNull(leader.holder), lt(leader.until, sql`now()`), eq(leader.holder, instance));
    const [row] = await tx
      .update(leader)
      .set({ ...taken, epoch: sql`${leader.epoch} + 1` })
      .where(and(eq(leader.id, ONLY), free))
      .returning({ epoch: leader.epoch });
    if (row === undefined) return null;
    const wasReleased = former.holder === null;
    return { epoch: row.epoch, formerHeartbeatAt: former.heartbeat.getTime(), wasReleased };
  });
}

/**
 * Renews the lease, beats the heart, and tells of the newest step.
 * @param lastStepAt app time, epoch ms
 * @returns false where another leads by now. A lease that ran out while nobody took it is renewed like any other.
 */
export async function renewLead(
  db: Db,
  instance: string,
  epoch: number,
  lastStepAt: number | null,
): Promise<boolean> {
  const renewed = await db
    .update(leader)
    .set({
      until: leaseEnd,
      heartbeat: sql`now()`,
      ...(lastStepAt === null ? {} : { lastStep: new Date(lastStepAt) }),
    })
    .where(and(eq(leader.holder, instance), eq(leader.epoch, epoch)))
    .returning({ id: leader.id });
  return renewed.length === 1;
}

/**
 * Lifts this leader's epoch above one that a node has seen: after a restored backup the database knows too low a one.
 * @returns false where another leads by now
 */
export async function raiseEpoch(db: Db, instance: string, from: number, to: number): Promise<boolean> {
  const raised = await db
    .update(leader)
    .set({ epoch: to })
    .where(and(eq(leader.holder, instance), eq(leader.epoch, from)))
    .returning({ id: leader.id });
  return raised.length === 1;
}

/** Gives the lead back, so that a stand-by need not wait for the lease to run out. */
export async function releaseLead(db: Db, instance: string, epoch: number): Promise<void> {
  await db
    .update(leader)
    .set({ holder: null, until: sql`now()` })
    .where(and(eq(leader.holder, instance), eq(leader.epoch, epoch)));
}

export async function readLeader(db: Db): Promise<LeaderRow | null> {
  const [row] = await db.select().from(leader).where(eq(leader.id, ONLY));
  if (row === undefined) return null;
  return {
    holder: row.holder,
    epoch: row.epoch,
    until: row.until.getTime(),
    heartbeat: row.heartbeat.getTime(),
    spool: row.spool,
    lastStep: row.lastStep?.getTime() ?? null,
  };
}
