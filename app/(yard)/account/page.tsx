import type { Metadata } from 'next';
import { cookies } from 'next/headers';
import { AccountView } from '@/components/people/account-view';
import { listMemberships } from '@/db/queries/people';
import { listSessions } from '@/db/queries/people-page';
import { requireViewer } from '@/lib/server/next-session';
import { allowedTo } from '@/lib/server/permissions';
import { shellFacts } from '@/lib/server/shell';

export const metadata: Metadata = { title: 'Account' };

export default async function AccountPage() {
  const viewer = await requireViewer();
  const { preferences } = await shellFacts(viewer);
  // sessions run on real time, not on the app's
  const sessions = await listSessions(viewer.userId, new Date());
  const theme = (await cookies()).get('theme')?.value;
  return (
    <AccountView
      person={viewer}
      role={{ role: viewer.role, actions: allowedTo(viewer.role) }}
      sessions={sessions}
      holdings={await listMemberships(viewer.userId)}
      theme={theme === 'light' || theme === 'dark' ? theme : 'system'}
      preferences={preferences}
    />
  );
}
