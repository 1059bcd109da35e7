'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { useAppNow } from '@/components/ui/clock';
import { Dialog } from '@/components/ui/dialog';
import { Field, NumberField, TextArea, control } from '@/components/ui/field';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import { heapCautions, kindWord } from '@/lib/wording/heap';
import { draftOf, judge, type EntryDraft } from './entry-draft';
import type { EntryTarget } from './entry-target';
import { MaterialFields } from './material-fields';

const HAS_MATERIALS = ['built', 'fed'];
const HAS_WATER = ['built', 'fed', 'watered', 'turned'];
const HAS_VOLUME = ['built', 'fed', 'turned'];

/** Writes or amends one entry. Nothing typed is lost where it is refused. */
export function EntryDialog({ onClose, ...target }: EntryTarget & { onClose: () => void }) {
  const { house, heap, zone, kind, entry } = target;
  const router = useRouter();
  const now = useAppNow(60_000);
  const [draft, setDraft] = useState<EntryDraft>(() => draftOf(entry, now, zone));
  const [fields, setFields] = useState<Record<string, string>>({});
  const [failure, setFailure] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);
  const put = (change: Partial<EntryDraft>) => setDraft((before) => ({ ...before, ...change }));

  async function save() {
    const judged = judge(draft, { heap, kind, zone, isAmended: entry !== undefined }, now);
    setFields(judged.ok ? {} : judged.fields);
    setFailure(judged.ok ? null : 'One thing is not right yet; see the field.');
    if (!judged.ok) return;
    setBusy(true);
    const path = `/houses/${house}/heap-entries`;
    const answer = await (entry === undefined
      ? send('POST', path, judged.body)
      : send('PATCH', `${path}/${entry.id}`, judged.body, `"${entry.revision}"`));
    setBusy(false);
    if (!answer.ok) {
      setFields(answer.fields);
      setFailure(answer.message);
      return;
    }
    router.refresh();
    say(entry === undefined ? 'It stands in the book.' : 'The entry is amended.');
    onClose();
  }

  return (
    <Dialog
      open
      onOpenChange={(open) => (open ? undefined : onClose())}
      title={entry === undefined ? kindWord(kind) : `Amend: ${kindWord(kind).toLowerCase()}`}
      as="sheet"
      description={<Cautions kind={kind} />}
    >
      <form
        noValidate
        className="flex flex-col gap-4"
        onSubmit={(event) => {
          event.preventDefault();
          void save();
        }}
      >
        <Field label="When" error={fields['at']}>
          {(links) => (
            <input
              type="datetime-local"
              className={control}
              value={draft.at}
              onChange={(event) => put({ at: event.target.value })}
              {...links}
            />
          )}
        </Field>
        {HAS_MATERIALS.includes(kind) ? (
          <MaterialFields
            rows={draft.materials}
            errors={fields}
            onChange={(materials) => put({ materials })}
          />
        ) : null}
        {HAS_WATER.includes(kind) ? (
          <NumberField
            label="Water added"
            unit="L"
            value={draft.water}
            error={fields['litresOfWater']}
            onChange={(event) => put({ water: event.target.value })}
          />
        ) : null}
        {HAS_VOLUME.includes(kind) ? (
          <NumberField
            label="How large the heap is now"
            unit="m³"
            hint="Length × width × mean height is near enough."
            value={draft.volume}
            error={fields['volume']}
            onChange={(event) => put({ volume: event.target.value })}
          />
        ) : null}
        <TextArea
          label={kind === 'note' ? 'What you saw' : 'What was done, what you saw'}
          value={draft.text}
          error={fields['text']}
          onChange={(event) => put({ text: event.target.value })}
        />
        <div className="flex flex-wrap gap-2">
          <Button type="submit" kind="primary" busy={isBusy}>
            {entry === undefined ? 'Write it down' : 'Save'}
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

function Cautions({ kind }: { kind: EntryTarget['kind'] }) {
  const cautions = heapCautions(kind);
  if (cautions.length === 0) return <p>What was done and seen, kept with its time and your name.</p>;
  return (
    <ul className="flex list-disc flex-col gap-1 rounded-md border border-line border-l-4 border-l-warn py-2 pl-7 pr-3 text-[0.95rem]">
      {cautions.map((caution) => (
        <li key={caution}>{caution}</li>
      ))}
    </ul>
  );
}
