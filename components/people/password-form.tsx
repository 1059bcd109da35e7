'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Checkbox } from '@/components/ui/check';
import { TextField } from '@/components/ui/field';
import { say } from '@/components/ui/toast';
import { authenticate } from './authenticate';

/** Asks for the present password, so that a phone left lying does not give the account away. */
export function PasswordForm() {
  const [current, setCurrent] = useState('');
  const [next, setNext] = useState('');
  const [elsewhere, setElsewhere] = useState(true);
  const [isShown, setShown] = useState(false);
  const [fields, setFields] = useState<Record<string, string>>({});
  const [failure, setFailure] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);

  async function change() {
    const wrong: Record<string, string> = {};
    if (current === '') wrong['currentPassword'] = 'Give the password that you use now.';
    // with zod inside, so not before it is asked for
    const { Password } = await import('@/lib/schema/people');
    const parsed = Password.safeParse(next);
    if (!parsed.success) wrong['newPassword'] = parsed.error.issues[0]?.message ?? 'Give another.';
    setFields(wrong);
    setFailure(null);
    if (Object.keys(wrong).length > 0) return;
    setBusy(true);
    const body = { currentPassword: current, newPassword: next, revokeOtherSessions: elsewhere };
    const refusal = await authenticate('change-password', body);
    setBusy(false);
    if (refusal !== null) {
      setFields(refusal.fields);
      return setFailure(refusal.message);
    }
    setCurrent('');
    setNext('');
    say(elsewhere ? 'It is changed, and you are signed out elsewhere.' : 'It is changed.');
  }

  const type = isShown ? 'text' : 'password';
  return (
    <form
      noValidate
      className="flex flex-col gap-3"
      onSubmit={(event) => {
        event.preventDefault();
        void change();
      }}
    >
      <TextField
        label="Password now"
        type={type}
        autoComplete="current-password"
        value={current}
        error={fields['currentPassword']}
        onChange={(event) => setCurrent(event.target.value)}
      />
      <TextField
        label="New password"
        type={type}
        autoComplete="new-password"
        hint="At least 15 characters; a few plain words will do."
        value={next}
        error={fields['newPassword']}
        onChange={(event) => setNext(event.target.value)}
      />
      <Checkbox
        label="Show what I type"
        checked={isShown}
        onChange={(event) => setShown(event.target.checked)}
      />
      <Checkbox
        label="Sign me out everywhere else"
        checked={elsewhere}
        onChange={(event) => setElsewhere(event.target.checked)}
      />
      <div className="flex flex-wrap gap-2">
        <Button type="submit" kind="primary" busy={isBusy}>
          Change password
        </Button>
        <p role="alert" className="w-full font-semibold text-alarm empty:hidden">
          {failure}
        </p>
      </div>
    </form>
  );
}
