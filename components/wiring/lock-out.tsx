'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { TextArea } from '@/components/ui/field';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import { LOCKOUT_CAUTION, NC_LOCKOUT_REFUSAL } from '@/lib/wording/wiring-parts';

/** Locks a channel out for work at its load. Anybody of the holding may; why is asked, and shown to all. */
export function LockOutButton({
  house,
  channel,
  label,
  contact,
}: {
  house: string;
  channel: string;
  label: string;
  contact: 'NO' | 'NC';
}) {
  const router = useRouter();
  const [open, setOpen] = useState(false);
  const [why, setWhy] = useState('');
  const [busy, setBusy] = useState(false);
  const [error, setError] = useState<string>();
  const [failure, setFailure] = useState<string>();

  async function place() {
    if (why.trim() === '') return setError('Say why in a few words: whoever stands at the panel reads it.');
    setBusy(true);
    const answer = await send('POST', `/houses/${house}/lockouts`, { channel, why });
    setBusy(false);
    if (!answer.ok) {
      setError(answer.fields.why);
      return setFailure(answer.fields.why === undefined ? answer.message : undefined);
    }
    setOpen(false);
    setWhy('');
    router.refresh();
    say(`The ${label} is locked out.`);
  }

  return (
    <>
      <Button kind="quiet" onClick={() => setOpen(true)}>
        <span>
          Lock out<span className="sr-only"> the {label}</span>…
        </span>
      </Button>
      <Dialog
        open={open}
        onOpenChange={setOpen}
        title={contact === 'NC' ? `The ${label} cannot be locked out` : `Lock out the ${label}?`}
        description={
          contact === 'NC'
            ? NC_LOCKOUT_REFUSAL
            : 'Its coil drops at once and stays dropped, whatever rules, frost or hand ask for, until somebody who may removes the lock-out.'
        }
        actions={
          contact === 'NC' ? (
            <Button onClick={() => setOpen(false)}>Leave as it is</Button>
          ) : (
            <>
              <Button kind="primary" busy={busy} onClick={() => void place()}>
                Lock it out
              </Button>
              <Button onClick={() => setOpen(false)}>Leave as it is</Button>
              <p role="alert" className="w-full font-semibold text-alarm empty:hidden">
                {failure}
              </p>
            </>
          )
        }
      >
        {contact === 'NC' ? null : (
          <>
            <p className="text-[1.05rem] font-semibold text-warn">{LOCKOUT_CAUTION}</p>
            <TextArea
              label="Why"
              hint="Such as: new belt, Monday till noon."
              value={why}
              error={error}
              onChange={(event) => {
                setWhy(event.target.value);
                setError(undefined);
              }}
            />
          </>
        )}
      </Dialog>
    </>
  );
}
