'use client';
import { createContext, use } from 'react';
import { useFormContext, type FieldPath, type RegisterOptions, type UseFormReturn } from 'react-hook-form';
import type { StatePoint } from '@/lib/schema/house-state';
import type { Point } from '@/lib/schema/yard-view';
import type { Preferences } from '@/lib/units/preferences';
import type { RuleNames } from '@/lib/wording/rule-names';
import type { FactOf } from './conditions/condition-text';
import type { ClockFacts } from './conditions/present';
import type { RuleForm } from './form-values';

/** What every part of the editor needs beside the form. */
export interface EditorFacts {
  points: Point[];
  now: StatePoint[];
  clock: ClockFacts;
  factOf: FactOf;
  names: RuleNames;
  preferences: Preferences;
  mayWrite: boolean;
}
const Facts = createContext<EditorFacts | null>(null);
export const EditorFactsProvider = Facts.Provider;

export function useFacts(): EditorFacts {
  const facts = use(Facts);
  if (facts === null) throw new Error('a part of the rule editor stands outside it');
  return facts;
}

/** The form, and the error of a field by its dotted name. */
export function useRuleForm() {
  const form: UseFormReturn<RuleForm> = useFormContext<RuleForm>();
  const errors: unknown = form.formState.errors;
  const errorOf = (path: string) => {
    let at = errors;
    for (const key of [...path.split('.'), 'message'])
      at = typeof at === 'object' && at !== null ? Reflect.get(at, key) : undefined;
    return typeof at === 'string' ? at : undefined;
  };
  // the library fills fields when its script runs; the page's first paint must show them filled already
  const register = (name: FieldPath<RuleForm>, options?: RegisterOptions<RuleForm>) => {
    const value: unknown = form.getValues(name);
    return {
      ...form.register(name, options),
      ...(typeof value === 'boolean'
        ? { defaultChecked: value }
        : { defaultValue: typeof value === 'string' ? value : '' }),
    };
  };
  return { ...form, register, errorOf };
}
