'use client';
import { useRouter } from 'next/navigation';
import { useState, type ReactNode } from 'react';
import { useForm, type FieldErrors, type FieldValues, type Resolver } from 'react-hook-form';
import type { z } from 'zod';
import { Dialog } from '@/components/ui/dialog';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import type { Preferences } from '@/lib/units/preferences';
import { bodyOf, issuesOf, nested, valuesOf, type Group } from './spec';
import { SheetFoot } from './sheet-foot';
import { SpecFields } from './spec-fields';

export interface EntitySheetProps {
  title: string;
  note?: ReactNode;
  groups: Group[];
  schema: z.ZodType;
  /** Null: a new one. */
  entity: unknown;
  preferences: Preferences;
  method: 'POST' | 'PATCH';
  path: string;
  etag?: string | undefined;
  save: string;
  done: string;
  /** What happens when it is taken out of use; null: not from here. */
  removal: { word: string; what: string } | null;
  onClose: () => void;
  /** Takes the answer before the sheet closes: a node's token is in it. True keeps the sheet's place. */
  onAnswer?: (answer: unknown) => boolean;
  beside?: (form: ReturnType<typeof useForm<FieldValues>>) => ReactNode;
}

/** A form for one thing of the yard, in a sheet. Refusals stand at their fields; what was typed stays. */
export function EntitySheet(props: EntitySheetProps) {
  const { groups, preferences } = props;
  const router = useRouter();
  const [failure, setFailure] = useState<string | null>(null);
  const [isLeaving, setLeaving] = useState(false);
  const resolver: Resolver<FieldValues> = (values) => {
    const { body, errors } = bodyOf(groups, values, preferences);
    const judged = props.schema.safeParse(body);
    const all = { ...(judged.success ? {} : issuesOf(judged.error.issues, groups)), ...errors };
    return Object.keys(all).length === 0
      ? { values: body, errors: {} }
      : { values: {}, errors: nested(all) as FieldErrors<FieldValues> };
  };
  const form = useForm<FieldValues>({ defaultValues: valuesOf(groups, props.entity, preferences), resolver });
  const { isDirty, isSubmitting, errors } = form.formState;

  async function submit(body: FieldValues) {
    setFailure(null);
    const answer = await send(props.method, props.path, body, props.etag);
    if (answer.ok) {
      router.refresh();
      say(props.done);
      if (props.onAnswer?.(answer.value) !== true) props.onClose();
      return;
    }
    const shown = issuesOf(
      Object.entries(answer.fields).map(([path, message]) => ({ path: path.split('.'), message })),
      groups,
    );
    for (const [path, message] of Object.entries(shown))
      if (path !== '') form.setError(path, { type: 'said', message }, { shouldFocus: true });
    setFailure(shown[''] ?? answer.message);
  }

  return (
    <Dialog
      as="sheet"
      open
      title={props.title}
      {...(props.note === undefined ? {} : { description: props.note })}
      onOpenChange={(open) => {
        if (open) return;
        if (isDirty) setLeaving(true);
        else props.onClose();
      }}
    >
      <form
        noValidate
        onSubmit={(event) => void form.handleSubmit(submit)(event)}
        className="flex flex-col gap-4"
      >
        <SpecFields groups={groups} form={form} preferences={preferences} />
        {props.beside?.(form)}
        <p role="alert" className="font-semibold text-alarm empty:hidden">
          {failure ?? (errors.root?.message || null)}
        </p>
        <SheetFoot
          save={props.save}
          busy={isSubmitting}
          isDirty={isDirty}
          removal={props.removal}
          path={props.path}
          isLeaving={isLeaving}
          setLeaving={setLeaving}
          onClose={props.onClose}
        />
      </form>
    </Dialog>
  );
}
