'use client';
import { useEffect, useState } from 'react';
import { ask } from '@/components/watch/ask';
import type { Channel, House, Point } from '@/lib/schema/yard-view';

export interface Target {
  channels: Channel[];
  points: Point[];
}

/** The holding's houses, and what the chosen one has; asked when the dialog opens. `isLost` says that asking failed. */
export function useTarget(house: string): { houses: House[]; target: Target | null; isLost: boolean } {
  const [houses, setHouses] = useState<House[]>([]);
  const [found, setFound] = useState<{ house: string; target: Target } | null>(null);
  const [isLost, setLost] = useState(false);
  useEffect(() => {
    void ask<{ items: House[] }>('/houses?limit=500')
      .then((list) => setHouses(list.items))
      .catch(() => setLost(true));
  }, []);
  useEffect(() => {
    let isGone = false;
    void Promise.all([
      ask<{ items: Channel[] }>(`/houses/${house}/channels?limit=500`),
      ask<{ items: Point[] }>(`/houses/${house}/points?limit=500`),
    ])
      .then(([channels, points]) => {
        if (isGone) return;
        setFound({ house, target: { channels: channels.items, points: points.items } });
        setLost(false);
      })
      .catch(() => {
        if (!isGone) setLost(true);
      });
    return () => {
      isGone = true;
    };
  }, [house]);
  return { houses, target: found?.house === house ? found.target : null, isLost };
}
