'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Checkbox } from '@/components/ui/check';
import { Field, control } from '@/components/ui/field';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import type { HeapJob } from '@/lib/schema/heap-job';

/** A tick is sent as it is made; what is not taken is shown as it stands on the server. */
export function JobChecklist({ house, job, mayWrite }: { house: string; job: HeapJob; mayWrite: boolean }) {
  const router = useRouter();
  const [isBusy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  async function change(method: 'PATCH' | 'DELETE', body?: object, said?: string) {
    setBusy(true);
    const answer = await send(method, `/houses/${house}/heap-jobs/${job.id}`, body, `"${job.revision}"`);
    setBusy(false);
    setFailure(answer.ok ? null : answer.message);
    if (answer.ok && said !== undefined) say(said);
    router.refresh();
  }
  const tick = (at: number) =>
    change('PATCH', {
      checklist: job.checklist.map((item, place) => ({
        text: item.text,
        done: place === at ? item.doneAt === null : item.doneAt !== null,
      })),
    });
  return (
    <div className="pb-3">
      {job.checklist.map((item, at) => (
        <Checkbox
          key={`${at} ${item.text}`}
          label={item.text}
          {...(item.doneBy === null ? {} : { hint: item.doneBy })}
          checked={item.doneAt !== null}
          disabled={!mayWrite || isBusy}
          onChange={() => void tick(at)}
        />
      ))}
      {mayWrite ? (
        <div className="mt-1 flex flex-wrap items-end gap-2">
          <Field label="Its day" className="w-44">
            {(links) => (
              <input
                type="date"
                className={control}
                defaultValue={job.dueOn}
                disabled={isBusy}
                // a day that is still being typed is no day yet
                onBlur={({ target: { value } }) =>
                  value !== '' && value !== job.dueOn
                    ? void change('PATCH', { dueOn: value }, 'Moved.')
                    : undefined
                }
                {...links}
              />
            )}
          </Field>
          <Button busy={isBusy} onClick={() => void change('PATCH', { done: true }, `Done: ${job.title}.`)}>
            Done
          </Button>
          <Button kind="quiet" disabled={isBusy} onClick={() => void change('DELETE', undefined, 'Dropped.')}>
            Drop this job
          </Button>
        </div>
      ) : null}
      <p role="alert" className="font-semibold text-alarm empty:hidden">
        {failure}
      </p>
    </div>
  );
}
