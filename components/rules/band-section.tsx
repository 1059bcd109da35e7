'use client';
import { useFieldArray, useWatch } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { NumberField, Select } from '@/components/ui/field';
import { degrees } from '@/lib/units/format';
import { BandSlider } from './band-slider';
import { useFacts, useRuleForm } from './context';
import { DayTimeField } from './day-time-field';
import { PointChoices } from './point-choices';
import { Section } from './section';
import { StandIns } from './stand-ins';

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
              <DayTimeField name={`band.${place}.from`} label="From" />
              <Button kind="quiet" onClick={() => periods.remove(place)}>
                <span>
                  Remove<span className="sr-only"> period {place + 1}</span>
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
          periods.append({
            from: { how: several ? 'clock' : 'before-sunset', clock: several ? '' : '22:00', away: '60' },
            low: band.at(-1)?.low ?? '',
            high: band.at(-1)?.high ?? '',
          })
        }
      >
        {several ? 'Add a period' : 'Another band from sunset? Add a period'}
      </Button>
      {several ? (
        <p className="text-[0.85rem] text-soft">
          Each holds until the next begins, the last one over midnight.
        </p>
      ) : null}
    </Section>
  );
}
