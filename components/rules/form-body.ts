/** The body that a rule's form says, not yet judged by its schema, and what could not be read at all. */
import { fieldValue, unreadable, type Quantity } from '@/lib/units/fields';
import type { Preferences } from '@/lib/units/preferences';
import { valueOfText, type FactOf } from './conditions/condition-text';
import { treeOf } from './conditions/draft-tree';
import { dayTimeOf, type DayTimeForm } from './day-time';
import type { RuleForm } from './form-values';

/** Field of the form, dotted, to what is wrong with it. */
export type FormErrors = Record<string, string>;

export function bodyOfForm(
  form: RuleForm,
  factOf: FactOf,
  preferences: Preferences,
): { body: unknown; errors: FormErrors } {
  const errors: FormErrors = {};
  const read = (path: string, typed: string, quantity: Quantity): number | undefined => {
    const value = fieldValue(typed, quantity, preferences);
    if (value === null) errors[path] = unreadable(quantity, preferences);
    return value ?? undefined;
  };
  const dayTime = (path: string, typed: DayTimeForm) => {
    const said = dayTimeOf(typed);
    if ('error' in said) errors[path] = said.error;
    return 'error' in said ? undefined : said.text;
  };
  const monthDay = (path: string, month: string, typed: string) => {
    const day = Number(typed.trim());
    if (!Number.isInteger(day) || day < 1 || day > 31) errors[path] = 'Give a day, 1 to 31.';
    return `${month}-${String(day).padStart(2, '0')}`;
  };
  for (const [path, key] of chosen(form)) if (key === '') errors[path] = 'Choose a point.';
  const only = onlyOf(form, factOf, preferences, errors);
  const body = {
    purpose: form.purpose,
    point: form.point,
    standIns: form.standIns.map((one, place) => ({
      point: one.point,
      offset: one.offset.trim() === '' ? 0 : read(`standIns.${place}.offset`, one.offset, 'difference'),
    })),
    band: form.band.map((period, place) => ({
      // one band holds all day: when it would begin is not asked
      from: form.band.length === 1 ? allDay(period.from) : dayTime(`band.${place}.from`, period.from),
      low: read(`band.${place}.low`, period.low, 'temperature'),
      high: read(`band.${place}.high`, period.high, 'temperature'),
    })),
    ...(form.isRationed ? { rest: restOf(form, read) } : {}),
    ...(only === null ? {} : { only }),
    ...(form.isSeasonal
      ? {
          season: {
            from: monthDay('seasonFromDay', form.seasonFromMonth, form.seasonFromDay),
            to: monthDay('seasonToDay', form.seasonToMonth, form.seasonToDay),
          },
        }
      : {}),
    ...(form.isDaily
      ? { hours: { from: dayTime('hoursFrom', form.hoursFrom), to: dayTime('hoursTo', form.hoursTo) } }
      : {}),
  };
  return { body, errors };
}

function allDay(from: DayTimeForm): string {
  const said = dayTimeOf(from);
  return 'text' in said && said.text !== '' ? said.text : '00:00';
}

/** The points that must be chosen, given what is switched on. */
function chosen(form: RuleForm): [string, string][] {
  const hasGain = form.isRationed && form.gain.trim() !== '';
  return [
    ['point', form.point],
    ...form.standIns.map((one, place): [string, string] => [`standIns.${place}.point`, one.point]),
    ...(hasGain
      ? ([
          ['gainIntake', form.gainIntake],
          ['gainReturn', form.gainReturn],
        ] satisfies [string, string][])
      : []),
  ];
}

type Read = (path: string, typed: string, quantity: Quantity) => number | undefined;

function restOf(form: RuleForm, read: Read) {
  return {
    longestDraw: read('longestDraw', form.longestDraw, 'minutes'),
    least: read('least', form.least, 'minutes'),
    ...(form.waitsAt === ''
      ? {}
      : {
          until: { point: form.waitsAt, level: read('waitLevel', form.waitLevel, 'temperature') },
          most: read('most', form.most, 'minutes'),
        }),
    ...(form.gain.trim() === ''
      ? {}
      : {
          leastGain: {
            kelvin: read('gain', form.gain, 'difference'),
            after: read('gainAfter', form.gainAfter, 'minutes'),
            intake: form.gainIntake,
            return: form.gainReturn,
          },
        }),
    frostMayBreak: form.frostMayBreak,
  };
}

function onlyOf(form: RuleForm, factOf: FactOf, preferences: Preferences, errors: FormErrors) {
  return treeOf(form.only, (leaf, path) => {
    if (leaf.fact === '') errors[`${path}.fact`] = 'Choose what it goes by.';
    const typed = valueOfText(leaf, factOf, preferences);
    if ('value' in typed) return typed.value;
    if (leaf.fact !== '') errors[`${path}.value`] = typed.error;
    return undefined;
  });
}
