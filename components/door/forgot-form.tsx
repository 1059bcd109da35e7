'use client';
import Link from 'next/link';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { TextField } from '@/components/ui/field';
import { DoorSheet } from './door-frame';
import { Refused } from './refused';
import { text, useDoorForm } from './use-door-form';

export function ForgotForm() {
  const [sentTo, setSentTo] = useState<string | null>(null);
  const { refusal, busy, onSubmit } = useDoorForm(
    '/auth/request-password-reset',
    (form) => ({ email: text(form, 'email').trim() }),
    (form) => setSentTo(text(form, 'email').trim()),
  );
  return (
    <DoorSheet title="A new password">
      {sentTo === null ? (
        <form method="post" onSubmit={onSubmit} className="flex flex-col gap-4">
          <TextField
            label="E-mail address"
            hint="A letter with a link goes there. The link is good for an hour."
            name="email"
            type="email"
            autoComplete="username"
            required
            error={refusal?.fields['email']}
          />
          <Refused refusal={refusal} />
          <Button type="submit" kind="primary" busy={busy}>
            Send the letter
          </Button>
        </form>
      ) : (
        <p role="status">
          If {sentTo} belongs to somebody here, a letter is on its way. Look among unwanted mail too; after a
          quarter of an hour, try again.
        </p>
      )}
      <p className="mt-4 text-[0.95rem]">
        <Link href="/sign-in" className="underline underline-offset-4">
          Back to sign in
        </Link>
      </p>
    </DoorSheet>
  );
}
