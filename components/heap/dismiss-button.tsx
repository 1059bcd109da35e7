'use client';
import dynamic from 'next/dynamic';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import type { DismissTarget } from './dismiss-target';

const DismissDialog = dynamic(() => import('./dismiss-dialog').then((module) => module.DismissDialog));

export function DismissButton(target: DismissTarget) {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button onClick={() => setOpen(true)} aria-haspopup="dialog">
        Set aside …<span className="sr-only"> {target.title}</span>
      </Button>
      {isOpen ? <DismissDialog {...target} onClose={() => setOpen(false)} /> : null}
    </>
  );
}
