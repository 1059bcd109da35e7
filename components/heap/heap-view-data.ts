/** What the page Heap book is given. */
import type { HeapJob } from '@/lib/schema/heap-job';
import type { HeapRecord } from '@/lib/schema/heap-record';

export interface HeapViewHouse {
  slug: string;
  name: string;
  zone: string;
  latitude: number;
}

export interface HeapOnPage extends HeapRecord {
  slug: string;
  name: string;
  coreFloor: number | null;
  /** What its core has to show before control draws on it; null where nothing is asked, or it has. */
  notReady: { level: number; forS: number } | null;
  jobs: HeapJob[];
}

export interface HeapViewData {
  heaps: { slug: string; name: string }[];
  heap: HeapOnPage | null;
  links: { id: string; createdAt: string; lastUsedAt: string | null }[];
}
