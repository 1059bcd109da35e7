'use client';
import { useWatch } from 'react-hook-form';
import { NumberField, Select, TextField } from '@/components/ui/field';
import { useRuleForm } from './context';
import { HOWS } from './day-time';

type Name = `band.${number}.from` | 'hoursFrom' | 'hoursTo';

/** A time of the day: by the clock of the house, or so long before or after the sun rises or sets there. */
export function DayTimeField({ name, label }: { name: Name; label: string }) {
  const form = useRuleForm();
  const how = useWatch({ control: form.control, name: `${name}.how` });
  const error = form.errorOf(name);
  return (
    <div className="grid min-w-0 grow grid-cols-2 items-start gap-2">
      <Select label={label} {...form.register(`${name}.how`)}>
        {Object.entries(HOWS).map(([value, words]) => (
          <option key={value} value={value}>
            {words}
          </option>
        ))}
      </Select>
      {how === 'clock' ? (
        <TextField
          key="clock"
          label={
            <>
              <span className="sr-only">{label}: </span>time
            </>
          }
          error={error}
          {...form.register(`${name}.clock`)}
        />
      ) : (
        <NumberField
          key="away"
          label={
            <>
              <span className="sr-only">{label}: </span>by how much
            </>
          }
          unit="min"
          error={error}
          {...form.register(`${name}.away`)}
        />
      )}
    </div>
  );
}
