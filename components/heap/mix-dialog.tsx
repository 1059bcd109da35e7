'use client';
import { useState } from 'react';
import { Dialog } from '@/components/ui/dialog';
import { NumberField } from '@/components/ui/field';
import { Figures } from '@/components/ui/panel';
import { decimal, share } from '@/lib/units/format';
import { MaterialFields } from './material-fields';
import { MaterialPicker } from './material-picker';
import { mixDraft, reckon, type MixDraft, type MixStart } from './mix-draft';
import { OwnMaterials } from './own-materials';

/** Reckons while it is typed: nothing is sent, and nothing in the book is changed. */
export function MixDialog({ start, onClose }: { start: MixStart; onClose: () => void }) {
  const [draft, setDraft] = useState<MixDraft>(() => mixDraft(start));
  const put = (change: Partial<MixDraft>) => setDraft((before) => ({ ...before, ...change }));
  const { mix, words, errors } = reckon(draft, start.own);
  const rowErrors = Object.fromEntries(
    draft.rows.flatMap(({ id }, place) => {
      const error = errors[`row ${id}`];
      return error === undefined ? [] : [[`materials.${place}.kilograms`, error]];
    }),
  );
  const { cn, moisture } = mix.mix;
  return (
    <Dialog
      open
      onOpenChange={(open) => (open ? undefined : onClose())}
      title="Mix calculator"
      as="sheet"
      description="By the masses of carbon, nitrogen and water; volumes are made masses by loose density. Nothing here is written into the book."
    >
      <MaterialFields
        rows={draft.rows}
        errors={rowErrors}
        own={start.own}
        onChange={(rows) => put({ rows })}
      />
      <NumberField
        label="Water with it"
        unit="L"
        value={draft.water}
        error={errors['water']}
        onChange={(event) => put({ water: event.target.value })}
      />
      <Figures
        rows={[
          {
            name: 'Carbon to nitrogen',
            value: cn === null ? 'not known yet' : `${decimal(cn, 1)} : 1 ± ${decimal(mix.sd.cn ?? 0, 1)}`,
          },
          {
            name: 'Water',
            value: moisture === null ? 'not known yet' : `${share(moisture)} ± ${share(mix.sd.moisture)}`,
          },
          { name: 'Together', value: `${decimal(mix.mix.massKg, 0)} kg` },
          ...(mix.left.length === 0
            ? []
            : [{ name: 'Left out', value: mix.left.join(', '), note: 'amount or figures not known' }]),
        ]}
      />
      <fieldset className="flex flex-col gap-3">
        <legend className="pb-1 font-semibold">What to add</legend>
        <MaterialPicker
          label="Material"
          own={start.own}
          value={draft.adding}
          onChange={(adding) => put({ adding })}
        />
        <div className="grid grid-cols-2 gap-3">
          <NumberField
            label="Wanted C:N"
            unit=": 1"
            value={draft.cn}
            error={errors['cn']}
            onChange={(event) => put({ cn: event.target.value })}
          />
          <NumberField
            label="Wanted water"
            unit="%"
            value={draft.moisture}
            error={errors['moisture']}
            onChange={(event) => put({ moisture: event.target.value })}
          />
        </div>
        <ul aria-live="polite" className="flex list-disc flex-col gap-1 pl-5">
          {words.map((sentence) => (
            <li key={sentence}>{sentence}</li>
          ))}
        </ul>
      </fieldset>
      {start.mayWrite ? <OwnMaterials own={start.own} /> : null}
    </Dialog>
  );
}
