'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { useAppNow } from '@/components/ui/clock';
import { TextArea } from '@/components/ui/field';
import { degrees } from '@/lib/units/format';
import { RoundGrid } from './round-grid';
import { RoundKeys } from './round-keys';
import { gridOf, isWhole, judgeRound, keyOf, nextPlace, pressed, roundDraft } from './round-draft';
import type { RoundDraft } from './round-draft';
import { saveRound } from './round-save';
import type { RoundTarget } from './round-target';
import { SectionFields } from './section-fields';

/** A round place by place, with gloves: big keys, and the next place comes by itself. */
export function RoundForm({
  onDone,
  onLeave,
  ...target
}: RoundTarget & { onDone: (said: string) => void; onLeave: () => void }) {
  const { heap, preferences, round } = target;
  const now = useAppNow(60_000);
  const [draft, setDraft] = useState<RoundDraft>(() => roundDraft(target));
  const [fields, setFields] = useState<Record<string, string>>({});
  const [wrong, setWrong] = useState<string[]>([]);
  const [failure, setFailure] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);
  const grid = gridOf(draft.section);

  function press(key: string) {
    setDraft((before) => {
      const here = keyOf(before.place);
      const onward = nextPlace(before.place, gridOf(before.section)) ?? before.place;
      if (key === 'Next') return { ...before, place: onward };
      const text = pressed(before.typed[here] ?? '', key);
      const typed = { ...before.typed, [here]: text };
      // on by itself once its decimal is there, but not when one is taken away
      return { ...before, typed, place: key !== '⌫' && isWhole(text) ? onward : before.place };
    });
  }

  async function save() {
    const judged = judgeRound(draft, heap, preferences);
    setFields(judged.ok ? {} : judged.fields);
    setWrong(judged.ok ? [] : judged.places);
    setFailure(judged.ok ? null : judged.message);
    if (!judged.ok) return;
    setBusy(true);
    const saved = await saveRound(target, judged.body, now);
    setBusy(false);
    if (saved.ok) onDone(saved.said);
    else setFailure(saved.message);
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
      <RoundGrid
        grid={grid}
        draft={draft}
        wrong={wrong}
        unit={degrees(preferences)}
        onPlace={(place) => setDraft((before) => ({ ...before, place }))}
        onKey={press}
      />
      <RoundKeys onKey={press} />
      <SectionFields
        draft={draft.section}
        errors={fields}
        onChange={(section) => setDraft((before) => ({ ...before, section, place: { column: 0, row: 0 } }))}
      />
      <TextArea
        label="What you saw"
        value={draft.text}
        error={fields['text']}
        onChange={(event) => setDraft((before) => ({ ...before, text: event.target.value }))}
      />
      <div className="flex flex-wrap gap-2">
        <Button type="submit" kind="primary" busy={isBusy}>
          {round === undefined ? 'Write the round down' : 'Save'}
        </Button>
        <Button onClick={onLeave}>Leave as it is</Button>
        <p role="alert" className="w-full font-semibold text-alarm empty:hidden">
          {failure}
        </p>
      </div>
    </form>
  );
}
