'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { ConfirmDialog } from '@/components/ui/dialog';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import { EXCHANGE_WORDS } from '@/lib/wording/warm-hand';

interface Named {
  key: string;
  name: string;
}

/** Lets two points change places, after saying what that does: rules in force read the other probe from then on. */
export function ExchangeButton({
  house,
  one,
  other,
  onDone,
}: {
  house: string;
  one: Named;
  other: Named;
  onDone: () => void;
}) {
  const router = useRouter();
  const [open, setOpen] = useState(false);
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string>();
  async function exchange() {
    setBusy(true);
    const answer = await send('POST', `/houses/${house}/points/${one.key}/exchange`, { with: other.key });
    setBusy(false);
    if (!answer.ok) return setFailure(Object.values(answer.fields)[0] ?? answer.message);
    say(`${one.name} and ${other.name} have changed places.`);
    setOpen(false);
    onDone();
    router.refresh();
  }
  return (
    <>
      <Button onClick={() => setOpen(true)}>Exchange the two…</Button>
      <ConfirmDialog
        open={open}
        onOpenChange={setOpen}
        title={`Exchange ${one.name} and ${other.name}?`}
        description={EXCHANGE_WORDS}
        confirm="Exchange them"
        busy={busy}
        error={failure}
        onConfirm={() => void exchange()}
      />
    </>
  );
}
