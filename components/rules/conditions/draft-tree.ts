/**
 * A rule's conditions while they are edited: groups of which all or one must hold, and conditions as they are typed. The
 * `not` of the interface is a mark on a node here, since nobody reads a "not" with one thing in it as a group of its own;
 * two `not` on each other are none. Everything is plain data and a new tree comes of each change.
 */
import type { Condition, ConditionNode, ConditionTree } from '@/lib/control/rule-body';

export interface DraftFact {
  id: string;
  isNegated: boolean;
  fact: string;
  operator: Condition['operator'];
  /** As typed, in the reader's units; several with semicolons between. */
  value: string;
}
export interface DraftGroup {
  id: string;
  isNegated: boolean;
  mode: 'all' | 'any';
  nodes: DraftNode[];
}
export type DraftNode = DraftFact | DraftGroup;

export const isGroup = (node: DraftNode): node is DraftGroup => 'nodes' in node;

/** Ids in order, not by chance: the server and the browser make the same tree of the same body. */
export function draftOf(
  tree: ConditionTree | undefined,
  textOf: (fact: string, value: Condition['value']) => string,
): DraftGroup {
  let made = 0;
  const id = () => `c${(made += 1)}`;
  const draw = (node: ConditionNode, isNegated: boolean): DraftNode => {
    if ('not' in node) return draw(node.not, !isNegated);
    if ('fact' in node) {
      const { fact, operator, value } = node;
      return { id: id(), isNegated, fact, operator, value: textOf(fact, value) };
    }
    const mode = 'all' in node ? 'all' : 'any';
    const own = id();
    const nodes = ('all' in node ? node.all : node.any).map((one) => draw(one, false));
    return { id: own, isNegated, mode, nodes };
  };
  if (tree === undefined) return { id: id(), isNegated: false, mode: 'all', nodes: [] };
  const root = draw(tree, false);
  return isGroup(root) ? root : { id: id(), isNegated: false, mode: 'all', nodes: [root] };
}

/**
 * The tree that a node says, null for a group without conditions. `read` gives a value, or undefined where it cannot be
 * read, and is told where in the body the condition stands, such as `only.all.0.any.1`.
 */
export function treeOf(
  node: DraftNode,
  read: (leaf: DraftFact, path: string) => Condition['value'] | undefined,
  path = 'only',
): ConditionNode | null {
  const inner = innerPath(node, path);
  if (!isGroup(node)) {
    const { fact, operator } = node;
    // what could not be read is told by `read`; the tree is not sent then
    const leaf = { fact, operator, value: read(node, inner) ?? 0 };
    return node.isNegated ? { not: leaf } : leaf;
  }
  const nodes = node.nodes.map((one, place) => treeOf(one, read, `${inner}.${node.mode}.${place}`));
  const filled = nodes.filter((one) => one !== null);
  if (filled.length === 0) return null;
  const group = node.mode === 'all' ? { all: filled } : { any: filled };
  return node.isNegated ? { not: group } : group;
}

/** Where a node's own fields stand in the body: behind its `not`, if it has one. */
export const innerPath = (node: DraftNode, path: string): string => (node.isNegated ? `${path}.not` : path);

/** Every node under this one, itself first. */
export function nodesUnder(node: DraftNode): DraftNode[] {
  return [node, ...(isGroup(node) ? node.nodes.flatMap(nodesUnder) : [])];
}

/** An id that the tree does not have yet. */
export function freshId(root: DraftGroup): string {
  return `c${1 + Math.max(0, ...nodesUnder(root).map((one) => Number(one.id.slice(1)) || 0))}`;
}
