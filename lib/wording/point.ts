/** One point in a sentence: what it says, and how far that is to be believed. */
import { pointValue } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { day } from '@/lib/units/time';
import { correctionWords, KIND_WORDS } from './calibration';
import { join } from './join';
import type { Phrase } from './phrase';
import { qualityWords } from './quality';

interface Told {
  point: { name: string; unit: string; node: string | null };
  state: { value: number | null; quality: 'good' | 'uncertain' | 'bad'; why: string | null } | null;
  newest: { from: string; offset: number; gain: number; kind: keyof typeof KIND_WORDS; by: string } | null;
}

/** @example "Bench probe 1 reads 6.3 °C. It was calibrated on 26 Nov (one place: offset) by …: −0.30." */
export function pointSentence(
  { point, state, newest }: Told,
  scene: { now: number; zone: string; preferences: Preferences },
): Phrase[] {
  const value = state?.value ?? null;
  const doubt = state === null ? null : qualityWords({ ...state, since: null }, scene);
  const says: Phrase[] =
    value === null
      ? join(point.name, { text: ' has said nothing yet.', tone: 'warn' })
      : join(
          `${point.name} reads `,
          { text: pointValue(value, point.unit, scene.preferences), tone: 'house' },
          doubt === null ? '.' : { text: `, ${doubt}.`, tone: 'warn' },
        );
  if (point.node === null) return says;
  const at = newest === null ? 0 : Date.parse(newest.from);
  // what stands for "as it is" was typed when the point was added, and is no calibration
  const none = newest === null || (newest.kind === 'typed' && correctionWords(newest) === 'none');
  if (none) return join(says, ' It is not calibrated.');
  if (at === 0) return join(says, ' It began with a typed calibration.');
  return join(
    says,
    ` It was calibrated on ${day(at, scene.zone)} (${KIND_WORDS[newest.kind]}) by ${newest.by}: ${correctionWords(newest)}.`,
  );
}
