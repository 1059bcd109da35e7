import type { HeapEntry } from '@/lib/schema/heap-view';

export interface EntryTarget {
  house: string;
  /** Slug of the heap. */
  heap: string;
  zone: string;
  kind: HeapEntry['kind'];
  /** The one that is amended; left out, a new one is written. */
  entry?: HeapEntry;
}
