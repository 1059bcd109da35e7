/** A rule's extra conditions in words. */
import { OPPOSITE, type Condition, type ConditionNode } from '@/lib/control/rule-body';
import { decimal, pointValue } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { dayTime } from '@/lib/units/time';
import { between, join } from './join';
import { plainText, type Phrase } from './phrase';
import { pointTone, pointWords, type RuleNames } from './rule-names';
import { dayName, monthName } from './rule-when';

export const OPERATOR_WORDS: Record<Condition['operator'], string> = {
  greaterThanInclusive: 'at least',
  greaterThan: 'above',
  lessThanInclusive: 'at most',
  lessThan: 'below',
  equal: 'exactly',
  notEqual: 'anything but',
  in: 'one of',
  notIn: 'none of',
};

const hourWords = (hour: number, preferences: Preferences) =>
  dayTime(`${String(hour % 24).padStart(2, '0')}:00`, preferences);

/** `time.hour` counts whole hours, so "at most 5" lasts until 06:00. */
function hourCondition(leaf: Condition, preferences: Preferences): string {
  if (typeof leaf.value !== 'number') {
    const hours = Array.isArray(leaf.value)
      ? leaf.value.map((hour) => hourWords(hour, preferences)).join(', ')
      : '';
    return `the hour that began is ${OPERATOR_WORDS[leaf.operator]} ${hours}`;
  }
  const hour = leaf.value;
  switch (leaf.operator) {
    case 'lessThan':
      return `it is before ${hourWords(hour, preferences)}`;
    case 'lessThanInclusive':
      return `it is before ${hourWords(hour + 1, preferences)}`;
    case 'greaterThan':
      return `it is ${hourWords(hour + 1, preferences)} or later`;
    case 'greaterThanInclusive':
      return `it is ${hourWords(hour, preferences)} or later`;
    case 'notEqual':
      return `it is not between ${hourWords(hour, preferences)} and ${hourWords(hour + 1, preferences)}`;
    default:
      return `it is between ${hourWords(hour, preferences)} and ${hourWords(hour + 1, preferences)}`;
  }
}

function calendarCondition(leaf: Condition, kind: 'month' | 'day'): string {
  const name = kind === 'month' ? monthName : dayName;
  const values = Array.isArray(leaf.value) ? leaf.value : typeof leaf.value === 'number' ? [leaf.value] : [];
  const words = plainText(between(values.map(name), ', ', ' or '));
  const not = leaf.operator === 'notEqual' || leaf.operator === 'notIn' ? 'not ' : '';
  const before = leaf.operator === 'lessThan' ? 'before ' : leaf.operator === 'greaterThan' ? 'after ' : '';
  const through =
    leaf.operator === 'lessThanInclusive'
      ? ' or earlier'
      : leaf.operator === 'greaterThanInclusive'
        ? ' or later'
        : '';
  return `the ${kind} is ${not}${before}${words}${through}`;
}

function leafWords(leaf: Condition, names: RuleNames, preferences: Preferences): Phrase[] {
  switch (leaf.fact) {
    case 'time.hour':
      return join(hourCondition(leaf, preferences));
    case 'time.month':
      return join(calendarCondition(leaf, 'month'));
    case 'time.weekday':
      return join(calendarCondition(leaf, 'day'));
    case 'time.sunUp': {
      const isUp = (leaf.value === true) === (leaf.operator === 'equal');
      return join(isUp ? 'the sun is up' : 'the sun is down');
    }
  }
  const unit = names.points.find((point) => point.key === leaf.fact)?.unit ?? '';
  const inUnit = (value: number) => ({
    text:
      unit === '' ? decimal(value, Number.isInteger(value) ? 0 : 2) : pointValue(value, unit, preferences),
    tone: pointTone(leaf.fact, names),
  });
  const value =
    typeof leaf.value === 'boolean'
      ? join(leaf.value ? 'true' : 'false')
      : between([leaf.value].flat().map(inUnit), ', ', ' or ');
  return join(`${pointWords(leaf.fact, names)} is ${OPERATOR_WORDS[leaf.operator]} `, value);
}

/**
 * The same word stands between all of a group, and groups inside one are bracketed, since "a, b or c" inside "and" could
 * be read in two ways.
 * @example conditionWords({all: […]}, …) reads "the heap’s core is at least 38.0 °C and it is 18:00 or later"
 */
export function conditionWords(
  node: ConditionNode,
  names: RuleNames,
  preferences: Preferences,
  nested = false,
): Phrase[] {
  if ('fact' in node) return leafWords(node, names, preferences);
  if ('not' in node) return conditionWords(turned(node.not), names, preferences, nested);
  const children = 'all' in node ? node.all : node.any;
  const words = children.map((child) => conditionWords(child, names, preferences, children.length > 1));
  const joined = between(words, 'all' in node ? ' and ' : ' or ');
  return nested && children.length > 1 ? join('(', joined, ')') : joined;
}

/**
 * The same condition without its `not`: nobody says "not (it is at least 38 °C)". Of a group the rule of De Morgan holds in
 * three-valued logic too, so what is said is what control reckons, also while something is not known.
 */
function turned(node: ConditionNode): ConditionNode {
  if ('fact' in node) return { ...node, operator: OPPOSITE[node.operator] };
  if ('not' in node) return node.not;
  return 'all' in node ? { any: node.all.map(turned) } : { all: node.any.map(turned) };
}

/** The same words at the beginning of a line. */
export function capitalFirst(phrases: Phrase[]): Phrase[] {
  const [first, ...others] = phrases;
  if (first === undefined) return [];
  const raise = (text: string) => `${text.charAt(0).toUpperCase()}${text.slice(1)}`;
  return [typeof first === 'string' ? raise(first) : { ...first, text: raise(first.text) }, ...others];
}
