'use client';
import { NumberField, TextField } from '@/components/ui/field';
import type { SectionDraft } from './round-draft';

const NUMBERS: { name: keyof SectionDraft; label: string; unit?: string }[] = [
  { name: 'columns', label: 'Places across' },
  { name: 'rows', label: 'Places down' },
  { name: 'widthM', label: 'Width', unit: 'm' },
  { name: 'heightM', label: 'Height over ground', unit: 'm' },
  { name: 'sunkM', label: 'Sunk into the ground', unit: 'm' },
];

/** How large the section is and how it is divided; taken over from the last round, so mostly left alone. */
export function SectionFields({
  draft,
  errors,
  onChange,
}: {
  draft: SectionDraft;
  errors: Record<string, string>;
  onChange: (draft: SectionDraft) => void;
}) {
  const isWrong = [...NUMBERS.map((one) => one.name), 'left', 'right'].some(
    (name) => errors[name] !== undefined,
  );
  return (
    <details open={isWrong || undefined} className="rounded-lg border border-line px-3">
      <summary className="flex min-h-11 cursor-pointer items-center text-[0.95rem] text-soft underline underline-offset-4">
        The section: {draft.columns} × {draft.rows} places, {draft.widthM} m wide
      </summary>
      <div className="grid grid-cols-2 gap-3 pb-3">
        {NUMBERS.map(({ name, label, unit }) => (
          <NumberField
            key={name}
            label={label}
            {...(unit === undefined ? {} : { unit })}
            value={draft[name]}
            error={errors[name]}
            onChange={(event) => onChange({ ...draft, [name]: event.target.value })}
          />
        ))}
        <TextField
          label="At the left"
          value={draft.left}
          error={errors['left']}
          onChange={(event) => onChange({ ...draft, left: event.target.value })}
        />
        <TextField
          label="At the right"
          value={draft.right}
          error={errors['right']}
          onChange={(event) => onChange({ ...draft, right: event.target.value })}
        />
      </div>
    </details>
  );
}
