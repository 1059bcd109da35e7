/**
 * A rule's body as the text of its form, in the reader's units, and back. What the form cannot show (nested
 * conditions) is handed through untouched.
 */
import type { Condition, ConditionTree, RuleBody } from '@/lib/control/rule-body';
import { fieldText, fieldValue, unreadable, type Quantity } from '@/lib/units/fields';
import type { Preferences } from '@/lib/units/preferences';
import { isSimple } from '@/lib/wording/rule-conditions';
import { clockTyped } from './clock-typed';

export interface RuleForm {
  purpose: 'warm' | 'cool';
  point: string;
  standIns: { point: string; offset: string }[];
  band: { from: string; low: string; high: string }[];
  isRationed: boolean;
  longestDraw: string;
  least: string;
  /** Empty: the rest waits for no temperature. */
  waitsAt: string;
  waitLevel: string;
  most: string;
  /** Empty: no least gain. */
  gain: string;
  gainAfter: string;
  gainIntake: string;
  gainReturn: string;
  frostMayBreak: boolean;
  only: { fact: string; operator: Condition['operator']; value: string }[];
  isSeasonal: boolean;
  seasonFromDay: string;
  seasonFromMonth: string;
  seasonToDay: string;
  seasonToMonth: string;
  isDaily: boolean;
  hoursFrom: string;
  hoursTo: string;
}

/** Field of the form, dotted, to what is wrong with it. */
export type FormErrors = Record<string, string>;
/** Unit of a fact, by point key; a fact of the clock has none. */
export type UnitOf = (fact: string) => string | undefined;

export function quantityOf(unit: string | undefined): Quantity {
  return unit === 'Cel' ? 'temperature' : unit === 'K' ? 'difference' : 'number';
}

/** Conditions that the form shows: all of some, each with one value. Others are kept as they are. */
export function fitsForm(only: ConditionTree | undefined): only is { all: Condition[] } | undefined {
  return only === undefined || (isSimple(only) && only.all.every((leaf) => !Array.isArray(leaf.value)));
}

export function formOf(body: RuleBody, unitOf: UnitOf, preferences: Preferences): RuleForm {
  const text = (value: number | null | undefined, quantity: Quantity) =>
    fieldText(value, quantity, preferences);
  const { rest, season, hours, only } = body;
  const [fromMonth = '10', fromDay = '01'] = season?.from.split('-') ?? [];
  const [toMonth = '04', toDay = '30'] = season?.to.split('-') ?? [];
  return {
    purpose: body.purpose,
    point: body.point,
    standIns: body.standIns.map((one) => ({ point: one.point, offset: text(one.offset, 'difference') })),
    band: body.band.map((period) => ({
      from: period.from,
      low: text(period.low, 'temperature'),
      high: text(period.high, 'temperature'),
    })),
    isRationed: rest !== undefined,
    longestDraw: text(rest?.longestDraw ?? 2400, 'minutes'),
    least: text(rest?.least ?? 1800, 'minutes'),
    waitsAt: rest?.until?.point ?? '',
    waitLevel: text(rest?.until?.level, 'temperature'),
    most: text(rest?.most, 'minutes'),
    gain: text(rest?.leastGain?.kelvin, 'difference'),
    gainAfter: text(rest?.leastGain?.after ?? 900, 'minutes'),
    gainIntake: rest?.leastGain?.intake ?? '',
    gainReturn: rest?.leastGain?.return ?? '',
    frostMayBreak: rest?.frostMayBreak ?? true,
    only: fitsForm(only)
      ? (only?.all ?? []).map((leaf) => ({
          fact: leaf.fact,
          operator: leaf.operator,
          value:
            typeof leaf.value === 'number'
              ? text(leaf.value, quantityOf(unitOf(leaf.fact)))
              : String(leaf.value),
        }))
      : [],
    isSeasonal: season !== undefined,
    seasonFromDay: String(Number(fromDay)),
    seasonFromMonth: fromMonth,
    seasonToDay: String(Number(toDay)),
    seasonToMonth: toMonth,
    isDaily: hours !== undefined,
    hoursFrom: hours?.from ?? '18:00',
    hoursTo: hours?.to ?? '08:00',
  };
}

