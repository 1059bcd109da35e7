'use client';
import { createContext, use } from 'react';
import { useFormContext, type UseFormReturn } from 'react-hook-form';
import type { StatePoint } from '@/lib/schema/house-state';
import type { Point } from '@/lib/schema/yard-view';
import type { Preferences } from '@/lib/units/preferences';
import type { RuleNames } from '@/lib/wording/rule-names';
import type { RuleForm } from './form-values';

/** What every part of the editor needs beside the form. */
export interface EditorFacts {
  points: Point[];
  now: StatePoint[];
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
export function useRuleForm(): UseFormReturn<RuleForm> & { errorOf: (path: string) => string | undefined } {
  const form = useFormContext<RuleForm>();
  const errors: unknown = form.formState.errors;
  const errorOf = (path: string) => {
    let at = errors;
    for (const key of [...path.split('.'), 'message'])
      at = typeof at === 'object' && at !== null ? Reflect.get(at, key) : undefined;
    return typeof at === 'string' ? at : undefined;
  };
  return { ...form, errorOf };
}
