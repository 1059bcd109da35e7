import type { ReactNode } from 'react';
import type { RuleVersion } from '@/lib/schema/rule-view';
import type { Preferences } from '@/lib/units/preferences';
import { moment } from '@/lib/units/time';
import { changeWords, ruleChanges } from '@/lib/wording/rule-changes';
import type { RuleNames } from '@/lib/wording/rule-names';

const status = { draft: 'draft', 'in-force': 'in force', retired: 'retired' };

/** One version: who, when and why, what it changed, and how it ended. */
export function VersionItem({
  version,
  before,
  names,
  preferences,
  zone,
  now,
  children,
}: {
  version: RuleVersion;
  /** The version before it; undefined of the first. */
  before: RuleVersion | undefined;
  names: RuleNames;
  preferences: Preferences;
  zone: string;
  now: number;
  children: ReactNode;
}) {
  const at = (text: string) => moment(Date.parse(text), now, zone, preferences);
  const changes = before === undefined ? null : ruleChanges(before.body, version.body, names, preferences);
  // where another version took its place there is nothing to say: that one stands above
  const ending =
    version.endedAt === null || version.endedWhy === null
      ? null
      : `Retired${version.endedBy === null ? '' : ` by ${version.endedBy}`}, ${at(version.endedAt)}: “${version.endedWhy}”`;
  const never = version.status === 'retired' && version.forcedAt === null ? ', never in force' : '';
  return (
    <li className="py-3">
      <p className="flex flex-wrap items-baseline justify-between gap-x-3">
        <strong>
          {version.number} · {status[version.status]}
          {never}
        </strong>
        <span className="text-[0.85rem] text-soft">
          {version.by}, {at(version.forcedAt ?? version.draftedAt)}
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
      {version.unproved === null ? null : (
        <p className="text-[0.9rem] text-warn">
          On a channel that nobody had proved: accepted by {version.unproved.by}, {at(version.unproved.at)}
          {version.unproved.words === null ? '' : `, with the words “${version.unproved.words}”`}.
        </p>
      )}
      {ending === null ? null : <p className="text-[0.9rem] text-soft">{ending}</p>}
      {children}
    </li>
  );
}
