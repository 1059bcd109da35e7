'use client';
import dynamic from 'next/dynamic';
import type { ReactNode } from 'react';
import { Panel } from '@/components/ui/panel';
import type { RuleBody } from '@/lib/control/rule-body';
import type { Findings } from '@/lib/schema/rule-view';
import type { RuleEditorData } from './editor-data';
import type { DrawnNight } from './draw-night';
import { KeepRule } from './keep-rule';
import type { RuleActions } from './use-rule-actions';

// each comes with what it shows: the night's drawing after the form can be used, the findings with the first answer
const BandNight = dynamic(() => import('./band-night').then((module) => module.BandNight), { ssr: false });
const ToLookAt = dynamic(() => import('./findings').then((module) => module.Findings), { ssr: false });

/** Beside the form: what the band would be on a night, things to look at, the versions, and the rule as a whole. */
export function EditorSide({
  data,
  versions,
  body,
  findings,
  actions,
  onGo,
}: {
  data: RuleEditorData;
  versions: ReactNode;
  body: RuleBody;
  findings: Findings | null;
  actions: RuleActions;
  onGo: (path: string) => void;
}) {
  const { rule, points, preferences, mayWrite, house, night } = data;
  return (
    <div className="flex min-w-0 flex-col gap-5">
      {night === null ? null : (
        <Panel title="The band on a night" note={night.title}>
          <NightFrame night={night}>
            <BandNight {...{ night, body, preferences }} />
          </NightFrame>
        </Panel>
      )}
      {findings === null ? null : <ToLookAt told={findings} house={house} onGo={onGo} />}
      {versions}
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

/** Keeps the drawing's place, so that nothing jumps when it comes. */
function NightFrame({ night, children }: { night: DrawnNight; children: ReactNode }) {
  const shape = ({ frame, height }: DrawnNight['wide']) => ({ aspectRatio: `${frame.width} / ${height}` });
  return (
    <div className="@container grid *:[grid-area:1/1]">
      <div aria-hidden="true" className="hidden @[34rem]:block" style={shape(night.wide)} />
      <div aria-hidden="true" className="@[34rem]:hidden" style={shape(night.narrow)} />
      <div className="min-w-0">{children}</div>
    </div>
  );
}
