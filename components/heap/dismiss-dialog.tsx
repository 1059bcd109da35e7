'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { ConfirmDialog } from '@/components/ui/dialog';
import { TextArea } from '@/components/ui/field';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import type { DismissTarget } from './dismiss-target';

export function DismissDialog({
  house,
  heap,
  title,
  evidence,
  onClose,
}: DismissTarget & { onClose: () => void }) {
  const router = useRouter();
  const [why, setWhy] = useState('');
  const [failure, setFailure] = useState<{ field?: string | undefined; message?: string }>({});
  const [isBusy, setBusy] = useState(false);
  async function save() {
    setBusy(true);
    const answer = await send('POST', `/houses/${house}/heap-dismissals`, { source: heap, ...evidence, why });
    setBusy(false);
    if (!answer.ok) return setFailure({ field: answer.fields['why'], message: answer.message });
    router.refresh();
    say('Set aside. It comes back when its evidence is new or worse.');
    onClose();
  }
  return (
    <ConfirmDialog
      open
      onOpenChange={(open) => (open ? undefined : onClose())}
      title={title}
      description="Say why it is set aside. Your name and the reason stand beside it, and it comes back by itself when its evidence is new or worse."
      confirm="Set aside"
      busy={isBusy}
      error={failure.field === undefined ? failure.message : undefined}
      onConfirm={() => void save()}
    >
      <TextArea
        label="Why"
        value={why}
        error={failure.field}
        onChange={(event) => setWhy(event.target.value)}
      />
    </ConfirmDialog>
  );
}
