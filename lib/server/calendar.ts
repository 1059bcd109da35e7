import 'server-only';
import ical, { ICalCalendarMethod, ICalEventTransparency } from 'ical-generator';
import { inHolding } from '@/db/client';
import { findLinkByHash, noteLinkUse } from '@/db/queries/calendar-link';
import { listJobsOfHolding, type CalendarJob } from '@/db/queries/heap-job';
import { appNow } from './app-clock';
import { env } from './env';
import { Problem } from './errors';
import { hashToken } from './tokens';

/** The address that a calendar is given: whoever has it reads the jobs, and nothing else. */
export function calendarAddress(token: string): string {
  return `${env().PUBLIC_URL}/api/v1/calendar/${token}.ics`;
}

/** @throws Problem `not-found` for a link that never was, was ended, or whose person left the holding */
export async function answerCalendar(feed: string): Promise<Response> {
  const link = await findLinkByHash(hashToken(feed.replace(/\.ics$/, '')));
  if (link === null) throw new Problem('not-found');
  const now = await appNow();
  const jobs = await inHolding(link.holdingId, async (holding) => {
    await noteLinkUse(holding, link.id, now);
    return listJobsOfHolding(holding);
  });
  return new Response(writeCalendar(jobs, env().PUBLIC_URL), {
    headers: {
      'content-type': 'text/calendar; charset=utf-8',
      'content-disposition': 'inline; filename="middenward.ics"',
      'cache-control': 'no-store',
    },
  });
}

/** RFC 5545. A job is an event of a whole day; what is done stays in it, marked, so that a calendar keeps its story. */
export function writeCalendar(jobs: readonly CalendarJob[], publicUrl: string): string {
  const calendar = ical({
    name: 'Middenward: the heap’s year',
    prodId: { company: 'Middenward', product: 'heap book', language: 'EN' },
    method: ICalCalendarMethod.PUBLISH,
    ttl: 6 * 3600,
  });
  for (const { job, house, heap, changedAt } of jobs) {
    const start = new Date(`${job.dueOn}T00:00:00Z`);
    calendar.createEvent({
      id: `${job.id}@middenward`,
      sequence: job.revision - 1,
      stamp: changedAt,
      lastModified: changedAt,
      // the end of a whole day is the day behind it
      ...{ start, end: new Date(start.getTime() + 86_400_000), allDay: true, timezone: null },
      summary: `${job.doneAt === null ? '' : 'Done: '}${job.title} (${heap})`,
      location: house.name,
      description: job.checklist.map((item) => `${item.doneAt === null ? '☐' : '☑'} ${item.text}`).join('\n'),
      url: `${publicUrl}/${house.slug}/heap-book?heap=${job.source}#jobs`,
      // a job does not make anybody busy all day
      transparency: ICalEventTransparency.TRANSPARENT,
    });
  }
  return calendar.toString();
}
