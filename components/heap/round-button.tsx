'use client';
import { useState, type ComponentType } from 'react';
import { Button } from '@/components/ui/button';
import type { ButtonKind } from '@/components/ui/button-look';
import { offlineBook } from './offline-book-address';
import type { RoundTarget } from './round-target';

type Form = ComponentType<RoundTarget & { onClose: () => void }>;

/** As EntryButton: the form comes when it is asked for, or from the page that is kept on the device. */
export function RoundButton({ look = 'plain', ...target }: RoundTarget & { look?: ButtonKind }) {
  const [isOpen, setOpen] = useState(false);
  const [Form, setForm] = useState<Form | null>(null);
  function open() {
    setOpen(true);
    if (Form !== null) return;
    import('./round-dialog').then(
      (module) => setForm(() => module.RoundDialog),
      () => window.location.assign(offlineBook(target.house, target.heap)),
    );
  }
  return (
    <>
      <Button kind={look} onClick={open} aria-haspopup="dialog" className="shrink-0">
        {target.round === undefined ? 'Probe round …' : 'Amend'}
      </Button>
      {isOpen && Form !== null ? <Form {...target} onClose={() => setOpen(false)} /> : null}
    </>
  );
}
