'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { ConfirmDialog, Dialog } from '@/components/ui/dialog';
import { send, type Answer } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import { capital } from '@/lib/wording/counts';
import { roleSays, type RoleFacts } from '@/lib/wording/people';
import type { Member } from './member';
import { RoleChoice } from './role-choice';

/** Changes a person's role or takes them out, each after a question that says what will happen. */
export function MemberControls({
  member,
  roles,
  isYou,
}: {
  member: Member;
  roles: RoleFacts[];
  isYou: boolean;
}) {
  const router = useRouter();
  const [open, setOpen] = useState<'role' | 'remove' | null>(null);
  const [role, setRole] = useState(member.role);
  const [isBusy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | undefined>();

  function ask(what: 'role' | 'remove') {
    setRole(member.role);
    setFailure(undefined);
    setOpen(what);
  }

  async function act(answer: Promise<Answer<unknown>>, done: string) {
    setBusy(true);
    const told = await answer;
    setBusy(false);
    if (!told.ok) return setFailure(told.message);
    setOpen(null);
    say(done);
    router.refresh();
  }

  const path = `/people/${member.id}`;
  const close = (isOpen: boolean) => (isOpen ? undefined : setOpen(null));
  return (
    <div className="flex flex-wrap justify-end gap-2">
      <Button onClick={() => ask('role')}>
        Role…<span className="sr-only"> of {member.name}</span>
      </Button>
      <Button onClick={() => ask('remove')}>
        Remove…<span className="sr-only"> {member.name}</span>
      </Button>
      <Dialog
        open={open === 'role'}
        onOpenChange={close}
        title={`Role of ${member.name}`}
        description="It counts from now on, in pages that are open already too."
        actions={
          <>
            <Button
              kind="primary"
              busy={isBusy}
              disabled={role === member.role}
              onClick={() => void act(send('PATCH', path, { role }), `${member.name} is ${role} now.`)}
            >
              Change to {capital(role)}
            </Button>
            <Button onClick={() => setOpen(null)}>Leave as it is</Button>
            <p role="alert" className="w-full font-semibold text-alarm empty:hidden">
              {failure}
            </p>
          </>
        }
      >
        <RoleChoice roles={roles} value={role} onChange={setRole} />
      </Dialog>
      <ConfirmDialog
        open={open === 'remove'}
        onOpenChange={close}
        title={`Remove ${member.name}?`}
        description={
          isYou
            ? 'You lose sight of this holding at once. Another owner would have to invite you again.'
            : `${member.name} is signed out at once and sees this holding no more. What they did stays in the books under their name. ${roleSays(roles.find((one) => one.role === member.role) ?? { role: member.role, actions: [] })}`
        }
        confirm={isYou ? 'Remove me' : 'Remove'}
        kind="alarm"
        busy={isBusy}
        error={failure}
        onConfirm={() => void act(send('DELETE', path), `${member.name} is removed.`)}
      />
    </div>
  );
}
