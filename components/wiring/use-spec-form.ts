'use client';
import { useState, type SyntheticEvent } from 'react';
import {
  useForm,
  type FieldErrors,
  type FieldValues,
  type Resolver,
  type UseFormReturn,
} from 'react-hook-form';
import type { z } from 'zod';
import { send } from '@/components/ui/send';
import type { Preferences } from '@/lib/units/preferences';
import { bodyOf, issuesOf, nested, valuesOf, type Group } from './spec';

/** A form made of specs that sends itself. Refusals stand at their fields; what was typed stays. */
export function useSpecForm(ask: {
  groups: Group[];
  /** Asked for when it is needed: zod is a fifth of a page's script. */
  schema: () => Promise<z.ZodType>;
  entity: unknown;
  preferences: Preferences;
  method: 'POST' | 'PATCH';
  path: string;
  etag?: string | undefined;
  onAnswer: (answer: unknown) => void;
}): {
  form: UseFormReturn;
  submit: (event: SyntheticEvent) => void;
  failure: string | null;
} {
  const { groups, preferences } = ask;
  const [failure, setFailure] = useState<string | null>(null);
  const first = valuesOf(groups, ask.entity, preferences);
  const resolver: Resolver = async (values) => {
    const { body, errors } = bodyOf(groups, values, preferences, first);
    const judged = (await ask.schema()).safeParse(body);
    const all = { ...(judged.success ? {} : issuesOf(judged.error.issues, groups)), ...errors };
    return Object.keys(all).length === 0
      ? { values: body, errors: {} }
      : { values: {}, errors: nested(all) as FieldErrors };
  };
  const form = useForm({ defaultValues: first, resolver });

  async function give(body: FieldValues) {
    setFailure(null);
    const answer = await send(ask.method, ask.path, body, ask.etag);
    if (answer.ok) return ask.onAnswer(answer.value);
    const refused = Object.entries(answer.fields).map(([path, message]) => ({
      path: path.split('.'),
      message,
    }));
    const shown = issuesOf(refused, groups);
    for (const [path, message] of Object.entries(shown))
      if (path !== '') form.setError(path, { type: 'said', message }, { shouldFocus: true });
    setFailure(shown[''] ?? answer.message);
  }

  const said = form.formState.errors.root?.message;
  return {
    form,
    submit: (event) => void form.handleSubmit(give)(event),
    failure: failure ?? (typeof said === 'string' && said !== '' ? said : null),
  };
}
