'use client';
import { createContext, use } from 'react';
import type { DraftGroup, DraftNode } from './draft-tree';
import type { Move } from './edit-tree';

/** What every part of the builder may do to the tree; focus and what is said of it follow by themselves. */
export interface BuilderActs {
  root: DraftGroup;
  /** The node whose tools are open. */
  open: string | null;
  toggle: (id: string) => void;
  change: (id: string, how: (node: DraftNode) => DraftNode) => void;
  addFact: (group: string) => void;
  addGroup: (group: string) => void;
  remove: (id: string) => void;
  move: (id: string, how: Move) => void;
  /** Whether a move is possible at all. */
  canMove: (id: string, how: Move) => boolean;
  /** Mark of an element that the focus may be brought to: a node's field or tool. */
  part: (id: string, of: string) => string;
}
const Acts = createContext<BuilderActs | null>(null);
export const BuilderActsProvider = Acts.Provider;

export function useActs(): BuilderActs {
  const acts = use(Acts);
  if (acts === null) throw new Error('a part of the condition builder stands outside it');
  return acts;
}
