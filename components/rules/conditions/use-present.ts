'use client';
import { useMemo } from 'react';
import { useFacts } from '../context';
import { isGroup, type DraftNode } from './draft-tree';
import { factWords, readerOf, standingOf } from './present';
import type { Standing } from './verdict';

/** How a node stands now, and of a condition the value that it goes by. */
export function usePresent(): (node: DraftNode) => { standing: Standing; now: string | undefined } {
  const { now, clock, factOf, preferences } = useFacts();
  return useMemo(() => {
    const read = readerOf(now, clock);
    return (node) => ({
      standing: standingOf(node, read, factOf, preferences),
      now:
        isGroup(node) || node.fact === ''
          ? undefined
          : factWords(node.fact, read(node.fact), factOf, preferences),
    });
  }, [now, clock, factOf, preferences]);
}
