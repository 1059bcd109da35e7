/** What can be done to the tree of conditions. Each answers the new tree, or null where it cannot be done. */
import { freshId, isGroup, nodesUnder, type DraftFact, type DraftGroup, type DraftNode } from './draft-tree';

export type Move = 'up' | 'down' | 'in' | 'out' | 'group' | 'ungroup';

interface Found {
  /** From the root down to the node's own group. */
  groups: DraftGroup[];
  parent: DraftGroup;
  place: number;
  node: DraftNode;
}

/** Null for the root, which stands in no group. */
export function findNode(root: DraftGroup, id: string, groups: DraftGroup[] = [root]): Found | null {
  const parent = groups.at(-1) ?? root;
  for (const [place, node] of parent.nodes.entries()) {
    if (node.id === id) return { groups, parent, place, node };
    if (!isGroup(node)) continue;
    const found = findNode(root, id, [...groups, node]);
    if (found !== null) return found;
  }
  return null;
}

/** The same tree with one group's nodes changed. A group that is left without any goes too, the root aside. */
function withNodes(root: DraftGroup, id: string, change: (nodes: DraftNode[]) => DraftNode[]): DraftGroup {
  const walk = (group: DraftGroup): DraftGroup => {
    const nodes = (group.id === id ? change(group.nodes) : group.nodes).map((node) =>
      isGroup(node) ? walk(node) : node,
    );
    return { ...group, nodes: nodes.filter((node) => !isGroup(node) || node.nodes.length > 0) };
  };
  return walk(root);
}

export function change(root: DraftGroup, id: string, how: (node: DraftNode) => DraftNode): DraftGroup {
  const walk = (node: DraftNode): DraftNode => {
    const next = isGroup(node) ? { ...node, nodes: node.nodes.map(walk) } : node;
    return next.id === id ? how(next) : next;
  };
  const changed = walk(root);
  return isGroup(changed) ? changed : root;
}

/** Puts an empty condition at the end of a group. */
export function addFact(root: DraftGroup, groupId: string): { root: DraftGroup; id: string } {
  const id = freshId(root);
  const fact: DraftFact = { id, isNegated: false, fact: '', operator: 'greaterThanInclusive', value: '' };
  return { root: withNodes(root, groupId, (nodes) => [...nodes, fact]), id };
}

/** A group inside a group asks for the other thing, or it would say nothing new; it begins with an empty condition. */
export function addGroup(root: DraftGroup, groupId: string): { root: DraftGroup; id: string } {
  const parent = nodesUnder(root).find((one) => one.id === groupId);
  const id = freshId(root);
  const mode = parent !== undefined && isGroup(parent) && parent.mode === 'any' ? 'all' : 'any';
  const first: DraftFact = {
    id: `c${Number(id.slice(1)) + 1}`,
    ...{ isNegated: false, fact: '', operator: 'greaterThanInclusive', value: '' },
  };
  const group: DraftGroup = { id, isNegated: false, mode, nodes: [first] };
  return { root: withNodes(root, groupId, (nodes) => [...nodes, group]), id: first.id };
}

export function remove(root: DraftGroup, id: string): DraftGroup {
  const found = findNode(root, id);
  return found === null
    ? root
    : withNodes(root, found.parent.id, (nodes) => nodes.filter((node) => node.id !== id));
}

export function move(root: DraftGroup, id: string, how: Move): DraftGroup | null {
  const found = findNode(root, id);
  if (found === null) return null;
  const { parent, place, node, groups } = found;
  switch (how) {
    case 'up':
    case 'down': {
      const other = parent.nodes[how === 'up' ? place - 1 : place + 1];
      if (other === undefined) return null;
      const swap = (one: DraftNode) => (one.id === id ? other : one.id === other.id ? node : one);
      return withNodes(root, parent.id, (nodes) => nodes.map(swap));
    }
    case 'in': {
      const [before, after] = [parent.nodes[place - 1], parent.nodes[place + 1]];
      const into = [before, after].find((one) => one !== undefined && isGroup(one));
      if (into === undefined) return null;
      const taken = withNodes(root, parent.id, (nodes) => nodes.filter((one) => one.id !== id));
      return withNodes(taken, into.id, (nodes) => (into === before ? [...nodes, node] : [node, ...nodes]));
    }
    case 'out': {
      const above = groups.at(-2);
      if (above === undefined) return null;
      const put = withNodes(root, above.id, (nodes) =>
        nodes.flatMap((one) => (one.id === parent.id ? [one, { ...node, id: 'moving' }] : [one])),
      );
      const taken = withNodes(put, parent.id, (nodes) => nodes.filter((one) => one.id !== id));
      return change(taken, 'moving', (one) => ({ ...one, id }));
    }
    case 'group': {
      const mode = parent.mode === 'all' ? 'any' : 'all';
      const group: DraftGroup = { id: freshId(root), isNegated: false, mode, nodes: [node] };
      return withNodes(root, parent.id, (nodes) => nodes.map((one) => (one.id === id ? group : one)));
    }
    case 'ungroup':
      if (!isGroup(node)) return null;
      return withNodes(root, parent.id, (nodes) =>
        nodes.flatMap((one) => (one.id === id ? node.nodes : [one])),
      );
  }
}

/** Groups round a node, the root counted: how far it stands in. */
export const depthOf = (root: DraftGroup, id: string): number => findNode(root, id)?.groups.length ?? 0;
