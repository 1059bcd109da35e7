'use client';
import { useMemo } from 'react';
import { useForm, type UseFormReturn } from 'react-hook-form';
import type { RuleBody } from '@/lib/control/rule-body';
import type { FactOf } from './conditions/condition-text';
import type { RuleEditorData } from './editor-data';
import type { RuleForm } from './form-values';
import { judgeNow, ruleResolver, useTypedBody } from './use-judged';

/** The form of a rule, and what stands in it as a body whenever it is one. */
export function useEditedRule({ rule, values, points, preferences }: RuleEditorData): {
  form: UseFormReturn<RuleForm>;
  factOf: FactOf;
  body: RuleBody;
  isWhole: boolean;
  bodyNow: () => Promise<RuleBody | null>;
  valuesOf: (body: RuleBody) => Promise<RuleForm>;
} {
  const factOf = useMemo<FactOf>(() => {
    const byKey = new Map(points.map(({ key, unit, role }) => [key, { unit, role }]));
    return (fact) => byKey.get(fact);
  }, [points]);
  const form = useForm<RuleForm>({
    defaultValues: values,
    resolver: ruleResolver(factOf, preferences),
  });
  const { body, isWhole } = useTypedBody(form, rule.body, factOf, preferences);
  return {
    ...{ form, factOf, body, isWhole },
    bodyNow: () => judgeNow(form, factOf, preferences),
    valuesOf: async (older) => (await import('./form-values')).formOf(older, factOf, preferences),
  };
}
