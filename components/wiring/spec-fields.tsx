'use client';
import type { UseFormReturn } from 'react-hook-form';
import { Checkbox } from '@/components/ui/check';
import { classes } from '@/components/ui/classes';
import { NumberField, Select, TextArea, TextField } from '@/components/ui/field';
import { fieldUnit } from '@/lib/units/fields';
import type { Preferences } from '@/lib/units/preferences';
import { at, type Group, type Spec } from './spec';

interface Props {
  form: UseFormReturn;
  preferences: Preferences;
}

function SpecField({ spec, form, preferences }: Props & { spec: Spec }) {
  const said = at(form.formState.errors, `${spec.path}.message`);
  const common = {
    label: spec.label,
    hint: spec.hint,
    error: typeof said === 'string' ? said : undefined,
    ...form.register(spec.path),
  };
  switch (spec.as) {
    case 'check':
      return <Checkbox {...common} />;
    case 'choice':
      return (
        <Select {...common}>
          {spec.empty === undefined || spec.empty === 'refuse' ? (
            <option value="">Choose …</option>
          ) : (
            <option value="">{spec.none ?? 'None'}</option>
          )}
          {spec.options.map((option) => (
            <option key={option.value} value={option.value}>
              {option.label}
            </option>
          ))}
        </Select>
      );
    case 'number': {
      const unit = spec.unit ?? fieldUnit(spec.quantity, preferences);
      return <NumberField {...common} {...(unit === undefined ? {} : { unit })} />;
    }
    case 'text':
      return spec.long === true ? <TextArea {...common} /> : <TextField {...common} />;
  }
}

const grids = { 1: '', 2: 'sm:grid-cols-2', 3: 'sm:grid-cols-3' };

function GroupFields({ group, ...props }: Props & { group: Group }) {
  return (
    <div className={classes('grid grid-cols-1 items-start gap-3', grids[group.columns ?? 2])}>
      {group.specs.map((spec) => (
        <SpecField key={spec.path} spec={spec} {...props} />
      ))}
    </div>
  );
}

/** All groups of a form, each a fieldset with its note; what is folded opens by itself where an error waits inside. */
export function SpecFields({ groups, ...props }: Props & { groups: Group[] }) {
  return groups.map((group, place) => {
    const inside = (
      <>
        {group.note === undefined ? null : <p className="mb-2 text-[0.9rem] text-soft">{group.note}</p>}
        <GroupFields group={group} {...props} />
      </>
    );
    if (group.folded !== undefined) {
      const hasError = group.specs.some((spec) => at(props.form.formState.errors, spec.path) !== undefined);
      return (
        <details key={place} open={hasError || undefined} className="border-t border-line pt-2">
          <summary className="flex min-h-11 items-center font-semibold">{group.folded}</summary>
          <div className="pt-1">{inside}</div>
        </details>
      );
    }
    return (
      <fieldset key={place} className={place === 0 ? '' : 'border-t border-line pt-3'}>
        {group.title === undefined ? null : (
          <legend className="float-left mb-2 w-full font-semibold">{group.title}</legend>
        )}
        <div className="clear-both">{inside}</div>
      </fieldset>
    );
  });
}
