'use client';
import Link from 'next/link';
import { Button } from '@/components/ui/button';
import { DoorSheet } from './door-frame';
import { NewPassword } from './new-password';
import { Refused } from './refused';
import { text, useDoorForm } from './use-door-form';

export function ResetForm({ token }: { token: string | null }) {
  const { refusal, busy, onSubmit } = useDoorForm(
    '/auth/reset-password',
    (form) => ({ token, newPassword: text(form, 'newPassword') }),
    () => window.location.assign('/sign-in?changed'),
  );
  if (token === null) {
    return (
      <DoorSheet title="This link is not whole">
        <p>
          Open it from the letter again, or{' '}
          <Link href="/forgot-password" className="underline underline-offset-4">
            ask for a new letter
          </Link>
          .
        </p>
      </DoorSheet>
    );
  }
  return (
    <DoorSheet title="Choose a new password">
      <form method="post" onSubmit={onSubmit} className="flex flex-col gap-4">
        <NewPassword name="newPassword" error={refusal?.fields['newPassword']} />
        <Refused refusal={refusal} />
        <Button type="submit" kind="primary" busy={busy}>
          Set it
        </Button>
      </form>
    </DoorSheet>
  );
}
