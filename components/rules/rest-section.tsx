'use client';
import { useWatch } from 'react-hook-form';
import { Checkbox } from '@/components/ui/check';
import { NumberField, Select } from '@/components/ui/field';
import { degrees } from '@/lib/units/format';
import { exactly } from '@/lib/wording/settings';
import { useFacts, useRuleForm } from './context';
import { PointChoices } from './point-choices';
import { Section } from './section';

export interface SourceFacts {
  name: string;
  /** How many channels draw from it: they share its credit and its limit. */
  channels: number;
  dailyLimitS: number | null;
  drawnTodayS: number | null;
}

/** What the source's limit leaves, over a rolling day. */
function Left({ source }: { source: SourceFacts }) {
  if (source.dailyLimitS === null || source.drawnTodayS === null) return null;
  const left = Math.max(0, source.dailyLimitS - source.drawnTodayS);
  const whole = Math.floor(left / 60) * 60;
  return (
    <p className="text-[0.9rem] text-soft">
      {source.channels > 1 ? `Shared by all channels of the ${source.name.toLowerCase()}: ` : ''}
      <strong className="text-ink">{left === 0 ? 'nothing' : exactly(whole)}</strong> of{' '}
      {exactly(source.dailyLimitS)} left in the last 24 h.
    </p>
  );
}

/** How the draw is rationed: its length, the rest after it, and what ends either. */
export function RestSection({ source }: { source: SourceFacts | null }) {
  const form = useRuleForm();
  const { preferences } = useFacts();
  const [isRationed, waitsAt, gain] = useWatch({
    control: form.control,
    name: ['isRationed', 'waitsAt', 'gain'],
  });
  const unit = degrees(preferences);
  const field = (name: 'longestDraw' | 'least' | 'waitLevel' | 'most' | 'gain' | 'gainAfter') => ({
    error: form.errorOf(name),
    ...form.register(name),
  });
  return (
    <Section title="Rest">
      <Checkbox
        label={
          source === null ? 'It rests after a draw' : `The ${source.name.toLowerCase()} rests after a draw`
        }
        hint="A heap that is drawn on without pause cools, slows and dies."
        {...form.register('isRationed')}
      />
      {isRationed ? (
        <>
          <div className="grid grid-cols-2 items-start gap-3">
            <NumberField label="Longest draw" unit="min" {...field('longestDraw')} />
            <NumberField label="Rest at least" unit="min" {...field('least')} />
          </div>
          <div className="grid grid-cols-2 items-start gap-3">
            <Select
              label="then until"
              className="col-span-2"
              error={form.errorOf('waitsAt')}
              {...form.register('waitsAt')}
            >
              <PointChoices units={['Cel']} none="No wait" />
            </Select>
            {waitsAt === '' ? null : (
              <>
                <NumberField label="is back to" unit={unit} {...field('waitLevel')} />
                <NumberField label="but at most" unit="min" {...field('most')} />
              </>
            )}
          </div>
          <div className="grid grid-cols-1 sm:grid-cols-2 items-start gap-3">
            <NumberField
              label="Stop if it brings less than"
              unit={unit}
              hint="Empty: never."
              {...field('gain')}
            />
            {gain.trim() === '' ? null : <NumberField label="after" unit="min" {...field('gainAfter')} />}
          </div>
          {gain.trim() === '' ? null : (
            <div className="grid grid-cols-2 items-start gap-3">
              <Select
                label="Air going in at"
                error={form.errorOf('gainIntake')}
                {...form.register('gainIntake')}
              >
                <PointChoices units={['Cel']} />
              </Select>
              <Select
                label="Air coming back at"
                error={form.errorOf('gainReturn')}
                {...form.register('gainReturn')}
              >
                <PointChoices units={['Cel']} />
              </Select>
            </div>
          )}
          <Checkbox label="Frost may break a rest" {...form.register('frostMayBreak')} />
        </>
      ) : null}
      {source === null ? null : <Left source={source} />}
    </Section>
  );
}
