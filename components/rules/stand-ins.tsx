'use client';
import { useFieldArray } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { NumberField, Select } from '@/components/ui/field';
import { degrees } from '@/lib/units/format';
import { useFacts, useRuleForm } from './context';
import { PointChoices } from './point-choices';

/** What the rule goes by while its own point cannot be trusted, in this order, each with what is added to it. */
export function StandIns() {
  const form = useRuleForm();
  const { preferences } = useFacts();
  const standIns = useFieldArray({ control: form.control, name: 'standIns' });
  return (
    <div className="flex flex-col gap-2">
      {standIns.fields.map((one, place) => (
        <div key={one.id} className="grid grid-cols-[1fr_7rem] items-start gap-2">
          <Select
            label={place === 0 ? 'If that fails' : 'If that fails too'}
            error={form.errorOf(`standIns.${place}.point`)}
            {...form.register(`standIns.${place}.point`)}
          >
            <PointChoices units={['Cel']} />
          </Select>
          <NumberField
            label="and add"
            unit={degrees(preferences)}
            error={form.errorOf(`standIns.${place}.offset`)}
            {...form.register(`standIns.${place}.offset`)}
          />
          <div className="col-span-2 -my-2 flex gap-2">
            {place === 0 ? null : (
              <Button kind="quiet" className="-ml-4" onClick={() => standIns.swap(place, place - 1)}>
                <span>
                  Ask it earlier<span className="sr-only">: stand-in {place + 1}</span>
                </span>
              </Button>
            )}
            <Button
              kind="quiet"
              className={place === 0 ? '-ml-4' : ''}
              onClick={() => standIns.remove(place)}
            >
              <span>
                Remove<span className="sr-only"> stand-in {place + 1}</span>
              </span>
            </Button>
          </div>
        </div>
      ))}
      {standIns.fields.length < 5 ? (
        <Button
          kind="quiet"
          className="-ml-4 self-start"
          onClick={() => standIns.append({ point: '', offset: '0' })}
        >
          {standIns.fields.length === 0 ? 'If that sensor fails? Add a stand-in' : 'Add another stand-in'}
        </Button>
      ) : null}
    </div>
  );
}
