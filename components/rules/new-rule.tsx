'use client';
import dynamic from 'next/dynamic';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import type { NewRuleProps } from './new-rule-dialog';

const NewRuleDialog = dynamic(() => import('./new-rule-dialog').then((module) => module.NewRuleDialog));

export function NewRule(props: NewRuleProps) {
  const [open, setOpen] = useState(false);
  return (
    <>
      <Button kind="primary" onClick={() => setOpen(true)}>
        New rule…
      </Button>
      {open ? <NewRuleDialog {...props} onClose={() => setOpen(false)} /> : null}
    </>
  );
}
