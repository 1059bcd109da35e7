'use client';
import dynamic from 'next/dynamic';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Panel } from '@/components/ui/panel';
import type { RuleWithVersions } from '@/lib/schema/rule-view';
import type { Preferences } from '@/lib/units/preferences';
import type { RuleNames } from '@/lib/wording/rule-names';
import { VersionItem } from './version-item';

const CompareDialog = dynamic(() => import('./compare-dialog').then((module) => module.CompareDialog));

/** Versions, newest first: who, when, why, and what each changed. Going back makes an older one the draft. */
export function Versions({
  rule,
  names,
  preferences,
  zone,
  now,
  mayWrite,
  onGoBack,
}: {
  rule: RuleWithVersions;
  names: RuleNames;
  preferences: Preferences;
  zone: string;
  now: number;
  mayWrite: boolean;
  onGoBack: (number: number) => Promise<string | null>;
}) {
  const { versions } = rule;
  const isRetired = rule.retiredAt !== null;
  const [failure, setFailure] = useState<string | null>(null);
  const [busy, setBusy] = useState<number | null>(null);
  const [isComparing, setComparing] = useState(false);
  const goBack = async (number: number) => {
    setBusy(number);
    setFailure(await onGoBack(number));
    setBusy(null);
  };
  return (
    <Panel
      title="Versions"
      actions={
        versions.length < 2 ? undefined : (
          <Button kind="quiet" className="-my-1" onClick={() => setComparing(true)}>
            Compare two…
          </Button>
        )
      }
    >
      <ol className="divide-y divide-line border-t border-line">
        {versions.map((version, place) => (
          <VersionItem
            key={version.id}
            {...{ version, names, preferences, zone, now }}
            before={versions[place + 1]}
          >
            {mayWrite && version.status === 'retired' ? (
              <Button
                kind="quiet"
                className="-ml-4"
                busy={busy === version.number}
                onClick={() => void goBack(version.number)}
              >
                {isRetired
                  ? `Bring version ${version.number} back as the draft`
                  : `Go back to version ${version.number}`}
              </Button>
            ) : null}
          </VersionItem>
        ))}
      </ol>
      <p role="alert" className="font-semibold text-alarm empty:hidden">
        {failure}
      </p>
      {isComparing ? (
        <CompareDialog {...{ versions, names, preferences }} onClose={() => setComparing(false)} />
      ) : null}
    </Panel>
  );
}
