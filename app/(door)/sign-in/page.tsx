import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { SignInForm } from '@/components/door/sign-in-form';
import { ownPath } from '@/lib/server/own-path';
import { viewer } from '@/lib/server/next-session';

export const metadata: Metadata = { title: 'Sign in' };

export default async function SignInPage({
  searchParams,
}: {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  const { next, email, changed } = await searchParams;
  const to = ownPath(next);
  if ((await viewer()) !== null) redirect(to);
  return (
    <SignInForm
      to={to}
      email={typeof email === 'string' ? email : ''}
      isPasswordNew={changed !== undefined}
    />
  );
}
