'use client';
import type { ReactNode } from 'react';
import { Button } from '@/components/ui/button';
import { BIG } from './big';
import { useProving } from './context';

/** Writes a step down that has nothing to be said of it but that it was done. */
export function DoneButton({
  step,
  children,
}: {
  step: 'rating' | 'photographs' | 'current' | 'gain';
  children: ReactNode;
}) {
  const { act, busy } = useProving();
  return (
    <Button kind="primary" className={BIG} busy={busy} onClick={() => void act('POST', 'steps', { step })}>
      {children}
    </Button>
  );
}
