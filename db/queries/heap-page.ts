/** What the page Heap book shows: one heap, what was done to it, and how it went. */
import 'server-only';
import type { Holding } from '@/db/client';
import { migrateMemory } from '@/lib/control/memory-versions';
import type { HeapJob } from '@/lib/schema/heap-job';
import type { HeapRecord } from '@/lib/schema/heap-record';
import { listCalendarLinks } from './calendar-link';
import { listHeapJobs } from './heap-job';
import { heapRows, readHeapRecord } from './heap-record';
import { readMemory } from './running';

export interface Heap {
  id: string;
  slug: string;
  name: string;
}

interface HeapStands {
  coreFloor: number | null;
  /** What its core has to show before control draws on it; null where nothing is asked, or it has. */
  notReady: { level: number; forS: number } | null;
}

export interface HeapPage {
  heaps: Heap[];
  /** Null in a house without a heap. */
  heap: (Heap & HeapRecord & HeapStands & { jobs: HeapJob[] }) | null;
  /** Calendar links of who reads. */
  links: { id: string; createdAt: string; lastUsedAt: string | null }[];
}

async function isReady(holding: Holding, houseId: string, sourceId: string): Promise<boolean> {
  const { sources } = migrateMemory((await readMemory(holding, houseId))?.memory);
  return sources.find((one) => one.id === sourceId)?.ready === true;
}

export async function readHeapBook(
  holding: Holding,
  houseId: string,
  ask: { heap?: string | undefined; userId: string },
  nowMs: number,
): Promise<HeapPage> {
  const rows = await heapRows(holding, houseId);
  const heaps = rows.map(({ id, slug, name }) => ({ id, slug, name }));
  const row = rows.find((one) => one.slug === ask.heap) ?? rows[0];
  if (row === undefined) return { heaps, heap: null, links: [] };
  const { id, slug, name, coreFloor, readyLevel: level, readyForS: forS } = row;
  const record = await readHeapRecord(holding, houseId, row, nowMs);
  const jobs = await listHeapJobs(holding, houseId, id);
  const links = await listCalendarLinks(holding, ask.userId);
  return {
    heaps,
    heap: {
      ...{ ...record, id, slug, name, coreFloor, jobs },
      notReady:
        level === null || forS === null || (await isReady(holding, houseId, id)) ? null : { level, forS },
    },
    links: links.map(({ userId: _, ...link }) => link),
  };
}
