/** A time of the day in the form: by the clock, or so long before or after the sun. */
import { secondsTyped } from '@/lib/units/typed';
import { dayMark } from '@/lib/wording/rule-when';
import { clockTyped } from './clock-typed';

export const HOWS = {
  clock: 'at',
  'before-sunrise': 'before sunrise',
  'after-sunrise': 'after sunrise',
  'before-sunset': 'before sunset',
  'after-sunset': 'after sunset',
} as const;
export type How = keyof typeof HOWS;
export const isHow = (text: string): text is How => Object.hasOwn(HOWS, text);

export interface DayTimeForm {
  how: How;
  /** Kept while the sun is chosen, and the other way round: nothing typed is lost by a look at the other. */
  clock: string;
  away: string;
}

/** @example dayTimeForm('sunset-01:00') is {how: 'before-sunset', away: '60', …} */
export function dayTimeForm(text: string, clock = '22:00'): DayTimeForm {
  const mark = dayMark(text);
  if (mark === null || mark.at === 'clock') return { how: 'clock', clock: text, away: '60' };
  const away = String(Math.abs(mark.offsetMin));
  return { how: `${mark.offsetMin < 0 ? 'before' : 'after'}-${mark.at}`, clock, away };
}

/** Farther off than this the contract does not go. */
const MOST_S = 12 * 3600 + 59 * 60;

/** As the interface takes it, or what is wrong with it. A clock time that is none is left to the schema. */
export function dayTimeOf({ how, clock, away }: DayTimeForm): { text: string } | { error: string } {
  if (how === 'clock') return { text: clockTyped(clock) ?? clock.trim() };
  const [side, sun] = how.split('-');
  const seconds = secondsTyped(away);
  if (seconds === null) return { error: 'Give minutes, such as 60, or 1 h 30.' };
  if (seconds > MOST_S) return { error: 'At most 12 h 59 min from the sun.' };
  if (seconds % 60 !== 0) return { error: 'Give whole minutes.' };
  if (seconds === 0) return { text: sun ?? 'sunset' };
  const two = (figure: number) => String(figure).padStart(2, '0');
  const offset = `${two(Math.floor(seconds / 3600))}:${two((seconds % 3600) / 60)}`;
  return { text: `${sun ?? 'sunset'}${side === 'before' ? '-' : '+'}${offset}` };
}
