/** What the page Heap book shows: one heap, what was done to it, and how it went. */
import 'server-only';
import type { Holding } from '@/db/client';
import type { HeapJob } from '@/lib/schema/heap-job';
import { listCalendarLinks } from './calendar-link';
import { listHeapJobs } from './heap-job';
import { heapRows, readHeapRecord, type HeapRecord } from './heap-record';

export interface Heap {
  id: string;
  slug: string;
  name: string;
}

export interface HeapPage {
  heaps: Heap[];
  /** Null in a house without a heap. */
  heap: (Heap & HeapRecord & { coreFloor: number | null; jobs: HeapJob[] }) | null;
  /** Calendar links of who reads. */
  links: { id: string; createdAt: string; lastUsedAt: string | null }[];
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
  const { id, slug, name, coreFloor } = row;
  const record = await readHeapRecord(holding, houseId, row, nowMs);
  const jobs = await listHeapJobs(holding, houseId, id);
  const links = await listCalendarLinks(holding, ask.userId);
  return {
    heaps,
    heap: { ...record, id, slug, name, coreFloor, jobs },
    links: links.map(({ userId: _, ...link }) => link),
  };
}
