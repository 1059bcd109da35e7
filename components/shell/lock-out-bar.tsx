'use client';
import { useCallback, useEffect, useState } from 'react';
import { StandingLockOuts } from '@/components/wiring/lock-outs';
import { joinFeed } from '@/components/watch/live-feed';
import type { Channel, Lockout } from '@/lib/schema/yard-view';

interface Shown {
  lockouts: Lockout[];
  channels: Pick<Channel, 'key' | 'label' | 'number'>[];
}
type Listed<Item> = { items: Item[] };

/** Without the feed a lock-out is still seen within this. */
const LOOK_EVERY_MS = 15_000;

/**
 * What is locked out in this house, large and over every page of it. It follows the live feed, so that a page which has been
 * open for hours tells of a lock-out that was placed a moment ago.
 */
export function LockOutBar({
  house,
  start,
  mayRemove,
}: {
  house: { id: string; slug: string };
  start: Shown;
  mayRemove: boolean;
}) {
  const [shown, setShown] = useState(start);
  // the server rendered this anew
  useEffect(() => setShown(start), [start]);
  const look = useCallback(async () => {
    const lockouts = await ask<Lockout>(`/houses/${house.slug}/lockouts?limit=100`);
    const channels = await ask<Channel>(`/houses/${house.slug}/channels?limit=500`);
    // a link that is lost leaves what was last known: a lock-out is not taken off by silence
    if (lockouts !== null && channels !== null) setShown({ lockouts, channels });
  }, [house.slug]);

  useEffect(() => {
    let lockedOut: string | null = null;
    const leave = joinFeed(house.id, {
      link: (is) => {
        if (is === 'live') void look();
      },
      frame: (frame) => {
        if (frame.type === 'plan') void look();
        if (frame.type !== 'state') return;
        const now = frame.state.channels
          .filter((one) => one.lockedOut)
          .map((one) => one.key)
          .join();
        if (lockedOut !== null && lockedOut !== now) void look();
        lockedOut = now;
      },
    });
    const timer = setInterval(() => {
      if (document.visibilityState === 'visible') void look();
    }, LOOK_EVERY_MS);
    return () => {
      leave();
      clearInterval(timer);
    };
  }, [house.id, look]);

  return (
    <div role="status" aria-live="polite" className="not-on-paper mb-5 flex flex-col gap-3 empty:hidden">
      <StandingLockOuts {...shown} house={house.slug} mayRemove={mayRemove} />
    </div>
  );
}

async function ask<Item>(path: string): Promise<Item[] | null> {
  const response = await fetch(`/api/v1${path}`).catch(() => null);
  if (response?.ok !== true) return null;
  return ((await response.json()) as Listed<Item>).items;
}
