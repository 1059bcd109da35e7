import * as links from '@/db/queries/calendar-link';
import { calendarAddress } from '@/lib/server/calendar';
import { Problem } from '@/lib/server/errors';
import { serve } from '@/lib/server/guard';
import { createCalendarLink, listCalendarLinks } from '@/lib/server/operations/heap-year';
import { hashToken, newToken } from '@/lib/server/tokens';

export const GET = serve(listCalendarLinks, async ({ holding, caller }) => {
  const own = caller.userId === null ? [] : await links.listCalendarLinks(holding, caller.userId);
  return { body: { items: own.map(({ userId: _, ...link }) => link), next: null } };
});

export const POST = serve(createCalendarLink, async ({ holding, caller, now }) => {
  const { userId } = caller;
  if (userId === null) throw new Problem('conflict', { detail: 'Only a person has a calendar.' });
  const own = await links.listCalendarLinks(holding, userId);
  if (own.length >= 10) throw new Problem('conflict', { detail: 'You have ten links; end one first.' });
  const token = newToken();
  const link = await links.createCalendarLink(holding, { userId, hash: hashToken(token), now });
  return { status: 201, body: { ...link, address: calendarAddress(token) }, subject: caller.by };
});
