'use client';
import { useWatch } from 'react-hook-form';
import { fahrenheit } from '@/lib/units/conversion';
import { decimal, degrees, temperatureFigure } from '@/lib/units/format';
import { numberTyped } from '@/lib/units/typed';
import { useFacts, useRuleForm } from './context';

const thumb =
  'pointer-events-none absolute -left-3 top-3 m-0 h-11 w-[calc(100%+1.5rem)] appearance-none bg-transparent disabled:cursor-not-allowed ' +
  '[&::-webkit-slider-thumb]:pointer-events-auto [&::-webkit-slider-thumb]:size-6 [&::-webkit-slider-thumb]:appearance-none [&::-webkit-slider-thumb]:rounded-full [&::-webkit-slider-thumb]:border-[3px] [&::-webkit-slider-thumb]:border-house [&::-webkit-slider-thumb]:bg-sheet ' +
  '[&::-moz-range-thumb]:pointer-events-auto [&::-moz-range-thumb]:size-5 [&::-moz-range-thumb]:rounded-full [&::-moz-range-thumb]:border-[3px] [&::-moz-range-thumb]:border-house [&::-moz-range-thumb]:bg-sheet';

/** The band as a piece of a scale, to be dragged or moved by arrow keys; the fields above it take any figure. */
export function BandSlider({ place, now }: { place: number; now: number | null }) {
  const form = useRuleForm();
  const { preferences, mayWrite } = useFacts();
  const [low, high] = useWatch({
    control: form.control,
    name: [`band.${place}.low`, `band.${place}.high`],
  }).map((text) => numberTyped(text));
  if (typeof low !== 'number' || typeof high !== 'number' || high <= low) return null;
  const isF = preferences.temperature === 'F';
  const [step, margin, gap] = isF ? [1, 10, 1] : [0.5, 6, 0.5];
  const shown = now === null ? null : isF ? fahrenheit(now) : now;
  const least = Math.floor(Math.min(low, shown ?? low) - margin);
  const most = Math.ceil(Math.max(high, shown ?? high) + margin);
  const share = (value: number) => `${((value - least) / (most - least)) * 100}%`;
  const set = (which: 'low' | 'high', typed: number) => {
    const value = which === 'low' ? Math.min(typed, high - gap) : Math.max(typed, low + gap);
    form.setValue(`band.${place}.${which}`, String(Number(value.toFixed(2))), {
      shouldDirty: true,
      shouldValidate: form.formState.isSubmitted,
    });
  };
  return (
    <div className="relative mx-3 h-20">
      {shown === null || now === null ? null : (
        <p
          className="absolute top-0 -translate-x-1/2 font-mono text-[0.8rem] whitespace-nowrap text-soft"
          style={{ left: share(shown) }}
        >
          <span aria-hidden="true">▾ </span>now {temperatureFigure(now, preferences)}
        </p>
      )}
      {/* a thumb's middle runs from half a thumb inside either end of its input, so the inputs reach out by that */}
      <div className="absolute inset-x-0 top-8 h-1.5 rounded-full bg-faint" />
      <div className="absolute inset-x-0 top-8 h-1.5">
        <div
          className="absolute h-full rounded-full bg-house"
          style={{ left: share(low), right: `calc(100% - ${share(high)})` }}
        />
      </div>
      {(['low', 'high'] as const).map((which) => (
        <input
          key={which}
          type="range"
          disabled={!mayWrite}
          aria-label={`${which === 'low' ? 'Lower' : 'Upper'} threshold, in ${degrees(preferences)}`}
          min={least}
          max={most}
          step={step}
          value={which === 'low' ? low : high}
          onChange={(event) => set(which, Number(event.target.value))}
          className={thumb}
        />
      ))}
      <p className="absolute inset-x-0 bottom-0 flex justify-between font-mono text-[0.8rem] text-soft">
        <span>{decimal(least, 0)}</span>
        <span>{decimal(most, 0)}</span>
      </p>
    </div>
  );
}
