'use client';
import type { UseFormReturn } from 'react-hook-form';
import { Checkbox } from '@/components/ui/check';
import { classes } from '@/components/ui/classes';
import { NumberField, Select, TextArea, TextField } from '@/components/ui/field';
import { fieldUnit } from '@/lib/units/fields';
import type { Preferences } from '@/lib/units/preferences';
import { at, isAsked, sectionsOf, type Group, type Spec } from './spec';

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
      if (spec.long === true) return <TextArea {...common} />;
      return spec.secret === true ? (
        <TextField {...common} type="password" autoComplete="new-password" />
      ) : (
        <TextField {...common} />
      );
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

function Fields({ group, isFirst, ...props }: Props & { group: Group; isFirst: boolean }) {
  return (
    <fieldset className={isFirst ? '' : 'border-t border-line pt-3'}>
      {group.title === undefined ? null : (
        <legend className="float-left mb-2 w-full font-semibold">{group.title}</legend>
      )}
      <div className="clear-both">
        {group.note === undefined ? null : <p className="mb-2 text-[0.9rem] text-soft">{group.note}</p>}
        <GroupFields group={group} {...props} />
      </div>
    </fieldset>
  );
}

/** All groups of a form, each a fieldset with its note; what is folded opens by itself where an error waits inside. */
export function SpecFields({ groups, ...props }: Props & { groups: Group[] }) {
  const values = groups.some((group) => group.when !== undefined) ? props.form.watch() : undefined;
  const asked = groups.filter((group) => isAsked(group, values));
  return sectionsOf(asked).map((section, place) => {
    const name = section[0]?.folded;
    const fields = section.map((group, at) => (
      <Fields key={at} group={group} isFirst={at === 0 && (place === 0 || name !== undefined)} {...props} />
    ));
    if (name === undefined) return fields;
    const specs = section.flatMap((group) => group.specs);
    const hasError = specs.some((spec) => at(props.form.formState.errors, spec.path) !== undefined);
    return (
      <details key={name} open={hasError || undefined} className="border-t border-line pt-2">
        <summary className="flex min-h-11 items-center font-semibold">{name}</summary>
        <div className="flex flex-col gap-4 pt-1">{fields}</div>
      </details>
    );
  });
}
