'use client';
import { useEffect, useId, useRef, useState } from 'react';
import { useFacts } from '../context';
import type { BuilderActs } from './builder-context';
import { isGroup, type DraftGroup, type DraftNode } from './draft-tree';
import { addFact, addGroup, change, depthOf, findNode, move, remove, type Move } from './edit-tree';
import { CLOCK_FACTS } from './fact-kinds';

/** Deeper than this nobody reads; what a program wrote deeper is shown and can be taken out. */
const DEEPEST = 6;

const MOVED: Record<Move, string> = {
  up: 'moved up',
  down: 'moved down',
  in: 'moved into the group',
  out: 'moved out of the group',
  group: 'put in a group of its own',
  ungroup: 'taken apart',
};

/** Acts on the tree, where the focus goes after each, and what is said of it to who does not see it. */
export function useBuilder(
  root: DraftGroup,
  onChange: (root: DraftGroup) => void,
): { acts: BuilderActs; said: string } {
  const { points } = useFacts();
  const base = useId();
  const [open, setOpen] = useState<string | null>(null);
  const [said, setSaid] = useState('');
  const wanted = useRef<string[]>([]);
  const part = (id: string, of: string) => `${base} ${id} ${of}`;
  // a moved row is a new element, so the focus is set when the page shows the new tree
  useEffect(() => {
    const elements = wanted.current.map((one) => document.querySelector<HTMLElement>(`[data-part="${one}"]`));
    wanted.current = [];
    elements.find((one) => one !== null && !one.matches(':disabled'))?.focus();
  });

  const nameOf = (node: DraftNode | undefined) => {
    if (node === undefined) return 'The condition';
    if (isGroup(node)) return 'The group';
    return points.find((one) => one.key === node.fact)?.name ?? CLOCK_FACTS[node.fact] ?? 'The condition';
  };
  const set = (next: DraftGroup, focus: string[], words: string) => {
    wanted.current = focus;
    setSaid(words);
    onChange(next);
  };
  const placeWords = (next: DraftGroup, id: string) => {
    const found = findNode(next, id);
    return found === null ? '' : `, ${found.place + 1} of ${found.parent.nodes.length}`;
  };

  const acts: BuilderActs = {
    root,
    open,
    toggle: (id) => setOpen(open === id ? null : id),
    part,
    change: (id, how) => onChange(change(root, id, how)),
    addFact: (group) => {
      const next = addFact(root, group);
      set(next.root, [part(next.id, 'fact')], 'A condition is added. Choose what it goes by.');
    },
    addGroup: (group) => {
      const next = addGroup(root, group);
      set(next.root, [part(next.id, 'fact')], 'A group is added, with its first condition.');
    },
    remove: (id) => {
      const found = findNode(root, id);
      const next = remove(root, id);
      const near = found?.parent.nodes[found.place + 1] ?? found?.parent.nodes[found.place - 1];
      setOpen(null);
      set(
        next,
        [
          ...(near === undefined ? [] : [part(near.id, 'tools')]),
          ...(found === null ? [] : [part(found.parent.id, 'add')]),
          part(root.id, 'add'),
        ],
        `${nameOf(found?.node)} is removed.`,
      );
    },
    move: (id, how) => {
      const next = move(root, id, how);
      if (next === null) return;
      const found = findNode(root, id);
      const taken =
        how === 'ungroup' && found !== null && isGroup(found.node) ? found.node.nodes[0] : undefined;
      if (taken !== undefined) setOpen(null);
      const focus = taken === undefined ? [part(id, how), part(id, 'tools')] : [part(taken.id, 'tools')];
      set(next, focus, `${nameOf(found?.node)} is ${MOVED[how]}${placeWords(next, id)}.`);
    },
    canMove: (id, how) => {
      if ((how === 'in' || how === 'group') && depthOf(root, id) >= DEEPEST) return false;
      return move(root, id, how) !== null;
    },
  };
  return { acts, said };
}
