'use client';
import dynamic from 'next/dynamic';
import { useState } from 'react';
import { Button } from '@/components/ui/button';

const DismissDialog = dynamic(() => import('./dismiss-dialog').then((module) => module.DismissDialog));

export interface DismissTarget {
  house: string;
  heap: string;
  title: string;
  evidence: { kind: string; mark: string; level: number };
}

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
