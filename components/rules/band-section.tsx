'use client';
import { useFieldArray, useWatch } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { NumberField, Select, TextField } from '@/components/ui/field';
import { degrees } from '@/lib/units/format';
import { BandSlider } from './band-slider';
import { useFacts, useRuleForm } from './context';
import { PointChoices } from './point-choices';
import { Section } from './section';

/** Where it is measured, what stands in, and the two thresholds, by periods of the day. */
export function BandSection() {
  const form = useRuleForm();
  const { preferences, now } = useFacts();
  const periods = useFieldArray({ control: form.control, name: 'band' });
  const [purpose, band, point] = useWatch({ control: form.control, name: ['purpose', 'band', 'point'] });
  const unit = degrees(preferences);
  const warm = purpose === 'warm';
  const value = now.find((one) => one.key === point && one.quality !== 'bad')?.value ?? null;
  const several = periods.fields.length > 1;
  return (
    <Section title="Band">
      <div className="grid grid-cols-2 gap-3">
        <Select label="It is for" {...form.register('purpose')}>
          <option value="warm">warming</option>
          <option value="cool">cooling</option>
        </Select>
        <Select label="Measured at" error={form.errorOf('point')} {...form.register('point')}>
          <PointChoices units={['Cel']} />
        </Select>
      </div>
      <StandIns />
      {periods.fields.map((period, place) => (
        <div key={period.id} className="border-t border-line pt-3 first:border-0">
          {several ? (
            <div className="mb-2 flex items-end gap-3">
              <TextField
                label="From"
                hint="A clock time, such as 22:00."
                className="w-40"
                error={form.errorOf(`band.${place}.from`)}
                {...form.register(`band.${place}.from`)}
              />
              <Button kind="quiet" onClick={() => periods.remove(place)}>
                <span>
                  Remove<span className="sr-only"> the period from {band[place]?.from}</span>
                </span>
              </Button>
            </div>
          ) : null}
          <div className="grid grid-cols-2 items-start gap-3">
            <NumberField
              label={warm ? 'On below' : 'Off below'}
              unit={unit}
              error={form.errorOf(`band.${place}.low`)}
              {...form.register(`band.${place}.low`)}
            />
            <NumberField
              label={warm ? 'Off above' : 'On above'}
              unit={unit}
              error={form.errorOf(`band.${place}.high`)}
              {...form.register(`band.${place}.high`)}
            />
          </div>
          <BandSlider place={place} now={value} />
        </div>
      ))}
      <Button
        kind="quiet"
        className="-ml-4 self-start"
        onClick={() =>
          periods.append({ from: several ? '' : '22:00', low: band[0]?.low ?? '', high: band[0]?.high ?? '' })
        }
      >
        {several ? 'Add a period' : 'Another band at night? Add a period'}
      </Button>
    </Section>
  );
}

function StandIns() {
  const form = useRuleForm();
  const { preferences } = useFacts();
  const standIns = useFieldArray({ control: form.control, name: 'standIns' });
  return (
    <div className="flex flex-col gap-2">
      {standIns.fields.map((one, place) => (
        <div key={one.id} className="grid grid-cols-[1fr_auto] items-end gap-2 sm:grid-cols-[1fr_7rem_auto]">
          <Select
            label={place === 0 ? 'If that fails' : 'If that fails too'}
            className="col-span-2 sm:col-span-1"
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
          <Button kind="quiet" onClick={() => standIns.remove(place)}>
            <span>
              Remove<span className="sr-only"> stand-in {place + 1}</span>
            </span>
          </Button>
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
