import * as links from '@/db/queries/calendar-link';
import { Problem } from '@/lib/server/errors';
import { serve } from '@/lib/server/guard';
import { revokeCalendarLink } from '@/lib/server/operations/heap-year';

export const DELETE = serve(revokeCalendarLink, async ({ holding, things, caller, now }) => {
  // another person's link is as absent as one that never was
  if (things.calendar.userId !== caller.userId) throw new Problem('not-found');
  await links.revokeCalendarLink(holding, things.calendar.id, now);
  return { subject: caller.by };
});
