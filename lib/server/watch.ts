import 'server-only';
import { inHolding } from '@/db/client';
import { readPreferences } from '@/db/queries/preferences';
import { readWatch } from '@/db/queries/watch';
import type { WatchView } from '@/lib/schema/watch-view';
import type { House } from '@/lib/schema/yard-view';
import type { Preferences } from '@/lib/units/preferences';
import { appClock } from './app-clock';
import type { PageViewer } from './next-session';

export interface WatchPageData {
  view: WatchView;
  preferences: Preferences;
  /** Actions that this person may take. */
  allowed: string[];
}

/** @returns null where the house was taken out of use between two looks */
export async function watchPage(viewer: PageViewer, house: House): Promise<WatchPageData | null> {
  const { now, rate } = await appClock();
  const clock = { now: now.getTime(), rate, realAt: Date.now() };
  const view = await inHolding(viewer.holdingId, (holding) => readWatch(holding, house, clock));
  if (view === null) return null;
  return { view, preferences: await readPreferences(viewer.userId), allowed: viewer.allowed };
}
