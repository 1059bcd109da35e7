import Link from 'next/link';
import { Notice } from '@/components/ui/notice';
import type { RuleWithVersions } from '@/lib/schema/rule-view';
import type { Preferences } from '@/lib/units/preferences';
import { moment } from '@/lib/units/time';

/** What somebody has to know of this rule before reading on: that it is retired, whose copy it is, that they may not write. */
export function EditorNotices({
  rule,
  mayWrite,
  now,
  zone,
  preferences,
}: {
  rule: RuleWithVersions;
  mayWrite: boolean;
  now: number;
  zone: string;
  preferences: Preferences;
}) {
  const { retired, copiedFrom } = rule;
  return (
    <>
      {mayWrite ? null : (
        <Notice tone="quiet" title="You can read this rule, not change it.">
          How warm the crop is kept is the grower’s to decide, so a grower or an owner writes rules and puts
          them into force.
        </Notice>
      )}
      {retired === null ? null : (
        <Notice tone="quiet" title="This rule is retired: nothing runs by it.">
          <p>
            {retired.by === null ? 'Retired' : `${retired.by} retired it`}{' '}
            {moment(Date.parse(retired.at), now, zone, preferences)}
            {retired.why === null ? '.' : `: “${retired.why}”`}
          </p>
          <p>
            {mayWrite
              ? 'Bring a version back below: it comes as a draft, and nothing runs by it until you put it into force.'
              : 'A grower or an owner can bring it back.'}
          </p>
        </Notice>
      )}
      {copiedFrom === null ? null : (
        <p className="-mt-3 text-[0.95rem] text-soft">
          Began as a copy of version {copiedFrom.version} of{' '}
          <Link
            href={`/${copiedFrom.house}/rules/${copiedFrom.rule}`}
            className="underline underline-offset-4"
          >
            {copiedFrom.name}
          </Link>
          .
        </p>
      )}
    </>
  );
}
