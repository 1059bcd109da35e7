'use client';
import dynamic from 'next/dynamic';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Panel } from '@/components/ui/panel';
import type { RuleWithVersions } from '@/lib/schema/rule-view';
import type { RetireFacts } from '@/lib/wording/rule-retire';

const KeepDialog = dynamic(() => import('./keep-dialog').then((module) => module.KeepDialog));

export type Keeping = 'rename' | 'drop' | 'retire';

export interface KeepRuleProps {
  rule: RuleWithVersions;
  house: string;
  retiring: RetireFacts;
  /** Null where it went well, else why not. */
  onKeep: (method: 'PATCH' | 'POST' | 'DELETE', under: string, body?: object) => Promise<string | null>;
}

/** What is done to a rule as a whole: each asks first and says what will happen. */
export function KeepRule(props: KeepRuleProps) {
  const [doing, setDoing] = useState<Keeping | null>(null);
  const { rule } = props;
  return (
    <Panel title="This rule">
      <div className="flex flex-wrap gap-2">
        <Button onClick={() => setDoing('rename')}>Rename…</Button>
        {rule.draft === null ? null : <Button onClick={() => setDoing('drop')}>Throw the draft away…</Button>}
        {rule.retiredAt === null ? <Button onClick={() => setDoing('retire')}>Retire…</Button> : null}
      </div>
      {doing === null ? null : <KeepDialog {...props} doing={doing} onClose={() => setDoing(null)} />}
    </Panel>
  );
}
