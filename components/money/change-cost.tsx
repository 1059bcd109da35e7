'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import type { HeapCost } from '@/lib/schema/money';
import { CostForm } from './cost-form';

/** A cost that was entered wrong is written anew; what it said before stands in the audit log. */
export function ChangeCost({
  what,
  ...form
}: {
  /** Told to whoever does not see the row. */
  what: string;
  house: string;
  source: string;
  currency: string;
  today: string;
  cost: HeapCost;
}) {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button kind="quiet" aria-label={`Change ${what}`} onClick={() => setOpen(true)}>
        Change…
      </Button>
      <Dialog open={isOpen} onOpenChange={setOpen} title={`Change ${what}`}>
        <CostForm {...form} onDone={() => setOpen(false)} />
      </Dialog>
    </>
  );
}
