'use client';
import { useRouter } from 'next/navigation';
import { Dialog } from '@/components/ui/dialog';
import { say } from '@/components/ui/toast';
import { Cautions } from './cautions';
import { RoundForm } from './round-form';
import type { RoundTarget } from './round-target';

export function RoundDialog({ onClose, ...target }: RoundTarget & { onClose: () => void }) {
  const router = useRouter();
  return (
    <Dialog
      open
      onOpenChange={(open) => (open ? undefined : onClose())}
      title="Probe round"
      as="sheet"
      description={<Cautions kind="probed" />}
    >
      <RoundForm
        {...target}
        onLeave={onClose}
        onDone={(said) => {
          if (navigator.onLine) router.refresh();
          say(said);
          onClose();
        }}
      />
    </Dialog>
  );
}
