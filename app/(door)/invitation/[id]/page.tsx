import type { Metadata } from 'next';
import { Invitation } from '@/components/door/invitation';
import { invitationFor } from '@/lib/server/join';
import { viewer } from '@/lib/server/next-session';

export const metadata: Metadata = { title: 'Invitation' };

export default async function InvitationPage({
  params,
  searchParams,
}: {
  params: Promise<{ id: string }>;
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  const { token } = await searchParams;
  const given = typeof token === 'string' ? token : '';
  const email = (await viewer())?.email ?? null;
  return <Invitation facts={await invitationFor((await params).id, given, email)} />;
}
