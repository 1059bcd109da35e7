/**
 * What a grower wrote, as the forms' schema (lib/schema/rule.ts) gives it after its defaults. The core states the
 * shape it needs itself: it knows no zod and no form. Durations in whole seconds, °C, clock times `HH:MM`.
 */
export type Operator =
  | 'equal'
  | 'notEqual'
  | 'lessThan'
  | 'lessThanInclusive'
  | 'greaterThan'
  | 'greaterThanInclusive'
  | 'in'
  | 'notIn';

/** What holds exactly where an operator does not: what a `not` makes of it. */
export const OPPOSITE: Record<Operator, Operator> = {
  equal: 'notEqual',
  notEqual: 'equal',
  lessThan: 'greaterThanInclusive',
  lessThanInclusive: 'greaterThan',
  greaterThan: 'lessThanInclusive',
  greaterThanInclusive: 'lessThan',
  in: 'notIn',
  notIn: 'in',
};

export interface Condition {
  fact: string;
  operator: Operator;
  value: number | boolean | number[];
}
export type ConditionNode = Condition | ConditionTree;
export type ConditionTree = { all: ConditionNode[] } | { any: ConditionNode[] } | { not: ConditionNode };

export interface RestBody {
  longestDraw: number;
  least: number;
  most?: number | undefined;
  until?: { point: string; level: number } | undefined;
  leastGain?: { kelvin: number; after: number; intake: string; return: string } | undefined;
  frostMayBreak: boolean;
}

export interface RuleBody {
  purpose: 'warm' | 'cool';
  point: string;
  standIns: { point: string; offset: number }[];
  band: { from: string; low: number; high: number }[];
  rest?: RestBody | undefined;
  only?: ConditionTree | undefined;
  season?: { from: string; to: string } | undefined;
  hours?: { from: string; to: string } | undefined;
}
