import { Panel } from '@/components/ui/panel';
import type { RuleWithVersions } from '@/lib/schema/rule-view';
import type { Preferences } from '@/lib/units/preferences';
import type { RuleNames } from '@/lib/wording/rule-names';
import { Compare, GoBack, GoBackFailure } from './version-acts';
import { VersionItem } from './version-item';

/** Versions, newest first: who, when, why, and what each changed. Going back makes an older one the draft. */
export function Versions({
  rule,
  names,
  preferences,
  zone,
  now,
  mayWrite,
}: {
  rule: RuleWithVersions;
  names: RuleNames;
  preferences: Preferences;
  zone: string;
  now: number;
  mayWrite: boolean;
}) {
  const { versions } = rule;
  return (
    <Panel title="Versions" actions={versions.length < 2 ? undefined : <Compare />}>
      <ol className="divide-y divide-line border-t border-line">
        {versions.map((version, place) => (
          <VersionItem
            key={version.id}
            {...{ version, names, preferences, zone, now }}
            before={versions[place + 1]}
          >
            {mayWrite && version.status === 'retired' ? <GoBack number={version.number} /> : null}
          </VersionItem>
        ))}
      </ol>
      <GoBackFailure />
    </Panel>
  );
}
