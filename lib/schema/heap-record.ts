/** Everything that is known of one heap: what the queries look up once, and the page and the interface show. */
import type { CoreTrend } from '@/lib/analysis/core';
import type { Findings } from '@/lib/analysis/heap-facts';
import type { HeatRecord } from '@/lib/analysis/hygiene';
import type { HeapMix } from '@/lib/analysis/material-book';
import type { HeapEntry } from './heap-view';
import type { Material } from './material';
import type { ProbeSet } from './probe-set';

export interface HeapRecord {
  hasCorePoint: boolean;
  /** The newest good reading, if it is no older than a quarter of an hour. */
  core: { value: number; at: number } | null;
  trend: CoreTrend | null;
  /** Newest first. */
  entries: HeapEntry[];
  /** Newest first. */
  rounds: ProbeSet[];
  /** Means of an hour since it was built, or over the last 60 days. */
  curve: { at: number; value: number }[];
  materials: Material[];
  /** Of what went in since it was last built; null where that is not in the book. */
  mix: HeapMix | null;
  heat: HeatRecord | null;
  findings: Findings;
}
