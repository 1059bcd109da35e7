'use client';
import { useState } from 'react';
import { FormProvider, type FieldErrors } from 'react-hook-form';
import { Sentence } from '@/components/ui/sentence';
import { say } from '@/components/ui/toast';
import { useAwake } from '@/components/ui/use-awake';
import { ruleSentence } from '@/lib/wording/rule';
import { BandSection } from './band-section';
import { EditorFactsProvider } from './context';
import type { RuleEditorData, RuleEditorParts } from './editor-data';
import { EditorDialogs } from './editor-dialogs';
import { EditorFoot } from './editor-foot';
import { EditorSide } from './editor-side';
import { fieldOfPath, focusField } from './field-paths';
import type { RuleForm } from './form-values';
import { OnlySection } from './only-section';
import { RestSection } from './rest-section';
import { useFindings } from './use-judged';
import { useEditedRule } from './use-edited-rule';
import { useLeaveWarning } from './use-leave-warning';
import { useRuleActions } from './use-rule-actions';
import { VersionActsProvider } from './version-acts';
import { WhenSection } from './when-section';

/** A rule as a form: its sentence on top and its effect at the right change as one types. */
export function RuleEditor({ data, parts }: { data: RuleEditorData; parts: RuleEditorParts }) {
  const { rule, points, names, clock, preferences, mayWrite } = data;
  const [isForcing, setForcing] = useState(false);
  const [isBuilding, setBuilding] = useState(false);
  const { form, factOf, body, isWhole, bodyNow, valuesOf } = useEditedRule(data);
  const { isDirty, isSubmitting } = form.formState;
  const findings = useFindings(rule.id, body, mayWrite);
  const leave = useLeaveWarning(isDirty);
  const isAwake = useAwake();
  const draftNumber = rule.draft?.number ?? (rule.versions[0]?.number ?? 0) + 1;

  const goTo = (path: string) => {
    if (path === 'only' || path.startsWith('only.')) setBuilding(true);
    focusField(fieldOfPath(path));
  };
  const actions = useRuleActions({ rule, form, draftNumber, bodyNow, valuesOf, onGo: goTo });
  const saveAndSay = async () => {
    if ((await actions.save()).ok)
      say('The draft is saved. What is in force stays until you put the draft into force.');
  };
  // the library knows the fields that it registered; a condition's are the builder's own
  const onInvalid = (errors: FieldErrors<RuleForm>) => {
    if (Object.keys(errors).every((name) => name === 'only')) goTo('only');
  };

  return (
    <FormProvider {...form}>
      <EditorFactsProvider
        value={{ ...{ points, names, clock, factOf, preferences, mayWrite }, now: data.pointStates }}
      >
        <Sentence before={rule.name} phrases={ruleSentence(body, names, preferences)} />
        {isWhole ? null : (
          <p className="-mt-3 text-[0.95rem] text-warn">
            As it was before the field that cannot be read yet.
          </p>
        )}
        {parts.notices}
        <div className="grid grid-cols-1 items-start gap-5 xl:grid-cols-[26rem_minmax(0,1fr)]">
          <form
            noValidate
            aria-label={`Rule ${rule.name}`}
            onSubmit={(event) => void form.handleSubmit(saveAndSay, onInvalid)(event)}
            className="min-w-0 rounded-lg border border-line bg-sheet"
          >
            <fieldset disabled={!mayWrite || !isAwake} className="min-w-0">
              <BandSection />
              <RestSection source={data.source} />
              <OnlySection
                reading={parts.conditions}
                isBuilding={isBuilding}
                onBuild={() => setBuilding(true)}
              />
              <WhenSection zone={data.zone} />
            </fieldset>
            {mayWrite ? (
              <EditorFoot
                {...{ isAwake, isSubmitting, isDirty }}
                failure={actions.failure}
                toLookAt={findings?.findings.length ?? 0}
                onForce={() => void form.handleSubmit(() => setForcing(true), onInvalid)()}
              />
            ) : null}
          </form>
          <VersionActsProvider
            value={{ rule, ...actions.going, goBack: (number) => void actions.goBack(number) }}
          >
            <EditorSide {...{ data, body, findings, actions }} versions={parts.versions} onGo={goTo} />
          </VersionActsProvider>
        </div>
        <EditorDialogs
          {...{ data, body, draftNumber, isForcing, actions, leave }}
          onForced={() => setForcing(false)}
          onThrowAway={() => form.reset(form.getValues())}
        />
      </EditorFactsProvider>
    </FormProvider>
  );
}
