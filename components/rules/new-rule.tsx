'use client';
import dynamic from 'next/dynamic';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import type { Channel, Point, Source } from '@/lib/schema/yard-view';
import type { Preferences } from '@/lib/units/preferences';

const NewRuleDialog = dynamic(() => import('./new-rule-dialog').then((module) => module.NewRuleDialog));

export interface NewRuleProps {
  house: string;
  channels: Channel[];
  points: Point[];
  sources: Source[];
  preferences: Preferences;
}

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
