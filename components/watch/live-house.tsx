'use client';
import { QueryClient, QueryClientProvider, useQuery, useQueryClient } from '@tanstack/react-query';
import { createContext, use, useEffect, useMemo, useRef, useState, type ReactNode } from 'react';
import type { HouseState } from '@/lib/schema/house-state';
import type { WatchAlarm, WatchView } from '@/lib/schema/watch-view';
import type { Preferences } from '@/lib/units/preferences';
import { becauseInstant } from '@/lib/wording/instants';
import type { Scene } from '@/lib/wording/scene';
import { ask, askControl, type Control } from './ask';
import { joinFeed } from './live-feed';
import { useRedraw } from './redraw';

/** What the browser needs of the view: all but the lines and strips, which the server draws. */
export type LiveStart = Omit<WatchView, 'lines' | 'strips' | 'nights' | 'alone' | 'others'> & {
  preferences: Preferences;
  allowed: string[];
  coldest: { value: number; at: number } | null;
};

export type Link = 'joining' | 'live' | 'lost';

export interface LiveHouse extends LiveStart {
  link: Link;
  /** False: it is known that no worker leads. Null: the server does not answer, so nothing is known. */
  controlRuns: boolean | null;
  /** What is shown is what was last known, and relays may stand otherwise by now. */
  isStale: boolean;
  scene: Scene;
  /** Asks anew how things stand, after an order was given. */
  look: () => Promise<void>;
}

const House = createContext<LiveHouse | null>(null);

export function useHouse(): LiveHouse {
  const house = use(House);
  if (house === null) throw new Error('useHouse stands outside LiveHouse');
  return house;
}

type Standing = HouseState & {
  alarms: (Omit<WatchAlarm, 'raisedAt' | 'acknowledgedAt'> &
    Record<'raisedAt' | 'acknowledgedAt', string | number | null>)[];
};

export function LiveHouseProvider({ start, children }: { start: LiveStart; children: ReactNode }) {
  const [client] = useState(
    () => new QueryClient({ defaultOptions: { queries: { retry: false, refetchOnWindowFocus: true } } }),
  );
  return (
    <QueryClientProvider client={client}>
      <Follow start={start}>{children}</Follow>
    </QueryClientProvider>
  );
}

function Follow({ start, children }: { start: LiveStart; children: ReactNode }) {
  const { slug, id } = start.house;
  const client = useQueryClient();
  const redraw = useRedraw(start.rate);
  const [link, setLink] = useState<Link>('joining');
  const isLive = useRef(false);
  const key = useMemo(() => ['house', slug], [slug]);

  const { data } = useQuery<Standing | null>({
    queryKey: key,
    queryFn: () => ask<Standing>(`/houses/${slug}/state`),
    initialData: start.state === null ? null : { ...start.state, alarms: start.alarms },
    staleTime: Infinity,
    refetchInterval: link === 'live' ? 60_000 : 5000,
  });
  const health = useQuery<Control>({
    queryKey: ['health'],
    queryFn: () => askControl(isLive.current),
    initialData: { worker: { up: start.control.runs } },
    staleTime: Infinity,
    refetchInterval: link === 'live' ? 4000 : 2500,
  });

  useEffect(
    () =>
      joinFeed(id, {
        link: (is) => {
          if (typeof is === 'string') {
            setLink(is);
            isLive.current = is === 'live';
            // only a worker that leads lets anybody join; and when it lets go, whether it is gone is asked at once
            if (is === 'live') client.setQueryData<Control>(['health'], { worker: { up: true } });
            else void client.invalidateQueries({ queryKey: ['health'] });
            return;
          }
          // the session or the house has gone: the server says what to show instead
          window.location.reload();
        },
        frame: (frame) => {
          if (frame.type === 'state') {
            client.setQueryData<Standing | null>(key, (before) => ({
              ...frame.state,
              alarms: before?.alarms ?? [],
            }));
            return;
          }
          redraw();
          if (frame.type !== 'switching') void client.invalidateQueries({ queryKey: key });
        },
      }),
    [client, id, key, redraw],
  );

  const alarms = useMemo(
    () =>
      (data?.alarms ?? []).map((alarm) => ({
        ...alarm,
        raisedAt: becauseInstant(alarm.raisedAt) ?? 0,
        acknowledgedAt: becauseInstant(alarm.acknowledgedAt),
      })),
    [data],
  );
  const now = data === null ? start.now : (becauseInstant(data.at) ?? start.now);
  const house: LiveHouse = {
    ...start,
    state: data,
    alarms,
    link,
    controlRuns: health.isError ? null : health.data.worker.up,
    isStale: health.isError || !health.data.worker.up,
    look: () => client.invalidateQueries({ queryKey: key }),
    scene: {
      now,
      zone: start.house.zone,
      preferences: start.preferences,
      points: start.points,
      channels: start.channels,
      sources: start.sources,
    },
  };
  return <House value={house}>{children}</House>;
}
