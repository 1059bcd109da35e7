import 'server-only';
import type { Holding } from '@/db/client';
import { addPersonCommand } from '@/db/queries/person-command';
import type { HeapEntry } from '@/lib/schema/heap-view';
import type { House, Source } from '@/lib/schema/yard-view';
import { Problem } from './errors';

interface Act {
  by: string;
  now: Date;
}

/**
 * Somebody's word for a heap's readiness.
 * @returns the order's number
 */
export function orderReady(holding: Holding, house: House, source: Source, act: Act): Promise<number> {
  if (source.ready === null)
    throw new Problem('conflict', { detail: `${source.name} waits for no readiness: it may be drawn on.` });
  const body = { kind: 'ready', source: source.id } as const;
  return addPersonCommand(holding, house.id, { at: act.now, by: act.by, body });
}

/**
 * A heap that was built anew has to show its core again. Built longer ago than that takes, what its core did since stands.
 * @returns the order's number; null where the entry changes nothing
 */
export async function orderRebuilt(
  holding: Holding,
  house: House,
  source: Source,
  entry: HeapEntry,
  act: Act,
): Promise<number | null> {
  if (entry.kind !== 'built' || source.ready === null) return null;
  if (act.now.getTime() - Date.parse(entry.at) >= source.ready.for * 1000) return null;
  const body = { kind: 'rebuilt', source: source.id } as const;
  return addPersonCommand(holding, house.id, { at: act.now, by: act.by, body });
}
