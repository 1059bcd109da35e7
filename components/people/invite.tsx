'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { TextField } from '@/components/ui/field';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import type { RoleFacts } from '@/lib/wording/people';
import { RoleChoice } from './role-choice';

/** Asks somebody in by e-mail. The letter's link is good for seven days and for that address only. */
export function Invite({ roles, isMailHere }: { roles: RoleFacts[]; isMailHere: boolean }) {
  const router = useRouter();
  const [isOpen, setOpen] = useState(false);
  const [email, setEmail] = useState('');
  const [role, setRole] = useState(roles[1]?.role ?? roles[0]?.role ?? '');
  const [fields, setFields] = useState<Record<string, string>>({});
  const [failure, setFailure] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);

  async function invite() {
    const body = { email: email.trim(), role };
    // with zod inside, so not before it is asked for
    const { InvitationCreate } = await import('@/lib/schema/people');
    const parsed = InvitationCreate.safeParse(body);
    setFailure(null);
    setFields(Object.fromEntries(parsed.error?.issues.map((one) => [one.path.join('.'), one.message]) ?? []));
    if (!parsed.success) return;
    setBusy(true);
    const answer = await send('POST', '/invitations', body);
    setBusy(false);
    if (!answer.ok) {
      setFields(answer.fields);
      return setFailure(answer.message);
    }
    setOpen(false);
    setEmail('');
    say(`A letter is on its way to ${body.email}.`);
    router.refresh();
  }

  return (
    <>
      <Button kind="primary" onClick={() => setOpen(true)} aria-haspopup="dialog">
        Invite…
      </Button>
      <Dialog
        open={isOpen}
        onOpenChange={setOpen}
        title="Invite somebody"
        description={
          isMailHere
            ? 'No mail server is set up here, so the letter stays on this machine: read it under Letters.'
            : 'They get a letter with a link that is good for seven days.'
        }
      >
        <form
          noValidate
          className="flex flex-col gap-4"
          onSubmit={(event) => {
            event.preventDefault();
            void invite();
          }}
        >
          <TextField
            label="E-mail"
            type="email"
            inputMode="email"
            value={email}
            error={fields['email']}
            onChange={(event) => setEmail(event.target.value)}
          />
          <RoleChoice roles={roles} value={role} error={fields['role']} onChange={setRole} />
          <div className="flex flex-wrap gap-2">
            <Button type="submit" kind="primary" busy={isBusy}>
              Send the letter
            </Button>
            <Button onClick={() => setOpen(false)}>Leave as it is</Button>
            <p role="alert" className="w-full font-semibold text-alarm empty:hidden">
              {failure}
            </p>
          </div>
        </form>
      </Dialog>
    </>
  );
}
