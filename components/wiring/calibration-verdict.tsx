'use client';
import { Checkbox } from '@/components/ui/check';
import { LEAST_SPAN_K, type correctionOf, type unusual } from '@/lib/analysis/calibrate';
import type { Preferences } from '@/lib/units/preferences';
import { correctionWords, unusualWords } from '@/lib/wording/calibration';

/** What the places taken make of the probe, and what is asked about before it is kept. */
export function CalibrationVerdict({
  found,
  asked,
  isMeant,
  setMeant,
  preferences,
}: {
  /** Null: the places lie too close together. */
  found: ReturnType<typeof correctionOf> | null;
  asked: ReturnType<typeof unusual>;
  isMeant: boolean;
  setMeant: (isMeant: boolean) => void;
  preferences: Preferences;
}) {
  return (
    <>
      <p aria-live="polite">
        {found === null ? (
          <span className="font-semibold text-alarm">
            The two places lie closer than {LEAST_SPAN_K} °C: begin anew with places further apart.
          </span>
        ) : (
          <>
            What is used = what is read <strong className="font-mono">{correctionWords(found)}</strong>, from
            now on. Readings before keep the calibration of their time.
          </>
        )}
      </p>
      {asked.length === 0 ? null : (
        <Checkbox
          checked={isMeant}
          onChange={(event) => setMeant(event.target.checked)}
          label="It is meant so."
          hint={unusualWords(asked, preferences)}
        />
      )}
    </>
  );
}
