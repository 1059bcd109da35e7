/** A rule's extra conditions in words. */
import type { ConditionTree } from '@/lib/control/types';
import { clockTime, figure, reading, type Reader } from '@/lib/units/format';
import { pointTone, pointWords, type RuleNames } from './rule-names';
import { dayName, monthName } from './rule-when';
import { listed, sentence, type Sentence } from './sentence';

export type ConditionNode = Extract<ConditionTree, { all: unknown }>['all'][number];
export type Condition = Extract<ConditionNode, { fact: string }>;

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

const hourWords = (hour: number, reader: Reader) =>
  clockTime(`${String(hour % 24).padStart(2, '0')}:00`, reader);

/** `time.hour` counts whole hours, so "at most 5" lasts until 06:00. */
function hourCondition(leaf: Condition, reader: Reader): string {
  if (typeof leaf.value !== 'number') {
    const hours = Array.isArray(leaf.value)
      ? leaf.value.map((hour) => hourWords(hour, reader)).join(', ')
      : '';
    return `the hour that began is ${OPERATOR_WORDS[leaf.operator]} ${hours}`;
  }
  const hour = leaf.value;
  switch (leaf.operator) {
    case 'lessThan':
      return `it is before ${hourWords(hour, reader)}`;
    case 'lessThanInclusive':
      return `it is before ${hourWords(hour + 1, reader)}`;
    case 'greaterThan':
      return `it is ${hourWords(hour + 1, reader)} or later`;
    case 'greaterThanInclusive':
      return `it is ${hourWords(hour, reader)} or later`;
    case 'notEqual':
      return `it is not between ${hourWords(hour, reader)} and ${hourWords(hour + 1, reader)}`;
    default:
      return `it is between ${hourWords(hour, reader)} and ${hourWords(hour + 1, reader)}`;
  }
}

function calendarCondition(leaf: Condition, kind: 'month' | 'day'): string {
  const name = kind === 'month' ? monthName : dayName;
  const values = Array.isArray(leaf.value) ? leaf.value : typeof leaf.value === 'number' ? [leaf.value] : [];
  const words = listed(values.map(name), 'or')
    .map((part) => part.text)
    .join('');
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

function leafWords(leaf: Condition, names: RuleNames, reader: Reader): Sentence {
  switch (leaf.fact) {
    case 'time.hour':
      return sentence(hourCondition(leaf, reader));
    case 'time.month':
      return sentence(calendarCondition(leaf, 'month'));
    case 'time.weekday':
      return sentence(calendarCondition(leaf, 'day'));
    case 'time.sunUp': {
      const isUp = (leaf.value === true) === (leaf.operator === 'equal');
      return sentence(isUp ? 'the sun is up' : 'the sun is down');
    }
  }
  const unit = names.points.find((point) => point.key === leaf.fact)?.unit ?? '';
  const inUnit = (value: number) => ({
    text: unit === '' ? figure(value, 0, 2) : reading(value, unit, reader),
    tone: pointTone(leaf.fact, names),
    strong: true,
  });
  const value =
    typeof leaf.value === 'boolean'
      ? sentence(leaf.value ? 'true' : 'false')
      : listed([leaf.value].flat().map(inUnit), 'or');
  return sentence(`${pointWords(leaf.fact, names)} is ${OPERATOR_WORDS[leaf.operator]} `, value);
}

/** @example conditionWords({all: […]}, …) reads "the heap’s core is at least 38.0 °C and it is 18:00 or later" */
export function conditionWords(
  node: ConditionNode,
  names: RuleNames,
  reader: Reader,
  nested = false,
): Sentence {
  if ('fact' in node) return leafWords(node, names, reader);
  if ('not' in node) return sentence('not (', conditionWords(node.not, names, reader), ')');
  const children = 'all' in node ? node.all : node.any;
  const words = children.map((child) => conditionWords(child, names, reader, children.length > 1));
  const joined = 'all' in node && children.length > 0 ? joinedBy(words, ' and ') : joinedBy(words, ' or ');
  return nested && children.length > 1 ? sentence('(', joined, ')') : joined;
}

/** The same word between all, since "a, b or c" inside "and" could be read in two ways. */
function joinedBy(words: Sentence[], between: string): Sentence {
  return sentence(...words.flatMap((one, index) => (index === 0 ? [one] : [between, one])));
}

/** Whether the simple form of the editor can show it: all of some leaves, nothing nested. */
export function isSimple(tree: ConditionTree): tree is { all: Condition[] } {
  return 'all' in tree && tree.all.every((node) => 'fact' in node);
}
