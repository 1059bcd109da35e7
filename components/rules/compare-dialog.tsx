'use client';
import { useState } from 'react';
import { Dialog } from '@/components/ui/dialog';
import { Select } from '@/components/ui/field';
import type { RuleVersion } from '@/lib/schema/rule-view';
import type { Preferences } from '@/lib/units/preferences';
import { changeWords, ruleChanges } from '@/lib/wording/rule-changes';
import type { RuleNames } from '@/lib/wording/rule-names';

const status = { draft: 'draft', 'in-force': 'in force', retired: 'retired' };

/** Any two versions side by side, what differs in words. */
export function CompareDialog({
  versions,
  names,
  preferences,
  onClose,
}: {
  versions: RuleVersion[];
  names: RuleNames;
  preferences: Preferences;
  onClose: () => void;
}) {
  const [pair, setPair] = useState({
    before: (versions[1] ?? versions[0])?.number ?? 1,
    after: versions[0]?.number ?? 1,
  });
  const bodyOf = (number: number) => versions.find((version) => version.number === number)?.body;
  const [before, after] = [bodyOf(pair.before), bodyOf(pair.after)];
  const changes =
    before === undefined || after === undefined ? [] : ruleChanges(before, after, names, preferences);
  const choice = (which: 'before' | 'after', label: string) => (
    <Select
      label={label}
      value={pair[which]}
      onChange={(event) => setPair({ ...pair, [which]: Number(event.target.value) })}
    >
      {versions.map((version) => (
        <option key={version.id} value={version.number}>
          {version.number} · {status[version.status]}
        </option>
      ))}
    </Select>
  );
  return (
    <Dialog
      open
      as="sheet"
      onOpenChange={(open) => {
        if (!open) onClose();
      }}
      title="Compare two versions"
      description="What the second says otherwise than the first."
    >
      <div className="grid grid-cols-2 gap-3">
        {choice('before', 'From version')}
        {choice('after', 'to version')}
      </div>
      <div aria-live="polite">
        {changes.length === 0 ? (
          <p>
            {pair.before === pair.after
              ? 'Choose two different versions.'
              : `Version ${pair.after} says the same as version ${pair.before}.`}
          </p>
        ) : (
          <ul className="divide-y divide-line border-y border-line">
            {changes.map((change) => (
              <li key={`${change.path} ${change.label}`} className="py-2">
                {changeWords(change)}
              </li>
            ))}
          </ul>
        )}
      </div>
    </Dialog>
  );
}
