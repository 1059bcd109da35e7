'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Checkbox } from '@/components/ui/check';
import { ConfirmDialog } from '@/components/ui/dialog';
import { Notice } from '@/components/ui/notice';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';

/** Over every page of a house that came out of an archive, until it is put in service. */
export function LaidUp({ house, mayServe }: { house: { slug: string; name: string }; mayServe: boolean }) {
  const router = useRouter();
  const [isOpen, setOpen] = useState(false);
  const [isAccepted, setAccepted] = useState(false);
  const [isBusy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | undefined>();

  async function serve() {
    setBusy(true);
    const answer = await send('POST', `/houses/${house.slug}/in-service`, {
      ...(isAccepted ? { acceptUnproved: true } : {}),
    });
    setBusy(false);
    if (!answer.ok) return setFailure(answer.message);
    setOpen(false);
    say(`${house.name} is in service.`);
    router.refresh();
  }

  return (
    <div className="not-on-paper mb-5">
      <Notice
        tone="warn"
        title={`${house.name} is laid up: nothing drives it`}
        actions={
          mayServe ? (
            <Button
              onClick={() => {
                setFailure(undefined);
                setOpen(true);
              }}
            >
              Put it in service
            </Button>
          ) : undefined
        }
      >
        It came out of an archive. No relay moves, no alarm rings and no node is let in until{' '}
        {mayServe ? 'you put it in service.' : 'an owner puts it in service.'} What was recorded is here to be
        read.
      </Notice>
      <ConfirmDialog
        open={isOpen}
        onOpenChange={setOpen}
        title={`Put ${house.name} in service?`}
        description="From then on its rules in force decide again. Relays move as soon as a node calls with a new token: give that out on Wiring when whoever stands at the panel is ready. Nothing counts as proved since the house came in."
        confirm="Put it in service"
        kind="alarm"
        busy={isBusy}
        error={failure}
        onConfirm={() => void serve()}
      >
        <Checkbox
          label="Rules may drive channels that nobody has proved here"
          checked={isAccepted}
          onChange={(event) => setAccepted(event.target.checked)}
        />
      </ConfirmDialog>
    </div>
  );
}
