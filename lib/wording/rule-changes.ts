/** What differs between two versions of a rule, field by field, in words. */
import type { RuleBody } from '@/lib/control/rule-body';
import { difference, temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { plainText } from './phrase';
import { conditionWords } from './rule-conditions';
import { pointWords, type RuleNames } from './rule-names';
import { dayTimeWords, monthDayWords } from './rule-when';
import { amount, exactly, level } from './settings';

export interface Change {
  /** Dotted, as in the interface: `band.0.high`. */
  path: string;
  label: string;
  /** Null: this version has none. */
  before: string | null;
  after: string | null;
}

type Fields = Map<string, { path: string; label: string; text: string }>;

const atMost1 = (celsius: number, preferences: Preferences) => temperature(celsius, preferences, 1);

/** Every field of a body as text, keyed so that the same thing of two versions meets: a period by when it begins. */
function fieldsOf(body: RuleBody, names: RuleNames, preferences: Preferences, isAllDay: boolean): Fields {
  const fields: Fields = new Map();
  const put = (key: string, path: string, label: string, text: string | undefined) => {
    if (text !== undefined) fields.set(key, { path, label, text });
  };
  const warm = body.purpose === 'warm';
  put('purpose', 'purpose', 'purpose', warm ? 'warming' : 'cooling');
  put('point', 'point', 'measured at', pointWords(body.point, names));
  put(
    'standIns',
    'standIns',
    'if that fails',
    body.standIns.length === 0
      ? undefined
      : body.standIns
          .map((one) => {
            const offset =
              one.offset === 0 ? '' : ` ${one.offset > 0 ? '+' : ''}${amount(one.offset, preferences)}`;
            return `${pointWords(one.point, names)}${offset}`;
          })
          .join(', then '),
  );
  body.band.forEach((period, index) => {
    const single = body.band.length === 1;
    // two bands that hold all day are one thing, whenever they would begin
    const key = isAllDay ? 'all day' : period.from;
    const when = single ? '' : ` from ${dayTimeWords(period.from, preferences)}`;
    put(
      `low ${key}`,
      `band.${index}.low`,
      `${warm ? 'on below' : 'off below'}${when}`,
      atMost1(period.low, preferences),
    );
    put(
      `high ${key}`,
      `band.${index}.high`,
      `${warm ? 'off above' : 'on above'}${when}`,
      atMost1(period.high, preferences),
    );
  });
  const rest = body.rest;
  if (rest) {
    put('longestDraw', 'rest.longestDraw', 'longest draw', exactly(rest.longestDraw));
    put('least', 'rest.least', 'rest at least', exactly(rest.least));
    put(
      'until',
      'rest.until.level',
      'then until',
      rest.until && `${pointWords(rest.until.point, names)} is ${level(rest.until.level, preferences)}`,
    );
    put('most', 'rest.most', 'rest at most', rest.most === undefined ? undefined : exactly(rest.most));
    put(
      'leastGain',
      'rest.leastGain.kelvin',
      'stop if it brings less than',
      rest.leastGain &&
        `${difference(rest.leastGain.kelvin, preferences)} after ${exactly(rest.leastGain.after)}`,
    );
    put('frostMayBreak', 'rest.frostMayBreak', 'frost may break a rest', rest.frostMayBreak ? 'yes' : 'no');
  }
  put('only', 'only', 'only while', body.only && plainText(conditionWords(body.only, names, preferences)));
  put(
    'season',
    'season.from',
    'season',
    body.season && `${monthDayWords(body.season.from)} to ${monthDayWords(body.season.to)}`,
  );
  put(
    'hours',
    'hours.from',
    'daily hours',
    body.hours &&
      `${dayTimeWords(body.hours.from, preferences)} to ${dayTimeWords(body.hours.to, preferences)}`,
  );
  return fields;
}

/** In the order of the editor; empty where both say the same to a reader. */
export function ruleChanges(
  before: RuleBody,
  after: RuleBody,
  names: RuleNames,
  preferences: Preferences,
): Change[] {
  const isAllDay = before.band.length === 1 && after.band.length === 1;
  const was = fieldsOf(before, names, preferences, isAllDay);
  const is = fieldsOf(after, names, preferences, isAllDay);
  const keys = [...new Set([...is.keys(), ...was.keys()])];
  return keys.flatMap((key) => {
    const old = was.get(key);
    const now = is.get(key);
    const named = now ?? old;
    if (!named || old?.text === now?.text) return [];
    return [{ path: named.path, label: named.label, before: old?.text ?? null, after: now?.text ?? null }];
  });
}

/**
 * One change as a line; the unit is said once where both sides carry it.
 * @example "off above: 7.5 → 8.0 °C"
 */
export function changeWords(change: Change): string {
  if (change.before === null) return `${change.label}: none before, now ${change.after ?? ''}`;
  if (change.after === null) return `${change.label}: no longer (was ${change.before})`;
  const unit = /^−?[\d.]+(\u00a0\S+)$/.exec(change.after)?.[1];
  const before = unit && change.before.endsWith(unit) ? change.before.slice(0, -unit.length) : change.before;
  return `${change.label}: ${before} → ${change.after}`;
}
