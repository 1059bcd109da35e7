'use client';
import { useState, type ComponentType, type ReactNode } from 'react';
import { Button } from '@/components/ui/button';
import type { ButtonKind } from '@/components/ui/button-look';
import type { EntryTarget } from './entry-target';
import { offlineBook } from './offline-book-address';

type Form = ComponentType<EntryTarget & { onClose: () => void }>;

/**
 * The form and its schema come when they are asked for: most visits only read. Where the line is dead by then, the page
 * that is kept on the device has the same form.
 */
export function EntryButton({
  look = 'plain',
  children,
  ...target
}: EntryTarget & { look?: ButtonKind; children: ReactNode }) {
  const [isOpen, setOpen] = useState(false);
  const [Form, setForm] = useState<Form | null>(null);
  function open() {
    setOpen(true);
    if (Form !== null) return;
    import('./entry-dialog').then(
      (module) => setForm(() => module.EntryDialog),
      () => window.location.assign(offlineBook(target.house, target.heap)),
    );
  }
  return (
    <>
      <Button kind={look} onClick={open} aria-haspopup="dialog" className="shrink-0">
        {children}
      </Button>
      {isOpen && Form !== null ? <Form {...target} onClose={() => setOpen(false)} /> : null}
    </>
  );
}
