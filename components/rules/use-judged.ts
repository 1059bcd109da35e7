'use client';
import { useEffect, useRef, useState } from 'react';
import type { FieldErrors, Resolver, UseFormReturn } from 'react-hook-form';
import { send } from '@/components/ui/send';
import type { RuleBody } from '@/lib/control/rule-body';
import type { Findings } from '@/lib/schema/rule-view';
import type { Preferences } from '@/lib/units/preferences';
import type { FactOf } from './conditions/condition-text';
import type { RuleForm } from './form-values';

const judgeModule = () => import('./judge');

export function ruleResolver(factOf: FactOf, preferences: Preferences): Resolver<RuleForm> {
  return async (form) => {
    const { judge } = await judgeModule();
    const { body, errors } = judge(form, factOf, preferences);
    if (body !== null) return { values: form, errors: {} };
    return { values: {}, errors: nested(errors) as FieldErrors<RuleForm> };
  };
}

/** What stands in the form at this moment, judged: a press may come before the last key's judgement. */
export async function judgeNow(
  form: UseFormReturn<RuleForm>,
  factOf: FactOf,
  preferences: Preferences,
): Promise<RuleBody | null> {
  const { judge } = await judgeModule();
  return judge(form.getValues(), factOf, preferences).body;
}

function nested(errors: Record<string, string>): Record<string, unknown> {
  const into: Record<string, unknown> = {};
  for (const [path, message] of Object.entries(errors)) {
    const keys = path.split('.');
    let at = into;
    for (const key of keys.slice(0, -1)) at = (at[key] ??= {}) as Record<string, unknown>;
    at[keys.at(-1) ?? path] = { type: 'said', message };
  }
  return into;
}

/** What is typed, as a body, as soon as it is one; until then the last that was. `isWhole` says which. */
export function useTypedBody(
  form: UseFormReturn<RuleForm>,
  first: RuleBody,
  factOf: FactOf,
  preferences: Preferences,
): { body: RuleBody; isWhole: boolean } {
  const [typed, setTyped] = useState({ body: first, isWhole: true });
  const { isSubmitted } = form.formState;
  const latest = useRef({ factOf, preferences, isSubmitted });
  latest.current = { factOf, preferences, isSubmitted };
  useEffect(() => {
    let isGone = false;
    const look = async () => {
      const { judge } = await judgeModule();
      const at = latest.current;
      // the library judges only the field that changed, but a band is judged by both its ends
      if (at.isSubmitted) void form.trigger();
      const { body } = judge(form.getValues(), at.factOf, at.preferences);
      if (!isGone)
        setTyped((before) =>
          body === null ? { body: before.body, isWhole: false } : { body, isWhole: true },
        );
    };
    const stop = form.subscribe({ formState: { values: true }, callback: () => void look() });
    return () => {
      isGone = true;
      stop();
    };
  }, [form]);
  return typed;
}

/** Things to look at in what is typed, asked a moment after the last key. Null until the first answer. */
export function useFindings(ruleId: string, body: RuleBody, isAllowed: boolean): Findings | null {
  const [findings, setFindings] = useState<Findings | null>(null);
  const text = JSON.stringify(body);
  useEffect(() => {
    if (!isAllowed) return;
    let isGone = false;
    const timer = setTimeout(() => {
      void send<Findings>('POST', `/rules/${ruleId}/check`, {
        body: JSON.parse(text) as unknown,
      }).then((answer) => {
        if (!isGone && answer.ok) setFindings(answer.value);
      });
    }, 700);
    return () => {
      isGone = true;
      clearTimeout(timer);
    };
  }, [ruleId, text, isAllowed]);
  return findings;
}
