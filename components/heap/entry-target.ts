import type { HeapEntry } from '@/lib/schema/heap-view';

export interface EntryTarget {
  house: string;
  /** Slug of the heap. */
  heap: string;
  zone: string;
  kind: HeapEntry['kind'];
  /** Of the outbox: holding and person. */
  owner: string;
  /** The one that is amended; left out, a new one is written. */
  entry?: HeapEntry;
}
