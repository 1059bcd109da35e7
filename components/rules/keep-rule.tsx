'use client';
import dynamic from 'next/dynamic';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Panel } from '@/components/ui/panel';
import type { Keeping, KeepRuleProps } from './keeping';

const KeepDialog = dynamic(() => import('./keep-dialog').then((module) => module.KeepDialog));
const CopyDialog = dynamic(() => import('./copy-dialog').then((module) => module.CopyDialog));

/** What is done to a rule as a whole: each asks first and says what will happen. */
export function KeepRule(props: KeepRuleProps) {
  const [doing, setDoing] = useState<Keeping | 'copy' | null>(null);
  const { rule } = props;
  return (
    <Panel title="This rule">
      <div className="flex flex-wrap gap-2">
        <Button onClick={() => setDoing('copy')}>Copy to another channel…</Button>
        <Button onClick={() => setDoing('rename')}>Rename…</Button>
        {rule.draft === null ? null : <Button onClick={() => setDoing('drop')}>Throw the draft away…</Button>}
        {rule.retiredAt === null ? <Button onClick={() => setDoing('retire')}>Retire…</Button> : null}
      </div>
      {doing === null ? null : doing === 'copy' ? (
        <CopyDialog {...props} onClose={() => setDoing(null)} />
      ) : (
        <KeepDialog {...props} doing={doing} onClose={() => setDoing(null)} />
      )}
    </Panel>
  );
}
