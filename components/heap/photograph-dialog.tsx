'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import type { Photograph } from '@/lib/schema/heap-view';

export function PhotographDialog({
  house,
  photograph: { id, width, height, by },
  label,
  mayWrite,
  onClose,
}: {
  house: string;
  photograph: Photograph;
  label: string;
  mayWrite: boolean;
  onClose: () => void;
}) {
  const router = useRouter();
  const [isSure, setSure] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  async function remove() {
    const answer = await send('DELETE', `/houses/${house}/photographs/${id}`);
    if (!answer.ok) return setFailure(answer.message);
    say('The photograph is out of the book.');
    router.refresh();
    onClose();
  }
  return (
    <Dialog
      open
      onOpenChange={(open) => (open ? undefined : onClose())}
      title={label}
      description={`Taken in by ${by}.`}
      as="sheet"
      actions={
        mayWrite ? (
          <>
            {isSure ? (
              <Button kind="alarm" onClick={() => void remove()}>
                Take it out for good
              </Button>
            ) : (
              <Button onClick={() => setSure(true)}>Take it out …</Button>
            )}
            <p role="alert" className="w-full font-semibold text-alarm empty:hidden">
              {failure}
            </p>
          </>
        ) : undefined
      }
    >
      <img
        src={`/api/v1/houses/${house}/photographs/${id}`}
        alt={label}
        width={width}
        height={height}
        className="h-auto w-full rounded-md"
      />
    </Dialog>
  );
}
