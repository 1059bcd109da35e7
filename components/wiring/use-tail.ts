'use client';
import { useEffect, useState } from 'react';
import { joinFeed } from '@/components/watch/live-feed';
import type { TailRecord } from '@/lib/live/frames';

const PACKS_MOST = 10;

export type TailLink = 'joining' | 'live' | 'lost' | 'closed';

export interface TailPack {
  id: number;
  records: TailRecord[];
}

/** Follows what comes from a node, over the live feed; the newest pack first. */
export function useTail(houseId: string, node: string): { packs: TailPack[]; link: TailLink } {
  const [packs, setPacks] = useState<TailPack[]>([]);
  const [link, setLink] = useState<TailLink>('joining');
  useEffect(() => {
    let count = 0;
    return joinFeed(
      houseId,
      {
        frame: (frame) => {
          if (frame.type !== 'tail' || frame.node !== node) return;
          count += 1;
          const pack = { id: count, records: frame.records };
          setPacks((before) => [pack, ...before].slice(0, PACKS_MOST));
        },
        link: (is) => setLink(typeof is === 'string' ? is : 'closed'),
      },
      // asked for again on every connection: the worker keeps nothing of a reader that is gone
      { type: 'tail', node },
    );
  }, [houseId, node]);
  return { packs, link };
}
