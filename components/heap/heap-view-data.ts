/** What the page Heap book is given. */
import type { CoreTrend } from '@/lib/analysis/core';
import type { Findings } from '@/lib/analysis/heap-facts';
import type { HeatRecord } from '@/lib/analysis/hygiene';
import type { HeapMix } from '@/lib/analysis/material-book';
import type { HeapJob } from '@/lib/schema/heap-job';
import type { HeapEntry } from '@/lib/schema/heap-view';
import type { Material } from '@/lib/schema/material';
import type { ProbeSet } from '@/lib/schema/probe-set';

export interface HeapViewHouse {
  slug: string;
  name: string;
  zone: string;
  latitude: number;
}

export interface HeapOnPage {
  slug: string;
  name: string;
  coreFloor: number | null;
  hasCorePoint: boolean;
  core: { value: number; at: number } | null;
  trend: CoreTrend | null;
  entries: HeapEntry[];
  rounds: ProbeSet[];
  curve: { at: number; value: number }[];
  materials: Material[];
  mix: HeapMix | null;
  heat: HeatRecord | null;
  findings: Findings;
  jobs: HeapJob[];
}

export interface HeapViewData {
  heaps: { slug: string; name: string }[];
  heap: HeapOnPage | null;
  links: { id: string; createdAt: string; lastUsedAt: string | null }[];
}
