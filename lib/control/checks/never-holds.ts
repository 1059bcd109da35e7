/**
 * Whether a tree of conditions can hold for any values at all. Each fact is narrowed to the intervals that the
 * conditions leave it; a branch dies when one of them is left with nothing.
 */
import { OPPOSITE, type Condition, type ConditionNode, type Operator } from '../rule-body';

/** A stretch of numbers; ends that are open do not belong to it. */
interface Stretch {
  low: number;
  lowOpen: boolean;
  high: number;
  highOpen: boolean;
}
/** What is left of each fact. */
export type Domains = Map<string, Stretch[]>;

const EVERYTHING: Stretch[] = [{ low: -Infinity, lowOpen: true, high: Infinity, highOpen: true }];
const single = (value: number): Stretch => ({ low: value, lowOpen: false, high: value, highOpen: false });
const range = (from: number, to: number): Stretch[] =>
  Array.from({ length: to - from + 1 }, (_, index) => single(from + index));

const TIME: Record<string, Stretch[]> = {
  'time.hour': range(0, 23),
  'time.month': range(1, 12),
  'time.weekday': range(1, 7),
  'time.sunUp': range(0, 1),
};

/** Branches looked into before the tree counts as one that can hold: beyond any that a person writes. */
const LOOKS = 20_000;

/**
 * True where no values of the facts make the tree true. `known` narrows facts beforehand, such as a point to what
 * its sensor can say. Proved by intervals: never true for a tree that can hold.
 */
export function canNeverHold(
  tree: ConditionNode,
  known: Record<string, { min: number | null; max: number | null }> = {},
): boolean {
  const domains: Domains = new Map();
  for (const [fact, { min, max }] of Object.entries(known))
    domains.set(fact, [
      { low: min ?? -Infinity, lowOpen: min === null, high: max ?? Infinity, highOpen: max === null },
    ]);
  const looks = { left: LOOKS };
  return !canHold([{ node: tree, negated: false }], domains, looks);
}

interface Task {
  node: ConditionNode;
  negated: boolean;
}

function canHold(tasks: Task[], domains: Domains, looks: { left: number }): boolean {
  looks.left -= 1;
  if (looks.left <= 0) return true;
  const [task, ...others] = tasks;
  if (task === undefined) return true;
  const { node, negated } = task;
  if ('not' in node) return canHold([{ node: node.not, negated: !negated }, ...others], domains, looks);
  if ('all' in node || 'any' in node) {
    const children = ('all' in node ? node.all : node.any).map((child) => ({ node: child, negated }));
    // under a `not`, all becomes any and any becomes all
    const together = 'all' in node !== negated;
    if (together) return canHold([...children, ...others], domains, looks);
    return children.some((child) => canHold([child, ...others], domains, looks));
  }
  const left = narrow(domains.get(node.fact) ?? TIME[node.fact] ?? EVERYTHING, node, negated);
  return left.length > 0 && canHold(others, new Map(domains).set(node.fact, left), looks);
}

function narrow(stretches: Stretch[], condition: Condition, negated: boolean): Stretch[] {
  const operator = negated ? OPPOSITE[condition.operator] : condition.operator;
  const values = Array.isArray(condition.value) ? condition.value : [condition.value];
  // a number never equals a truth value, and nothing is less than one: as the conditions themselves have it
  const isTruth = condition.fact === 'time.sunUp';
  const alike = values.filter((value) => (typeof value === 'boolean') === isTruth).map(Number);
  const allowed = isEquality(operator)
    ? allowedValues(operator, alike)
    : isTruth
      ? negated
        ? EVERYTHING
        : []
      : [allowedSide(operator, Number(values[0]))];
  return stretches.flatMap((one) => allowed.flatMap((other) => meet(one, other)));
}

const isEquality = (operator: Operator): boolean => ['equal', 'notEqual', 'in', 'notIn'].includes(operator);

const allowedValues = (operator: Operator, values: number[]): Stretch[] =>
  operator === 'equal' || operator === 'in' ? values.map(single) : between(values);

function allowedSide(operator: Operator, edge: number): Stretch {
  return operator === 'lessThan' || operator === 'lessThanInclusive'
    ? { low: -Infinity, lowOpen: true, high: edge, highOpen: operator === 'lessThan' }
    : { low: edge, lowOpen: operator === 'greaterThan', high: Infinity, highOpen: true };
}

/** Everything but these values. */
function between(values: number[]): Stretch[] {
  const edges = [-Infinity, ...values.toSorted((a, b) => a - b), Infinity];
  return edges
    .slice(1)
    .map((high, index) => ({ low: edges[index] ?? -Infinity, lowOpen: true, high, highOpen: true }));
}

function meet(a: Stretch, b: Stretch): Stretch[] {
  const low = Math.max(a.low, b.low);
  const high = Math.min(a.high, b.high);
  const lowOpen = (a.low === low && a.lowOpen) || (b.low === low && b.lowOpen);
  const highOpen = (a.high === high && a.highOpen) || (b.high === high && b.highOpen);
  if (low > high || (low === high && (lowOpen || highOpen))) return [];
  return [{ low, lowOpen, high, highOpen }];
}
