'use client';
import Link from 'next/link';
import { useEffect } from 'react';
import { forgetBook } from '@/components/heap/book-facts';
import { Button } from '@/components/ui/button';
import { TextField } from '@/components/ui/field';
import { DoorSheet } from './door-frame';
import { Refused } from './refused';
import { text, useDoorForm } from './use-door-form';

export function SignInForm({
  to,
  email,
  isPasswordNew,
}: {
  to: string;
  email: string;
  isPasswordNew: boolean;
}) {
  // whoever comes in next finds nothing of whoever was here before
  useEffect(forgetBook, []);
  const { refusal, busy, onSubmit } = useDoorForm(
    '/auth/sign-in/email',
    (form) => ({ email: text(form, 'email').trim(), password: text(form, 'password') }),
    // a whole page load, so that the pages behind the door are rendered for who came in
    () => window.location.assign(to),
  );
  return (
    <DoorSheet title="Sign in">
      {isPasswordNew ? (
        <p role="status" className="mb-3">
          Your new password is set, and you were signed out everywhere. Sign in with it.
        </p>
      ) : null}
      <form method="post" onSubmit={onSubmit} className="flex flex-col gap-4">
        <TextField
          label="E-mail address"
          name="email"
          type="email"
          autoComplete="username"
          required
          defaultValue={email}
          error={refusal?.fields['email']}
        />
        <TextField
          label="Password"
          name="password"
          type="password"
          autoComplete="current-password"
          required
          error={refusal?.fields['password']}
        />
        <Refused refusal={refusal} />
        <Button type="submit" kind="primary" busy={busy}>
          Sign in
        </Button>
      </form>
      <p className="mt-4 text-[0.95rem]">
        <Link href="/forgot-password" className="underline underline-offset-4">
          I forgot my password
        </Link>
      </p>
      <p className="mt-2 text-[0.9rem] text-soft">
        There is no way to sign up: an owner of a holding invites you by e-mail.
      </p>
    </DoorSheet>
  );
}
