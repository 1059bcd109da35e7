'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { NumberField, Select } from '@/components/ui/field';
import { REFERENCES, type CalibrationPlace, type Reference } from '@/lib/analysis/calibrate';
import type { KnownPlace } from '@/lib/analysis/reference-place';
import type { RawReading } from '@/lib/schema/calibration';
import { fieldUnit, fieldValue, unreadable } from '@/lib/units/fields';
import { difference, temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { REFERENCE_HOW, REFERENCE_WORDS, steadyWords } from '@/lib/wording/calibration';
import { usePolled } from './use-polled';

export type TakenPlace = CalibrationPlace;
/** What is true in ice and in boiling water at the altitude of the house. */
export type KnownPlaces = Record<'ice' | 'boiling', KnownPlace>;

const EVERY_MS = 2000;

/** One place: what is true there, what the probe reads as it comes to rest, and taking that value. */
export function CalibrationBath({
  house,
  point,
  known,
  preferences,
  isAwake,
  isSecond,
  onTake,
}: {
  house: string;
  point: string;
  known: KnownPlaces;
  preferences: Preferences;
  isAwake: boolean;
  isSecond: boolean;
  onTake: (place: TakenPlace) => void;
}) {
  const [at, setAt] = useState<Reference>(isSecond ? 'thermometer' : 'ice');
  const [showed, setShowed] = useState('');
  const [give, setGive] = useState('');
  const [errors, setErrors] = useState<{ showed?: string; give?: string }>({});
  const { answers, isLost } = usePolled<RawReading>([`/houses/${house}/points/${point}/raw`], EVERY_MS);
  const live = answers?.[0] ?? null;
  const unit = fieldUnit('temperature', preferences) ?? '°C';

  function take() {
    if (live === null || live.mean === null || live.sd === null) return;
    const place = { at, raw: live.mean, rawSd: live.sd, readings: live.readings };
    if (at !== 'thermometer') return onTake({ ...place, ...known[at] });
    const reference = fieldValue(showed, 'temperature', preferences);
    const referenceSd = fieldValue(give, 'difference', preferences);
    const isGiven = referenceSd !== null && referenceSd > 0;
    setErrors({
      ...(reference === null ? { showed: unreadable('temperature', preferences) } : {}),
      ...(isGiven ? {} : { give: 'Give by how much it may be wrong, above 0.' }),
    });
    if (reference !== null && isGiven) onTake({ ...place, reference, referenceSd });
  }

  return (
    <fieldset disabled={!isAwake} className="flex flex-col gap-3">
      <Select
        label={isSecond ? 'Second place' : 'Place'}
        value={at}
        hint={REFERENCE_HOW[at]}
        onChange={(event) => setAt(REFERENCES.find((one) => one === event.target.value) ?? 'ice')}
      >
        {REFERENCES.map((one) => (
          <option key={one} value={one}>
            {REFERENCE_WORDS[one]}
          </option>
        ))}
      </Select>
      {at === 'thermometer' ? (
        <div className="grid gap-3 sm:grid-cols-2">
          <NumberField
            label="It shows"
            unit={unit}
            value={showed}
            error={errors.showed}
            onChange={(event) => setShowed(event.target.value)}
          />
          <NumberField
            label="Give or take"
            unit={unit}
            value={give}
            error={errors.give}
            onChange={(event) => setGive(event.target.value)}
          />
        </div>
      ) : (
        <p>True there: {trueWords(known[at], preferences)}.</p>
      )}
      <div className="rounded-lg border border-line bg-paper p-3">
        <p className="text-[0.9rem] text-soft">The probe reads, before any calibration</p>
        <p
          data-raw={live?.isSteady === true ? 'steady' : 'unsteady'}
          className="font-mono text-xl font-semibold"
        >
          {live === null ? 'not known yet' : temperature(live.mean ?? live.raw, preferences, 2)}
        </p>
        <p role="status" className="text-[0.95rem]">
          {isLost ? 'The server does not answer; trying again. ' : ''}
          {live === null ? '' : steadyWords(live, preferences)}
        </p>
      </div>
      <Button className="self-start" kind="primary" disabled={live?.isSteady !== true} onClick={take}>
        Take what it reads
      </Button>
    </fieldset>
  );
}

function trueWords({ reference, referenceSd }: KnownPlace, preferences: Preferences): string {
  return `${temperature(reference, preferences, 2)} ± ${difference(referenceSd, preferences, 2)}`;
}
