'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Checkbox } from '@/components/ui/check';
import { ConfirmDialog } from '@/components/ui/dialog';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';

/** What putting a house in service does, before it is done. */
export default function InServiceDialog({
  house,
  onClose,
}: {
  house: { slug: string; name: string };
  onClose: () => void;
}) {
  const router = useRouter();
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
    onClose();
    say(`${house.name} is in service.`);
    router.refresh();
  }

  return (
    <ConfirmDialog
      open
      onOpenChange={(isOpen) => {
        if (!isOpen) onClose();
      }}
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
  );
}
