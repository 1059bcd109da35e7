import type { Metadata } from 'next';
import { PeopleView } from '@/components/people/people-view';
import { inHolding } from '@/db/client';
import { readPeople } from '@/db/queries/people-page';
import { Cursor } from '@/lib/schema/common';
import { env } from '@/lib/server/env';
import { requireViewer } from '@/lib/server/next-session';
import { allowedTo, ROLES } from '@/lib/server/permissions';
import { shellFacts } from '@/lib/server/shell';

export const metadata: Metadata = { title: 'People' };

export default async function PeoplePage({
  searchParams,
}: {
  searchParams: Promise<{ before?: string | string[] }>;
}) {
  const { holdingId, holdingName, userId, allowed, ...rest } = await requireViewer();
  const { now, preferences } = await shellFacts({ holdingId, holdingName, userId, ...rest });
  const ask = {
    people: allowed.includes('people.manage'),
    keys: allowed.includes('key.manage'),
    audit: allowed.includes('audit.see'),
    auditCursor: Cursor.safeParse((await searchParams).before).data,
  };
  const { zone, ...data } = await inHolding(holdingId, (holding) => readPeople(holding, ask, new Date(now)));
  return (
    <PeopleView
      holding={holdingName}
      you={userId}
      data={data}
      roles={ROLES.map((role) => ({ role, actions: allowedTo(role) }))}
      isMailHere={env().SMTP_URL === undefined}
      now={now}
      zone={zone}
      preferences={preferences}
    />
  );
}
