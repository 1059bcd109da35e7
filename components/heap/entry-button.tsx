'use client';
import dynamic from 'next/dynamic';
import { useState, type ReactNode } from 'react';
import { Button, type ButtonKind } from '@/components/ui/button';
import type { EntryTarget } from './entry-target';

/** The form and its schema come when they are asked for: most visits only read. */
const EntryDialog = dynamic(() => import('./entry-dialog').then((module) => module.EntryDialog));

export function EntryButton({
  look = 'plain',
  children,
  ...target
}: EntryTarget & { look?: ButtonKind; children: ReactNode }) {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button kind={look} onClick={() => setOpen(true)} aria-haspopup="dialog" className="shrink-0">
        {children}
      </Button>
      {isOpen ? <EntryDialog {...target} onClose={() => setOpen(false)} /> : null}
    </>
  );
}