/** The body that the form says, not yet judged by its schema, and what could not be read at all. */
export function bodyOfForm(
  form: RuleForm,
  kept: ConditionTree | null,
  unitOf: UnitOf,
  preferences: Preferences,
): { body: unknown; errors: FormErrors } {
  const errors: FormErrors = {};
  const read = (path: string, typed: string, quantity: Quantity): number | undefined => {
    const value = fieldValue(typed, quantity, preferences);
    if (value === null) errors[path] = unreadable(quantity, preferences);
    return value ?? undefined;
  };
  const clock = (typed: string) => clockTyped(typed) ?? typed.trim();
  const monthDay = (path: string, month: string, typed: string) => {
    const day = Number(typed.trim());
    if (!Number.isInteger(day) || day < 1 || day > 31) errors[path] = 'Give a day, 1 to 31.';
    return `${month}-${String(day).padStart(2, '0')}`;
  };
  for (const [path, key] of chosen(form)) if (key === '') errors[path] = 'Choose a point.';
  const only = kept ?? onlyOf(form, unitOf, preferences, errors);
  const body = {
    purpose: form.purpose,
    point: form.point,
    standIns: form.standIns.map((one, place) => ({
      point: one.point,
      offset: one.offset.trim() === '' ? 0 : read(`standIns.${place}.offset`, one.offset, 'difference'),
    })),
    band: form.band.map((period, place) => ({
      from: form.band.length === 1 && period.from.trim() === '' ? '00:00' : clock(period.from),
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
    ...(form.isDaily ? { hours: { from: clock(form.hoursFrom), to: clock(form.hoursTo) } } : {}),
  };
  return { body, errors };
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

function onlyOf(form: RuleForm, unitOf: UnitOf, preferences: Preferences, errors: FormErrors) {
  if (form.only.length === 0) return null;
  return {
    all: form.only.map((leaf, place) => {
      if (leaf.fact === 'time.sunUp') return { ...leaf, value: leaf.value === 'true' };
      const value = fieldValue(leaf.value, quantityOf(unitOf(leaf.fact)), preferences);
      if (value === null)
        errors[`only.${place}.value`] = unreadable(quantityOf(unitOf(leaf.fact)), preferences);
      return { ...leaf, value: value ?? 0 };
    }),
  };
}

const renamed: [RegExp, string][] = [
  [/^rest\.until\.point$/, 'waitsAt'],
  [/^rest\.until\.level$/, 'waitLevel'],
  [/^rest\.leastGain\.kelvin$/, 'gain'],
  [/^rest\.leastGain\.after$/, 'gainAfter'],
  [/^rest\.leastGain\.intake$/, 'gainIntake'],
  [/^rest\.leastGain\.return$/, 'gainReturn'],
  [/^rest\.leastGain$/, 'gain'],
  [/^rest\.until$/, 'waitsAt'],
  [/^rest$/, 'longestDraw'],
  [/^rest\./, ''],
  [/^only\.all\./, 'only.'],
  [/^season\.from$/, 'seasonFromDay'],
  [/^season\.to$/, 'seasonToDay'],
  [/^season$/, 'seasonFromDay'],
  [/^hours\.from$/, 'hoursFrom'],
  [/^hours\.to$/, 'hoursTo'],
  [/^hours$/, 'hoursFrom'],
  [/^band$/, 'band.0.low'],
  [/^standIns$/, 'standIns.0.point'],
];

/** Field of the form for a dotted path of the interface. @example fieldOfPath('rest.until.level') === 'waitLevel' */
export function fieldOfPath(path: string): string {
  for (const [pattern, field] of renamed) if (pattern.test(path)) return path.replace(pattern, field);
  return path;
}
