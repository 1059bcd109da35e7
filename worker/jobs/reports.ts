/**
 * Reports by mail. A letter is taken (a row, one a schedule, span and address) before it is sent: of two workers one takes
 * it. Where the program ends between taking and sending, the letter is not sent again, for nobody can know whether it
 * went; the page says so, and has the report. A letter that the server refuses is given back for the next turn.
 */
import { inHolding, type Db } from '@/db/client';
import { findHouse } from '@/db/queries/house';
import { refreshNights } from '@/db/queries/night-making';
import { listMembers } from '@/db/queries/member';
import { readPreferences } from '@/db/queries/preferences';
import { readReport } from '@/db/queries/report-page';
import {
  claimLetter,
  type DueSchedule,
  everySchedule,
  giveLetterBack,
  letterWent,
} from '@/db/queries/report-schedule';
import { nightNamed, nightOf } from '@/lib/analysis/night';
import { spanEnded } from '@/lib/analysis/report-span';
import { SECTIONS, SPANS } from '@/lib/schema/report';
import type { Letter } from '@/lib/server/mail';
import { reportLetter } from '@/lib/wording/report-letter';

/** After the last noon: readings that came late are in by then. */
const SETTLED_MS = 30 * 60_000;

export interface PostOfReports {
  db: Db;
  /** App time, epoch ms. */
  now: number;
  /** Of the app, without a slash at its end. */
  url: string;
  send: (letter: Letter) => Promise<void>;
}

/** Sends what is due. @returns how many letters went; throws the first refusal after all were tried */
export async function sendReports(post: PostOfReports): Promise<number> {
  let went = 0;
  const failures: unknown[] = [];
  for (const schedule of await everySchedule(post.db)) {
    for (const to of schedule.to) {
      try {
        if (await sendOne(post, schedule, to)) went += 1;
      } catch (error) {
        failures.push(error);
      }
    }
  }
  if (failures.length > 0) throw failures[0];
  return went;
}

async function sendOne(post: PostOfReports, schedule: DueSchedule, to: string): Promise<boolean> {
  const { holdingId, houseId, zone, latitude } = schedule;
  const span = SPANS.find((one) => one === schedule.span);
  if (span === undefined) return false;
  const told = spanEnded(span, nightOf(post.now - SETTLED_MS, zone).night, latitude);
  // what had ended before anybody asked for it is not sent
  if (nightNamed(told.to, zone).to <= schedule.createdAt) return false;
  const now = new Date(post.now);
  const key = { scheduleId: schedule.id, fromNight: told.from, toNight: told.to, to };
  const isTaken = await inHolding(holdingId, async (holding) => {
    // whoever has left the holding is told nothing any more
    const member = (await listMembers(holding)).find((row) => row.email.toLowerCase() === to);
    return member !== undefined && (await claimLetter(holding, key, now));
  });
  if (!isTaken) return false;
  try {
    const letter = await inHolding(holdingId, async (holding): Promise<Letter | null> => {
      const house = await findHouse(holding, houseId);
      const member = (await listMembers(holding)).find((row) => row.email.toLowerCase() === to);
      if (house === null || member === undefined) return null;
      // a letter cannot be sent again with the nights that were made after it
      await refreshNights(holding, houseId, post.now);
      const sections = SECTIONS.filter((one) => schedule.sections.includes(one));
      const ask = { span, night: told.from, sections };
      const report = await readReport(holding, house, ask, await readPreferences(member.userId), post.now);
      const query = new URLSearchParams({ span, night: told.from });
      for (const section of sections) query.append('section', section);
      const link = `${post.url}/${house.slug}/reports?${query.toString()}`;
      return { to, ...reportLetter(house.name, report.title, report.blocks, link) };
    });
    if (letter === null) return false;
    await post.send(letter);
  } catch (error) {
    await inHolding(holdingId, (holding) => giveLetterBack(holding, key));
    throw error;
  }
  await inHolding(holdingId, (holding) => letterWent(holding, key, now));
  return true;
}
