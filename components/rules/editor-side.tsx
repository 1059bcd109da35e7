'use client';
import { Panel } from '@/components/ui/panel';
import type { RuleBody } from '@/lib/control/rule-body';
import { BandNight } from './band-night';
import type { RuleEditorData } from './editor-data';
import { Findings } from './findings';
import { KeepRule } from './keep-rule';
import { useFindings } from './use-judged';
import type { RuleActions } from './use-rule-actions';
import { Versions } from './versions';

/** Beside the form: what the band would be on a night, things to look at, the versions, and the rule as a whole. */
export function EditorSide({
  data,
  body,
  actions,
  onGo,
}: {
  data: RuleEditorData;
  body: RuleBody;
  actions: RuleActions;
  onGo: (path: string) => void;
}) {
  const { rule, names, points, preferences, mayWrite, house } = data;
  const findings = useFindings(rule.id, body, mayWrite);
  return (
    <div className="flex min-w-0 flex-col gap-5">
      {data.night === null ? null : (
        <Panel title="The band on a night" note={data.night.title}>
          <BandNight night={data.night} body={body} preferences={preferences} />
        </Panel>
      )}
      <Findings told={findings} house={house} onGo={onGo} />
      <Versions
        {...{ rule, names, preferences, mayWrite }}
        zone={data.zone}
        now={data.now}
        onGoBack={actions.goBack}
      />
      {mayWrite ? (
        <KeepRule
          {...{ rule, house, points }}
          channel={data.channel}
          retiring={data.retiring}
          onKeep={actions.keep}
        />
      ) : null}
    </div>
  );
}
