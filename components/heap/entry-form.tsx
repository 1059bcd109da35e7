'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { useAppNow } from '@/components/ui/clock';
import { Field, NumberField, TextArea, control } from '@/components/ui/field';
import { SMELL_WORDS, SQUEEZE_WORDS } from '@/lib/wording/heap-senses';
import { draftOf, type EntryDraft } from './entry-draft';
import { saveEntry } from './entry-save';
import type { EntryTarget } from './entry-target';
import { MaterialFields } from './material-fields';
import { PhotoField } from './photo-field';
import { SenseButtons } from './sense-buttons';

const HAS_MATERIALS = ['built', 'fed'];
const HAS_WATER = ['built', 'fed', 'watered', 'turned'];
const HAS_VOLUME = ['built', 'fed', 'turned', 'note'];

/** Writes or amends one entry, with or without a line. Nothing typed is lost where it is refused. */
export function EntryForm({
  onDone,
  onLeave,
  ...target
}: EntryTarget & { onDone: (said: string) => void; onLeave: () => void }) {
  const { zone, kind, entry } = target;
  const now = useAppNow(60_000);
  const [draft, setDraft] = useState<EntryDraft>(() => draftOf(entry, now, zone));
  const [files, setFiles] = useState<File[]>([]);
  const [fields, setFields] = useState<Record<string, string>>({});
  const [failure, setFailure] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);
  const put = (change: Partial<EntryDraft>) => setDraft((before) => ({ ...before, ...change }));

  async function save() {
    setBusy(true);
    const saved = await saveEntry(target, draft, files, now);
    setBusy(false);
    setFields(saved.ok ? {} : saved.fields);
    setFailure(saved.ok ? null : saved.message);
    if (saved.ok) onDone(saved.said);
  }

  return (
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
        <MaterialFields rows={draft.materials} errors={fields} onChange={(materials) => put({ materials })} />
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
      <SenseButtons
        legend="Smell"
        hint="At an arm’s length, where the probe goes in."
        senses={SMELL_WORDS}
        value={draft.smell}
        onChoose={(smell) => put({ smell })}
      />
      <SenseButtons
        legend="Squeeze"
        hint="A fistful from a hand’s depth, pressed hard, in a glove."
        senses={SQUEEZE_WORDS}
        value={draft.squeeze}
        onChoose={(squeeze) => put({ squeeze })}
      />
      <TextArea
        label={kind === 'note' ? 'What you saw' : 'What was done, what you saw'}
        value={draft.text}
        error={fields['text']}
        onChange={(event) => put({ text: event.target.value })}
      />
      <PhotoField files={files} error={fields['photographs']} onChange={setFiles} />
      <div className="flex flex-wrap gap-2">
        <Button type="submit" kind="primary" busy={isBusy}>
          {entry === undefined ? 'Write it down' : 'Save'}
        </Button>
        <Button onClick={onLeave}>Leave as it is</Button>
        <p role="alert" className="w-full font-semibold text-alarm empty:hidden">
          {failure}
        </p>
      </div>
    </form>
  );
}
