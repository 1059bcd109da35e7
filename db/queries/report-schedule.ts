/** Reports by mail: who gets which, and which letters have gone. */
import 'server-only';
import { and, asc, desc, eq, isNull, type SQL } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import type { z } from 'zod';
import type { Db, Holding } from '@/db/client';
import { reportSchedule, reportSent } from '@/db/schema/report';
import { house } from '@/db/schema/house';
import { ReportSchedule, type ReportScheduleCreate } from '@/lib/schema/report';
import { listMembers } from './member';
import { isId } from './reference';
import { Refusal } from './refusal';

async function select(holding: Holding, houseId: string, only?: SQL): Promise<ReportSchedule[]> {
  const rows = await holding.db
    .select()
    .from(reportSchedule)
    .where(
      and(
        eq(reportSchedule.holdingId, holding.id),
        eq(reportSchedule.houseId, houseId),
        isNull(reportSchedule.removedAt),
        only,
      ),
    )
    .orderBy(asc(reportSchedule.createdAt), asc(reportSchedule.id));
  return Promise.all(
    rows.map(async ({ id, span, sections, to, by, createdAt }) =>
      ReportSchedule.parse({
        ...{ id, span, sections, to, by, createdAt: createdAt.toISOString() },
        last: await lastSent(holding, id),
      }),
    ),
  );
}

async function lastSent(holding: Holding, scheduleId: string): Promise<ReportSchedule['last']> {
  const [row] = await holding.db
    .select()
    .from(reportSent)
    .where(and(eq(reportSent.holdingId, holding.id), eq(reportSent.scheduleId, scheduleId)))
    .orderBy(desc(reportSent.fromNight), desc(reportSent.claimedAt))
    .limit(1);
  if (row === undefined) return null;
  const { fromNight, toNight, sentAt } = row;
  return { fromNight, toNight, sentAt: sentAt?.toISOString() ?? null };
}

export function listReportSchedules(holding: Holding, houseId: string): Promise<ReportSchedule[]> {
  return select(holding, houseId);
}

export async function findReportSchedule(
  holding: Holding,
  houseId: string,
  id: string,
): Promise<ReportSchedule | null> {
  return isId(id) ? ((await select(holding, houseId, eq(reportSchedule.id, id)))[0] ?? null) : null;
}

/** Only to people of the holding: a report is not for everybody, and nobody is written to who never asked. */
export async function createReportSchedule(
  holding: Holding,
  houseId: string,
  given: z.infer<typeof ReportScheduleCreate>,
  act: { by: string; now: Date },
): Promise<ReportSchedule> {
  const members = new Set((await listMembers(holding)).map((row) => row.email.toLowerCase()));
  const to = [...new Set(given.to.map((one) => one.toLowerCase()))];
  to.forEach((one, i) => {
    if (!members.has(one)) throw new Refusal(`to.${i}`, 'Reports go to people of this holding only.');
  });
  const id = uuid();
  const { span, sections } = given;
  await holding.db.insert(reportSchedule).values({
    ...{ holdingId: holding.id, id, houseId, span, sections, to, by: act.by, createdAt: act.now },
  });
  const made = await findReportSchedule(holding, houseId, id);
  if (made === null) throw new Error('the schedule was written and did not come back');
  return made;
}

export async function removeReportSchedule(holding: Holding, id: string, now: Date): Promise<void> {
  await holding.db
    .update(reportSchedule)
    .set({ removedAt: now })
    .where(and(eq(reportSchedule.holdingId, holding.id), eq(reportSchedule.id, id)));
}

export interface DueSchedule {
  holdingId: string;
  houseId: string;
  zone: string;
  latitude: number;
  id: string;
  span: string;
  sections: string[];
  to: string[];
  createdAt: number;
}

/** Every schedule of every holding, for the worker. */
export async function everySchedule(db: Db): Promise<DueSchedule[]> {
  const rows = await db
    .select({ schedule: reportSchedule, zone: house.zone, latitude: house.latitude })
    .from(reportSchedule)
    .innerJoin(
      house,
      and(eq(house.holdingId, reportSchedule.holdingId), eq(house.id, reportSchedule.houseId)),
    )
    .where(and(isNull(reportSchedule.removedAt), isNull(house.removedAt)));
  return rows.map(({ schedule: { holdingId, houseId, id, span, sections, to, createdAt }, ...place }) => ({
    ...{ holdingId, houseId, id, span, sections, to, createdAt: createdAt.getTime(), ...place },
  }));
}

export interface LetterOfReport {
  scheduleId: string;
  fromNight: string;
  toNight: string;
  to: string;
}

/** Takes a letter to be sent. @returns false where it was taken before, by this worker or by another */
export async function claimLetter(holding: Holding, letter: LetterOfReport, now: Date): Promise<boolean> {
  const rows = await holding.db
    .insert(reportSent)
    .values({ holdingId: holding.id, ...letter, claimedAt: now })
    .onConflictDoNothing()
    .returning({ to: reportSent.to });
  return rows.length > 0;
}

const thisLetter = (holding: Holding, letter: LetterOfReport) =>
  and(
    eq(reportSent.holdingId, holding.id),
    eq(reportSent.scheduleId, letter.scheduleId),
    eq(reportSent.fromNight, letter.fromNight),
    eq(reportSent.to, letter.to),
  );

export async function letterWent(holding: Holding, letter: LetterOfReport, now: Date): Promise<void> {
  await holding.db.update(reportSent).set({ sentAt: now }).where(thisLetter(holding, letter));
}

/** The server did not take it: the next turn tries again. */
export async function giveLetterBack(holding: Holding, letter: LetterOfReport): Promise<void> {
  await holding.db.delete(reportSent).where(and(thisLetter(holding, letter), isNull(reportSent.sentAt)));
}
