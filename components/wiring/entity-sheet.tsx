'use client';
import { useRouter } from 'next/navigation';
import { useState, type ReactNode } from 'react';
import type { UseFormReturn } from 'react-hook-form';
import type { z } from 'zod';
import { Dialog } from '@/components/ui/dialog';
import { say } from '@/components/ui/toast';
import type { Preferences } from '@/lib/units/preferences';
import { SheetFoot } from './sheet-foot';
import type { Group } from './spec';
import { SpecFields } from './spec-fields';
import { useSpecForm } from './use-spec-form';

export interface EntitySheetProps {
  title: string;
  note?: ReactNode;
  groups: Group[];
  schema: () => Promise<z.ZodType>;
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
  beside?: (form: UseFormReturn) => ReactNode;
}

/** A form for one thing of the yard, in a sheet. Refusals stand at their fields; what was typed stays. */
export function EntitySheet(props: EntitySheetProps) {
  const { groups, preferences } = props;
  const router = useRouter();
  const [isLeaving, setLeaving] = useState(false);
  const { form, submit, failure } = useSpecForm({
    ...props,
    onAnswer: (answer) => {
      router.refresh();
      say(props.done);
      if (props.onAnswer?.(answer) !== true) props.onClose();
    },
  });
  const { isDirty, isSubmitting } = form.formState;

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
      <form noValidate onSubmit={submit} className="flex flex-col gap-4">
        <SpecFields groups={groups} form={form} preferences={preferences} />
        {props.beside?.(form)}
        <p role="alert" className="font-semibold text-alarm empty:hidden">
          {failure}
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
