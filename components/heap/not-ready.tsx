'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { ConfirmDialog } from '@/components/ui/dialog';
import { Notice } from '@/components/ui/notice';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import { temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { duration } from '@/lib/units/time';

/** A heap that control does not draw on yet, and somebody's word that it may. */
export function NotReady({
  house,
  heap,
  mayGive,
  preferences,
}: {
  house: string;
  heap: { slug: string; name: string; notReady: { level: number; forS: number } };
  mayGive: boolean;
  preferences: Preferences;
}) {
  const router = useRouter();
  const [isOpen, setOpen] = useState(false);
  const [isBusy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | undefined>();
  const { level, forS } = heap.notReady;

  async function give() {
    setBusy(true);
    const answer = await send('POST', `/houses/${house}/sources/${heap.slug}/ready`);
    setBusy(false);
    if (!answer.ok) return setFailure(answer.message);
    setOpen(false);
    say(`${heap.name} is taken as ready.`);
    router.refresh();
  }

  return (
    <>
      <Notice
        tone="warn"
        title="It is not drawn on yet"
        actions={mayGive ? <Button onClick={() => setOpen(true)}>Say that it is ready…</Button> : undefined}
      >
        Its core must first stay above {temperature(level, preferences)} for {duration(forS)}. By hand the fan
        runs all the same.
      </Notice>
      <ConfirmDialog
        open={isOpen}
        onOpenChange={setOpen}
        title={`Is ${heap.name} ready?`}
        description="A young heap that is drawn on before it is hot through cools and may not come back. Probe it in several places first. From your word on its rules draw on it, until it is built anew."
        confirm="It is ready"
        busy={isBusy}
        error={failure}
        onConfirm={() => void give()}
      />
    </>
  );
}
