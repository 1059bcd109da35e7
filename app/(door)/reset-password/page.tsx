import type { Metadata } from 'next';
import { ResetForm } from '@/components/door/reset-form';

export const metadata: Metadata = { title: 'A new password' };

export default async function ResetPage({
  searchParams,
}: {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  const { token } = await searchParams;
  return <ResetForm token={typeof token === 'string' ? token : null} />;
}
