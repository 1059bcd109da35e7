'use client';
import dynamic from 'next/dynamic';
import { useRouter } from 'next/navigation';
import { useMemo, useState } from 'react';
import { FormProvider, useForm, type FieldPath } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { Panel } from '@/components/ui/panel';
import { Sentence } from '@/components/ui/sentence';
import { say } from '@/components/ui/toast';
import { useAwake } from '@/components/ui/use-awake';
import type { StatePoint } from '@/lib/schema/house-state';
import type { RuleWithVersions } from '@/lib/schema/rule-view';
import type { Point } from '@/lib/schema/yard-view';
import type { Preferences } from '@/lib/units/preferences';
import { ruleSentence } from '@/lib/wording/rule';
import { ruleChanges } from '@/lib/wording/rule-changes';
import type { RetireFacts } from '@/lib/wording/rule-retire';
import type { RuleNames } from '@/lib/wording/rule-names';
import { BandNight, type DrawnNight } from './band-night';
import { BandSection } from './band-section';
import { EditorFactsProvider } from './context';
import { Findings } from './findings';
import { fitsForm, formOf, type RuleForm } from './form-values';
import type { ClockFacts } from './condition';
import { OnlySection } from './only-section';
import { KeepRule } from './keep-rule';
import { RestSection, type SourceFacts } from './rest-section';
import { judgeNow, ruleResolver, useFindings, useTypedBody } from './use-judged';
import { useRuleActions } from './use-rule-actions';
import { useLeaveWarning } from './use-leave-warning';
import { Versions } from './versions';
import { WhenSection } from './when-section';

const ForceDialog = dynamic(() => import('./force-dialog').then((module) => module.ForceDialog));
const LeaveDialog = dynamic(() => import('./leave-dialog').then((module) => module.LeaveDialog));

export interface RuleEditorData {
  rule: RuleWithVersions;
  points: Point[];
  pointStates: StatePoint[];
  names: RuleNames;
  channel: { label: string; isProved: boolean };
  source: SourceFacts | null;
  clock: ClockFacts;
  night: DrawnNight | null;
  zone: string;
  now: number;
  preferences: Preferences;
  mayWrite: boolean;
  house: string;
  retiring: RetireFacts;
}

/** A rule as a form: its sentence on top and its effect at the right change as one types. */
export function RuleEditor({ data }: { data: RuleEditorData }) {
  const { rule, names, preferences, mayWrite } = data;
  const router = useRouter();
  const [isForcing, setForcing] = useState(false);
  const units = useMemo(() => new Map(data.points.map((point) => [point.key, point.unit])), [data.points]);
  const unitOf = (fact: string) => units.get(fact);
  const kept = fitsForm(rule.body.only) ? null : rule.body.only;
  const form = useForm<RuleForm>({
    defaultValues: formOf(rule.body, unitOf, preferences),
    resolver: ruleResolver(kept ?? null, unitOf, preferences),
  });
  const { isDirty, isSubmitting } = form.formState;
  const { body, isWhole } = useTypedBody(form, rule.body, kept ?? null, unitOf, preferences);
  const findings = useFindings(rule.id, body, mayWrite);
  const leave = useLeaveWarning(isDirty);
  const isAwake = useAwake();
  const draftNumber = rule.draft?.number ?? (rule.versions[0]?.number ?? 0) + 1;

  const { save, force, goBack, keep, failure } = useRuleActions({
    rule,
    form,
    draftNumber,
    bodyNow: () => judgeNow(form, kept ?? null, unitOf, preferences),
    valuesOf: (older) => formOf(older, unitOf, preferences),
  });
  const saveAndSay = async () => {
    if ((await save()).ok)
      say('The draft is saved. What is in force stays until you put the draft into force.');
  };

  return (
    <FormProvider {...form}>
      <EditorFactsProvider
        value={{ points: data.points, now: data.pointStates, names, preferences, mayWrite }}
      >
        <Sentence before={rule.name} phrases={ruleSentence(body, names, preferences)} />
        {isWhole ? null : (
          <p className="-mt-3 text-[0.95rem] text-warn">
            As it was before the field that cannot be read yet.
          </p>
        )}
        {mayWrite ? null : (
          <Notice tone="quiet" title="You can read this rule, not change it.">
            How warm the crop is kept is the grower’s to decide, so a grower or an owner writes rules and puts
            them into force.
          </Notice>
        )}
        {rule.retiredAt === null ? null : (
          <Notice tone="quiet" title="This rule is retired: nothing runs by it.">
            {mayWrite
              ? 'To bring it back, look at it and put it into force, or go back to an older version first.'
              : 'A grower or an owner can bring it back.'}
          </Notice>
        )}
        <div className="grid grid-cols-1 items-start gap-5 xl:grid-cols-[26rem_minmax(0,1fr)]">
          <form
            noValidate
            aria-label={`Rule ${rule.name}`}
            onSubmit={(event) => void form.handleSubmit(saveAndSay)(event)}
            className="min-w-0 rounded-lg border border-line bg-sheet"
          >
            <fieldset disabled={!mayWrite || !isAwake} className="min-w-0">
              <BandSection />
              <RestSection source={data.source} />
              <OnlySection kept={kept ?? null} clock={data.clock} />
              <WhenSection zone={data.zone} />
            </fieldset>
            {mayWrite ? (
              <div className="sticky bottom-14 flex flex-wrap items-center gap-2 rounded-b-lg border-t border-line bg-sheet p-4 lg:bottom-0">
                <Button
                  kind="primary"
                  disabled={!isAwake}
                  onClick={() => void form.handleSubmit(() => setForcing(true))()}
                >
                  Put into force…
                </Button>
                <Button type="submit" disabled={!isAwake} busy={isSubmitting}>
                  Save draft
                </Button>
                <p role="status" className="text-[0.9rem] text-soft">
                  {isDirty ? 'Not saved yet' : ''}
                </p>
                <p role="alert" className="w-full font-semibold text-alarm empty:hidden">
                  {failure}
                </p>
              </div>
            ) : null}
          </form>
          <div className="flex min-w-0 flex-col gap-5">
            {data.night === null ? null : (
              <Panel title="The band on a night" note={data.night.title}>
                <BandNight night={data.night} body={body} preferences={preferences} />
              </Panel>
            )}
            <Findings findings={findings} onGo={(field) => form.setFocus(field as FieldPath<RuleForm>)} />
            <Versions
              versions={rule.versions}
              names={names}
              preferences={preferences}
              zone={data.zone}
              now={data.now}
              mayWrite={mayWrite}
              onGoBack={goBack}
            />
            {mayWrite ? (
              <KeepRule rule={rule} house={data.house} retiring={data.retiring} onKeep={keep} />
            ) : null}
          </div>
        </div>
        {isForcing ? (
          <ForceDialog
            body={body}
            names={names}
            preferences={preferences}
            changes={rule.inForce === null ? null : ruleChanges(rule.inForce.body, body, names, preferences)}
            version={draftNumber}
            channelLabel={data.channel.label}
            isProved={data.channel.isProved}
            onForce={force}
            onClose={() => setForcing(false)}
          />
        ) : null}
        {leave.wanted === null ? null : (
          <LeaveDialog
            onStay={leave.stay}
            onLeave={() => {
              const to = leave.wanted ?? '/';
              form.reset(form.getValues());
              router.push(to);
            }}
            onSave={async () => {
              const to = leave.wanted ?? '/';
              const answer = await save();
              if (answer.ok) router.push(to);
              return answer.ok ? null : answer.message;
            }}
          />
        )}
      </EditorFactsProvider>
    </FormProvider>
  );
}
