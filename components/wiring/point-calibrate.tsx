'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { TextField } from '@/components/ui/field';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import { useAwake } from '@/components/ui/use-awake';
import { correctionOf, unusual } from '@/lib/analysis/calibrate';
import { temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { REFERENCE_WORDS } from '@/lib/wording/calibration';
import { CalibrationVerdict } from './calibration-verdict';
import { CalibrationBath, type KnownPlaces, type TakenPlace } from './point-bath';

/** A calibration run: the probe comes to rest at one place or two, and what it read there is held against what is true. */
export function PointCalibrate({
  house,
  point,
  gain,
  known,
  preferences,
}: {
  house: string;
  point: string;
  /** In force. */
  gain: number;
  known: KnownPlaces;
  preferences: Preferences;
}) {
  const router = useRouter();
  const isAwake = useAwake();
  const [places, setPlaces] = useState<TakenPlace[]>([]);
  const [isMore, setMore] = useState(true);
  const [note, setNote] = useState('');
  const [isMeant, setMeant] = useState(false);
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  const found = correctionIn(places, gain);
  const asked = found === null ? [] : unusual(found, places);

  async function save() {
    setBusy(true);
    const answer = await send('POST', `/houses/${house}/points/${point}/calibrations`, {
      note,
      acceptUnusual: isMeant,
      places: places.map(({ at, raw, rawSd, readings, reference, referenceSd }) => ({
        ...{ at, raw, rawSd, readings },
        ...(at === 'thermometer' ? { reference, referenceSd } : {}),
      })),
    });
    setBusy(false);
    if (!answer.ok) return setFailure(Object.values(answer.fields)[0] ?? answer.message);
    say('Calibrated. Readings from now on are corrected by it.');
    setPlaces([]);
    setNote('');
    setMeant(false);
    setMore(true);
    setFailure(null);
    router.refresh();
  }

  return (
    <div className="flex flex-col gap-4">
      {places.length === 0 ? null : (
        <ol className="flex flex-col gap-1">
          {places.map((one, at) => (
            <li key={at}>
              {REFERENCE_WORDS[one.at]}: read {temperature(one.raw, preferences, 2)}, true{' '}
              {temperature(one.reference, preferences, 2)}
            </li>
          ))}
        </ol>
      )}
      {places.length < 2 && isMore ? (
        <CalibrationBath
          key={places.length}
          {...{ house, point, known, preferences, isAwake }}
          isSecond={places.length === 1}
          onTake={(place) => {
            setPlaces([...places, place]);
            setMore(false);
            setFailure(null);
          }}
        />
      ) : null}
      {places.length > 0 && !isMore ? (
        <>
          <CalibrationVerdict {...{ found, asked, isMeant, setMeant, preferences }} />
          <TextField
            label="Note"
            value={note}
            maxLength={500}
            hint="Which thermometer, which bath. May stay empty."
            onChange={(event) => setNote(event.target.value)}
          />
          <div className="flex flex-wrap gap-2">
            <Button
              kind="primary"
              busy={busy}
              disabled={found === null || (asked.length > 0 && !isMeant)}
              onClick={() => void save()}
            >
              Calibrate it by this
            </Button>
            {places.length === 1 ? <Button onClick={() => setMore(true)}>A second place first</Button> : null}
            <Button kind="quiet" onClick={() => (setPlaces([]), setMore(true), setFailure(null))}>
              Begin anew
            </Button>
          </div>
        </>
      ) : null}
      <p role="alert" className="font-semibold text-alarm empty:hidden">
        {failure}
      </p>
    </div>
  );
}

function correctionIn(places: readonly TakenPlace[], gain: number) {
  if (places.length === 0) return null;
  try {
    return correctionOf(places, gain);
  } catch {
    return null;
  }
}
