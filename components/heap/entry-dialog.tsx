'use client';
import { useRouter } from 'next/navigation';
import { Dialog } from '@/components/ui/dialog';
import { say } from '@/components/ui/toast';
import { kindWord } from '@/lib/wording/heap';
import { Cautions } from './cautions';
import { EntryForm } from './entry-form';
import type { EntryTarget } from './entry-target';

export function EntryDialog({ onClose, ...target }: EntryTarget & { onClose: () => void }) {
  const router = useRouter();
  const { kind, entry } = target;
  return (
    <Dialog
      open
      onOpenChange={(open) => (open ? undefined : onClose())}
      title={entry === undefined ? kindWord(kind) : `Amend: ${kindWord(kind).toLowerCase()}`}
      as="sheet"
      description={<Cautions kind={kind} />}
    >
      <EntryForm
        {...target}
        onLeave={onClose}
        onDone={(said) => {
          // without a line there is nothing new to show, and asking for it would lose the page
          if (navigator.onLine) router.refresh();
          say(said);
          onClose();
        }}
      />
    </Dialog>
  );
}
