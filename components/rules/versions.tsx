'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Panel } from '@/components/ui/panel';
import type { RuleVersion } from '@/lib/schema/rule-view';
import type { Preferences } from '@/lib/units/preferences';
import { moment } from '@/lib/units/time';
import { changeWords, ruleChanges } from '@/lib/wording/rule-changes';
import type { RuleNames } from '@/lib/wording/rule-names';

const status = { draft: 'draft', 'in-force': 'in force', retired: 'retired' };

/** Versions, newest first: who, when, why, and what each changed. Going back makes an older one the draft. */
export function Versions({
  versions,
  names,
  preferences,
  zone,
  now,
  mayWrite,
  onGoBack,
}: {
  versions: RuleVersion[];
  names: RuleNames;
  preferences: Preferences;
  zone: string;
  now: number;
  mayWrite: boolean;
  onGoBack: (number: number) => Promise<string | null>;
}) {
  const [failure, setFailure] = useState<string | null>(null);
  const [busy, setBusy] = useState<number | null>(null);
  const goBack = async (number: number) => {
    setBusy(number);
    setFailure(await onGoBack(number));
    setBusy(null);
  };
  return (
    <Panel title="Versions">
      <ol className="divide-y divide-line border-t border-line">
        {versions.map((version, place) => {
          const before = versions[place + 1];
          const changes =
            before === undefined ? null : ruleChanges(before.body, version.body, names, preferences);
          const when = moment(Date.parse(version.forcedAt ?? version.draftedAt), now, zone, preferences);
          return (
            <li key={version.id} className="py-3">
              <p className="flex flex-wrap items-baseline justify-between gap-x-3">
                <strong>
                  {version.number} · {status[version.status]}
                </strong>
                <span className="text-[0.85rem] text-soft">
                  {version.by}, {when}
                </span>
              </p>
              {version.why === null ? null : <p className="text-[0.95rem]">“{version.why}”</p>}
              {changes === null ? null : (
                <ul className="text-[0.9rem] text-soft">
                  {changes.length === 0 ? <li>Says the same as version {before?.number}.</li> : null}
                  {changes.map((change) => (
                    <li key={`${change.path} ${change.label}`}>{changeWords(change)}</li>
                  ))}
                </ul>
              )}
              {mayWrite && version.status === 'retired' ? (
                <Button
                  kind="quiet"
                  className="-ml-4"
                  busy={busy === version.number}
                  onClick={() => void goBack(version.number)}
                >
                  Go back to version {version.number}
                </Button>
              ) : null}
            </li>
          );
        })}
      </ol>
      <p role="alert" className="font-semibold text-alarm empty:hidden">
        {failure}
      </p>
    </Panel>
  );
}
