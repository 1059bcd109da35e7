'use client';
import { Button } from '@/components/ui/button';
import { TextField } from '@/components/ui/field';
import { NewPassword } from './new-password';
import { Refused } from './refused';
import { text, useDoorForm } from './use-door-form';

export function JoinForm({
  id,
  token,
  email,
  isNew,
}: {
  id: string;
  token: string;
  email: string;
  isNew: boolean;
}) {
  const { refusal, busy, onSubmit } = useDoorForm(
    `/v1/join/${id}`,
    (form) =>
      isNew ? { token, name: text(form, 'name').trim(), password: text(form, 'password') } : { token },
    () => window.location.assign(isNew ? `/sign-in?email=${encodeURIComponent(email)}` : '/'),
  );
  return (
    <form method="post" onSubmit={onSubmit} className="flex flex-col gap-4">
      {isNew ? (
        <>
          <TextField
            label="Your name"
            name="name"
            autoComplete="name"
            required
            maxLength={120}
            error={refusal?.fields['name']}
          />
          <NewPassword name="password" error={refusal?.fields['password']} />
        </>
      ) : null}
      <Refused refusal={refusal} />
      <Button type="submit" kind="primary" busy={busy}>
        Take it up
      </Button>
    </form>
  );
}
