import 'server-only';
import { inHolding } from '@/db/client';
import { readPreferences } from '@/db/queries/preferences';
import { readShell, type HouseBadge } from '@/db/queries/shell';
import type { Preferences } from '@/lib/units/preferences';
import { appClock } from './app-clock';
import type { Viewer } from './auth';

export interface ShellFacts {
  houses: HouseBadge[];
  preferences: Preferences;
  now: number;
  rate: number;
}

/** All that stands round a page, read at once. */
export async function shellFacts(viewer: Viewer): Promise<ShellFacts> {
  const [houses, preferences, clock] = await Promise.all([
    inHolding(viewer.holdingId, readShell),
    readPreferences(viewer.userId),
    appClock(),
  ]);
  return { houses, preferences, now: clock.now.getTime(), rate: clock.rate };
}
