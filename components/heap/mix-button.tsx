'use client';
import dynamic from 'next/dynamic';
import { useState, type ReactNode } from 'react';
import { Button } from '@/components/ui/button';
import type { MixStart } from './mix-draft';

/** The table of materials comes with it, when it is asked for. */
const MixDialog = dynamic(() => import('./mix-dialog').then((module) => module.MixDialog));

export function MixButton({ start, children }: { start: MixStart; children: ReactNode }) {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button onClick={() => setOpen(true)} aria-haspopup="dialog">
        {children}
      </Button>
      {isOpen ? <MixDialog start={start} onClose={() => setOpen(false)} /> : null}
    </>
  );
}
