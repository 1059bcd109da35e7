'use client';
import { lazy, Suspense, useState } from 'react';
import { Button } from '@/components/ui/button';

// every page of every house carries this button's script, and few ever show it: its dialog comes when it is pressed
const InServiceDialog = lazy(() => import('./in-service-dialog'));

export function InServiceButton({ house }: { house: { slug: string; name: string } }) {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button onClick={() => setOpen(true)}>Put it in service</Button>
      <Suspense>{isOpen ? <InServiceDialog house={house} onClose={() => setOpen(false)} /> : null}</Suspense>
    </>
  );
}
