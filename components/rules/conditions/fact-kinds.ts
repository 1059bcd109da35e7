/** What a condition can be about, and which comparisons make sense of it. */
import type { Condition } from '@/lib/control/rule-body';
import { OPERATOR_WORDS } from '@/lib/wording/rule-conditions';

type Operator = Condition['operator'];
export type FactKind = 'number' | 'hour' | 'month' | 'weekday' | 'sun' | 'contact';

export const CLOCK_FACTS: Record<string, string> = {
  'time.hour': 'Hour of the day',
  'time.month': 'Month',
  'time.weekday': 'Day of the week',
  'time.sunUp': 'The sun',
};

/** By the fact's key and, of a point, its role. */
export function kindOf(fact: string, role: string | undefined): FactKind {
  switch (fact) {
    case 'time.hour':
      return 'hour';
    case 'time.month':
      return 'month';
    case 'time.weekday':
      return 'weekday';
    case 'time.sunUp':
      return 'sun';
    default:
      return role === 'contact' ? 'contact' : 'number';
  }
}

const calendar: Partial<Record<Operator, string>> = {
  equal: 'is',
  notEqual: 'is not',
  in: 'is one of',
  notIn: 'is none of',
  greaterThanInclusive: 'is or comes after',
  greaterThan: 'comes after',
  lessThanInclusive: 'is or comes before',
  lessThan: 'comes before',
};
const isOrNot: Partial<Record<Operator, string>> = { equal: 'is', notEqual: 'is not' };

const WORDS: Record<FactKind, Partial<Record<Operator, string>>> = {
  number: OPERATOR_WORDS,
  hour: {
    greaterThanInclusive: 'at or after',
    lessThan: 'before',
    equal: 'in the hour from',
    notEqual: 'not in the hour from',
    in: 'in one of the hours from',
    notIn: 'in none of the hours from',
    greaterThan: 'after the hour from',
    lessThanInclusive: 'up to the end of the hour from',
  },
  month: calendar,
  weekday: calendar,
  sun: isOrNot,
  contact: isOrNot,
};

/** A measured figure is never the same to the last digit, so "exactly" is offered of what is counted only. */
const OFFERED: Record<FactKind, Operator[]> = {
  number: ['greaterThanInclusive', 'greaterThan', 'lessThanInclusive', 'lessThan'],
  hour: ['greaterThanInclusive', 'lessThan', 'equal', 'notEqual', 'in', 'notIn'],
  month: ['equal', 'notEqual', 'in', 'notIn', 'greaterThanInclusive', 'lessThanInclusive'],
  weekday: ['equal', 'notEqual', 'in', 'notIn', 'greaterThanInclusive', 'lessThanInclusive'],
  sun: ['equal'],
  contact: ['equal', 'notEqual'],
};

/** With their words; one that a program wrote and that is not offered stays to be seen. */
export function operatorsOf(kind: FactKind, present: Operator): { operator: Operator; words: string }[] {
  const offered = OFFERED[kind].includes(present) ? OFFERED[kind] : [...OFFERED[kind], present];
  return offered.map((operator) => ({ operator, words: WORDS[kind][operator] ?? OPERATOR_WORDS[operator] }));
}

export const takesList = (operator: Operator): boolean => operator === 'in' || operator === 'notIn';

/** What a condition says when it is made to be about another kind of thing: its old figure would mean nothing there. */
export function beginning(kind: FactKind): { operator: Operator; value: string } {
  switch (kind) {
    case 'sun':
      return { operator: 'equal', value: 'true' };
    case 'contact':
      return { operator: 'equal', value: '1' };
    case 'month':
      return { operator: 'in', value: '' };
    case 'weekday':
      return { operator: 'in', value: '' };
    default:
      return { operator: 'greaterThanInclusive', value: '' };
  }
}
