'use client';
import { NumberField, Select, TextField } from '@/components/ui/field';
import { Checkbox } from '@/components/ui/check';
import { fieldUnit } from '@/lib/units/fields';
import { dayName, monthName } from '@/lib/wording/rule-when';
import { useFacts, useRuleForm } from '../context';
import { quantityOf } from './condition-text';
import type { DraftFact } from './draft-tree';
import { kindOf, takesList } from './fact-kinds';

/** The field that fits what a condition is about: a figure with its unit, a day or month by name, up or down. */
export function FactValue({
  leaf,
  path,
  name,
  onValue,
}: {
  leaf: DraftFact;
  /** Of the condition in the body. */
  path: string;
  name: string;
  onValue: (value: string) => void;
}) {
  const { factOf, preferences } = useFacts();
  const { errorOf } = useRuleForm();
  const point = factOf(leaf.fact);
  const kind = kindOf(leaf.fact, point?.role);
  const many = takesList(leaf.operator);
  const field = {
    label: `${name}: value`,
    labelHidden: true,
    name: `${path}.value`,
    value: leaf.value,
    error: errorOf(`${path}.value`),
    onChange: (event: { target: { value: string } }) => onValue(event.target.value),
  };
  if (kind === 'sun' || kind === 'contact') {
    const choices = kind === 'sun' ? { true: 'up', false: 'down' } : { 1: 'on', 0: 'off' };
    return (
      <Select {...field}>
        {Object.entries(choices).map(([value, words]) => (
          <option key={value} value={value}>
            {words}
          </option>
        ))}
      </Select>
    );
  }
  if (kind === 'month' || kind === 'weekday') {
    const word = kind === 'month' ? monthName : dayName;
    const all = Array.from({ length: kind === 'month' ? 12 : 7 }, (_, place) => place + 1);
    if (many) return <Days all={all} word={word} leaf={leaf} field={field} onValue={onValue} />;
    return (
      <Select {...field}>
        <option value="">Choose …</option>
        {all.map((one) => (
          <option key={one} value={String(one)}>
            {word(one)}
          </option>
        ))}
      </Select>
    );
  }
  const unit = kind === 'hour' ? 'h' : (fieldUnit(quantityOf(point?.unit), preferences) ?? point?.unit);
  const withUnit = unit === undefined ? {} : { unit };
  return many ? (
    <TextField {...field} {...withUnit} hint="Several, with semicolons between." />
  ) : (
    <NumberField {...field} {...withUnit} />
  );
}

function Days({
  all,
  word,
  leaf,
  field,
  onValue,
}: {
  all: number[];
  word: (one: number) => string;
  leaf: DraftFact;
  field: { label: string; name: string; error: string | undefined };
  onValue: (value: string) => void;
}) {
  const chosen = new Set(leaf.value.split(/[;\s]+/).filter((one) => one !== ''));
  return (
    <fieldset className="col-span-2">
      <legend className="sr-only">{field.label}</legend>
      <div className="grid grid-cols-2 gap-x-3 sm:grid-cols-3">
        {all.map((one) => (
          <Checkbox
            key={one}
            name={field.name}
            label={word(one)}
            checked={chosen.has(String(one))}
            error={undefined}
            onChange={(event) => {
              const next = all.filter((other) =>
                other === one ? event.target.checked : chosen.has(String(other)),
              );
              onValue(next.join('; '));
            }}
          />
        ))}
      </div>
      {field.error === undefined ? null : (
        <p className="text-[0.9rem] font-semibold text-alarm">{field.error}</p>
      )}
    </fieldset>
  );
}
