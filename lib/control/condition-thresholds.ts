/** The values with which a rule's extra conditions compare points. */
import type { Condition, ConditionNode } from './rule-body';
import { entry, type Run } from './run';
import { at, past, type Threshold } from './threshold';

/** @param overTime the clock alone is to turn the channel, so that a condition can bear on that though on nothing now */
export function conditionThresholds(run: Run, rule: number, overTime: boolean): Threshold[] {
  const { only } = entry(run.plan.rules, rule);
  if (only === null) return [];
  return leaves(only.tree).flatMap((leaf) => {
    const point = run.plan.pointPlaces.get(leaf.fact);
    return point === undefined ? [] : ofLeaf(run, point, leaf, overTime);
  });
}

/** Whether a condition of any rule asks whether some point is at this value. */
export const isAskedFor = (run: Run, value: number): boolean =>
  run.plan.rules.some(
    ({ only }) => only !== null && leaves(only.tree).some((leaf) => namesItself(leaf, value)),
  );

const namesItself = ({ operator, value }: Condition, asked: number): boolean =>
  Array.isArray(value)
    ? value.includes(asked)
    : (operator === 'equal' || operator === 'notEqual') && value === asked;

function leaves(node: ConditionNode): Condition[] {
  if ('all' in node) return node.all.flatMap(leaves);
  if ('any' in node) return node.any.flatMap(leaves);
  return 'not' in node ? leaves(node.not) : [node];
}

/** A point is a number: nothing that it does meets true or false, nor a list where one number is asked for. */
function ofLeaf(run: Run, point: number, { operator, value }: Condition, overTime: boolean): Threshold[] {
  const compared = { of: 'band', overTime } as const;
  switch (operator) {
    case 'in':
    case 'notIn':
      return Array.isArray(value) ? value.flatMap((one) => at(run, point, one, compared)) : [];
    case 'equal':
    case 'notEqual':
      return typeof value === 'number' ? at(run, point, value, compared) : [];
    default: {
      const lowIncludes = operator === 'lessThanInclusive' || operator === 'greaterThan';
      return typeof value === 'number' ? past(run, point, value, { ...compared, lowIncludes }) : [];
    }
  }
}
