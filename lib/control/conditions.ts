/**
 * Extra conditions of a rule: json-rules-engine's tree with three-valued logic. A fact without a good reading makes
 * its condition unknown; `not` unknown stays unknown; an unknown root is not met. Operators are the library's to the
 * letter, coercions included, so that with every fact there the verdict is the library's.
 */
import type { Condition, ConditionNode, ConditionTree } from './rule-body';

export type FactValue = number | boolean;
/** null: the fact has no good reading. */
export type Verdict = boolean | null;
/** `limits`: all that the value is compared with. */
export type ReadFact = (fact: string, limits: readonly number[]) => FactValue | null;

export interface CompiledConditions {
  tree: ConditionTree;
  facts: string[];
  verdict: (read: ReadFact) => Verdict;
}

/** `conditions.verdict(read)` is true (met), false, or null (unknown). */
export function compileConditions(tree: ConditionTree): CompiledConditions {
  const facts = new Set<string>();
  collect(tree, facts);
  return { tree, facts: [...facts], verdict: compileNode(tree) };
}

function collect(node: ConditionNode, facts: Set<string>): void {
  if ('all' in node) for (const child of node.all) collect(child, facts);
  else if ('any' in node) for (const child of node.any) collect(child, facts);
  else if ('not' in node) collect(node.not, facts);
  else facts.add(node.fact);
}

function compileNode(node: ConditionNode): (read: ReadFact) => Verdict {
  if ('all' in node) return every(node.all.map(compileNode));
  if ('any' in node) return some(node.any.map(compileNode));
  if ('not' in node) {
    const inner = compileNode(node.not);
    return (read) => not(inner(read));
  }
  const limits = limitsOf(node.value);
  return (read) => holds(node, read(node.fact, limits));
}

/** A list is compared as a whole by the operators that take one number: the library turns it into one. */
const limitsOf = (value: Condition['value']): number[] =>
  [...(Array.isArray(value) ? value : []), Number(value)].filter((one) => !Number.isNaN(one));

/** False if one is false, else unknown if one is unknown. */
function every(parts: ((read: ReadFact) => Verdict)[]): (read: ReadFact) => Verdict {
  return (read) => {
    let verdict: Verdict = true;
    for (const part of parts) {
      const one = part(read);
      if (one === false) return false;
      if (one === null) verdict = null;
    }
    return verdict;
  };
}

/** True if one is true, else unknown if one is unknown. */
function some(parts: ((read: ReadFact) => Verdict)[]): (read: ReadFact) => Verdict {
  return (read) => {
    let verdict: Verdict = false;
    for (const part of parts) {
      const one = part(read);
      if (one === true) return true;
      if (one === null) verdict = null;
    }
    return verdict;
  };
}

const not = (verdict: Verdict): Verdict => (verdict === null ? null : !verdict);

/** One condition against a fact's value; null in, null out. */
export function holds(condition: Condition, fact: FactValue | null): Verdict {
  if (fact === null) return null;
  const { operator, value } = condition;
  switch (operator) {
    case 'equal':
      return fact === value;
    case 'notEqual':
      return fact !== value;
    case 'in':
      return Array.isArray(value) && (value as FactValue[]).includes(fact);
    case 'notIn':
      return Array.isArray(value) && !(value as FactValue[]).includes(fact);
    case 'lessThan':
      return typeof fact === 'number' && fact < Number(value);
    case 'lessThanInclusive':
      return typeof fact === 'number' && fact <= Number(value);
    case 'greaterThan':
      return typeof fact === 'number' && fact > Number(value);
    case 'greaterThanInclusive':
      return typeof fact === 'number' && fact >= Number(value);
  }
}
