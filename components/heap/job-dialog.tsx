'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Field, TextArea, TextField, control } from '@/components/ui/field';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import type { JobTarget } from './job-target';

export function JobDialog({ house, heap, today, onClose }: JobTarget & { onClose: () => void }) {
  const router = useRouter();
  const [typed, setTyped] = useState({ title: '', dueOn: today, list: '' });
  const [errors, setErrors] = useState<Record<string, string>>({});
  const [failure, setFailure] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);
  async function save() {
    setBusy(true);
    const lines = typed.list.split('\n').filter((line) => line.trim() !== '');
    const answer = await send('POST', `/houses/${house}/heap-jobs`, {
      ...{ source: heap, title: typed.title, dueOn: typed.dueOn },
      checklist: lines.map((text) => ({ text })),
    });
    setBusy(false);
    if (!answer.ok) {
      setErrors(answer.fields);
      return setFailure(answer.message);
    }
    router.refresh();
    say('The job is set down.');
    onClose();
  }
  const listError = Object.entries(errors).find(([path]) => path.startsWith('checklist'))?.[1];
  return (
    <Dialog
      open
      onOpenChange={(open) => (open ? undefined : onClose())}
      title="A job for this heap"
      description="It stands in the calendar of whoever has a calendar link."
    >
      <form
        noValidate
        className="flex flex-col gap-4"
        onSubmit={(event) => {
          event.preventDefault();
          void save();
        }}
      >
        <TextField
          label="What"
          value={typed.title}
          error={errors['title']}
          onChange={(event) => setTyped({ ...typed, title: event.target.value })}
        />
        <Field label="When" error={errors['dueOn']}>
          {(links) => (
            <input
              type="date"
              className={control}
              value={typed.dueOn}
              onChange={(event) => setTyped({ ...typed, dueOn: event.target.value })}
              {...links}
            />
          )}
        </Field>
        <TextArea
          label="Its list"
          hint="A line for each thing to tick."
          value={typed.list}
          error={listError}
          onChange={(event) => setTyped({ ...typed, list: event.target.value })}
        />
        <div className="flex flex-wrap gap-2">
          <Button type="submit" kind="primary" busy={isBusy}>
            Set it down
          </Button>
          <Button onClick={onClose}>Leave as it is</Button>
          <p role="alert" className="w-full font-semibold text-alarm empty:hidden">
            {failure}
          </p>
        </div>
      </form>
    </Dialog>
  );
}
