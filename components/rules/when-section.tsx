'use client';
import { useWatch } from 'react-hook-form';
import { Checkbox } from '@/components/ui/check';
import { NumberField, Select } from '@/components/ui/field';
import { monthName } from '@/lib/wording/rule-when';
import { useRuleForm } from './context';
import { DayTimeField } from './day-time-field';
import { Section } from './section';

function DayOfYear({ which }: { which: 'From' | 'To' }) {
  const form = useRuleForm();
  const day = `season${which}Day` as const;
  const month = `season${which}Month` as const;
  return (
    <fieldset className="grid grid-cols-[4.5rem_1fr] items-start gap-2">
      <legend className="sr-only">Season {which === 'From' ? 'begins' : 'ends'}</legend>
      <NumberField
        label={which === 'From' ? 'From day' : 'To day'}
        inputMode="numeric"
        error={form.errorOf(day)}
        {...form.register(day)}
      />
      <Select label="month" error={form.errorOf(month)} {...form.register(month)}>
        {Array.from({ length: 12 }, (_, index) => (
          <option key={index} value={String(index + 1).padStart(2, '0')}>
            {monthName(index + 1)}
          </option>
        ))}
      </Select>
    </fieldset>
  );
}

/** Season and daily hours, in the zone of the house. Frost asks for neither. */
export function WhenSection({ zone }: { zone: string }) {
  const form = useRuleForm();
  const [isSeasonal, isDaily] = useWatch({ control: form.control, name: ['isSeasonal', 'isDaily'] });
  return (
    <Section title="When">
      <Checkbox label="Only in a season" {...form.register('isSeasonal')} />
      {isSeasonal ? (
        <div className="grid grid-cols-1 gap-3 sm:grid-cols-2">
          <DayOfYear which="From" />
          <DayOfYear which="To" />
        </div>
      ) : null}
      <Checkbox label="Only at some hours of the day" {...form.register('isDaily')} />
      {isDaily ? (
        <div className="flex flex-col gap-3">
          <DayTimeField name="hoursFrom" label="From" />
          <DayTimeField name="hoursTo" label="To" />
        </div>
      ) : null}
      {isSeasonal || isDaily ? (
        <p className="text-[0.85rem] text-soft">
          By the clock and the sun of {zone}; a season may run over new year, hours over midnight. Out of
          season or hours the band waits; frost help does not.
        </p>
      ) : null}
    </Section>
  );
}
