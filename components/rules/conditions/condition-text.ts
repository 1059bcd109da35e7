/** Between a condition's value and its text, by what it is about. */
import type { Condition } from '@/lib/control/rule-body';
import { fieldText, fieldValue, unreadable, type Quantity } from '@/lib/units/fields';
import type { Preferences } from '@/lib/units/preferences';
import type { DraftFact } from './draft-tree';
import { kindOf, takesList, type FactKind } from './fact-kinds';

/** Unit and role of a point by its key; a fact of the clock, or a missing point, has none. */
export type FactOf = (fact: string) => { unit: string; role: string } | undefined;

export function quantityOf(unit: string | undefined): Quantity {
  return unit === 'Cel' ? 'temperature' : unit === 'K' ? 'difference' : 'number';
}

export function textOfValue(
  fact: string,
  value: Condition['value'],
  factOf: FactOf,
  preferences: Preferences,
): string {
  const quantity = quantityOf(factOf(fact)?.unit);
  return [value]
    .flat()
    .map((one) => (typeof one === 'boolean' ? String(one) : fieldText(one, quantity, preferences)))
    .join('; ');
}

const LIMITS: Partial<Record<FactKind, [number, number, string]>> = {
  hour: [0, 23, 'Give whole hours, 0 to 23.'],
  month: [1, 12, 'Choose a month.'],
  weekday: [1, 7, 'Choose a day.'],
  contact: [0, 1, 'Choose on or off.'],
};

/** Several stand with semicolons or blanks between: a comma is a decimal comma. */
export function valueOfText(
  leaf: Pick<DraftFact, 'fact' | 'operator' | 'value'>,
  factOf: FactOf,
  preferences: Preferences,
): { value: Condition['value'] } | { error: string } {
  const point = factOf(leaf.fact);
  const kind = kindOf(leaf.fact, point?.role);
  if (kind === 'sun') return { value: leaf.value === 'true' };
  const quantity = quantityOf(point?.unit);
  const many = takesList(leaf.operator);
  const texts = many ? leaf.value.split(/[;\s]+/).filter((text) => text !== '') : [leaf.value];
  const values = texts.map((text) => fieldValue(text, quantity, preferences));
  const limits = LIMITS[kind];
  const error = limits?.[2] ?? unreadable(quantity, preferences);
  if (values.length === 0) return { error };
  const numbers = values.filter((value) => value !== null);
  if (numbers.length < values.length) return { error };
  if (limits !== undefined && numbers.some((one) => !isWithin(one, limits))) return { error };
  const [first = 0] = numbers;
  return { value: many ? numbers : first };
}

const isWithin = (value: number, [least, most]: [number, number, string]): boolean =>
  Number.isInteger(value) && value >= least && value <= most;
