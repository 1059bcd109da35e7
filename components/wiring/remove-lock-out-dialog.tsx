'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';

/** Gives a channel back. What it does next is up to its rules, so that is said first. */
export function RemoveLockOutDialog({
  house,
  id,
  label,
  open,
  onOpenChange,
}: {
  house: string;
  id: string;
  label: string;
  open: boolean;
  onOpenChange: (open: boolean) => void;
}) {
  const router = useRouter();
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string>();
  async function remove() {
    setBusy(true);
    const answer = await send('DELETE', `/houses/${house}/lockouts/${id}`);
    setBusy(false);
    if (!answer.ok) return setFailure(answer.message);
    onOpenChange(false);
    router.refresh();
    say(`The ${label} is given back to its rules.`);
  }
  return (
    <Dialog
      open={open}
      onOpenChange={onOpenChange}
      title={`Remove the lock-out of the ${label}?`}
      description="Its rules, frost help and hand may run it again from this moment. Look that nobody is at the load, that guards are on, and that the isolator is meant to be closed."
      actions={
        <>
          <Button kind="primary" busy={busy} onClick={() => void remove()}>
            Remove it
          </Button>
          <Button onClick={() => onOpenChange(false)}>Leave it locked out</Button>
          <p role="alert" className="w-full font-semibold text-alarm empty:hidden">
            {failure}
          </p>
        </>
      }
    />
  );
}
