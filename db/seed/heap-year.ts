/** The demo's materials and its heaps' jobs: what the holdings set down when the controller was put in. */
import type { Holding } from '@/db/client';
import { createHeapJob } from '@/db/queries/heap-job';
import { heapRows } from '@/db/queries/heap-record';
import { createMaterial } from '@/db/queries/material';
import { HeapJobCreate } from '@/lib/schema/heap-job';
import { MaterialCreate } from '@/lib/schema/material';
import { toLocal } from '@/lib/units/local-time';
import { JOB_TEMPLATES, nextDay } from '@/lib/wording/heap-jobs';
import type { DemoHouse } from './demo-house';

const DAY_MS = 86_400_000;

const MATERIALS: Record<string, Parameters<typeof MaterialCreate.parse>[0][]> = {
  'larkmoor-growers': [
    {
      name: 'Grass and leaves',
      ...{ density: 170, moisture: 0.62, carbon: 0.46, nitrogen: 0.017 },
      from: 'Dried in the oven in October; carbon and nitrogen half of grass, half of leaves.',
    },
  ],
};

export async function writeMaterials(holding: Holding, slug: string, by: string, now: Date): Promise<void> {
  for (const given of MATERIALS[slug] ?? [])
    await createMaterial(holding, MaterialCreate.parse(given), { by, now });
}

/** @param at when it was set down @param today epoch ms: days are those that come next */
export async function writeHeapYear(
  holding: Holding,
  house: { id: string; of: DemoHouse['house'] },
  act: { by: string; now: Date },
  today: number,
): Promise<void> {
  // one heap of a house: with two, a calendar would have every job twice
  const [heap] = await heapRows(holding, house.id);
  if (heap === undefined) return;
  const day = (at: number) => toLocal(at, house.of.zone).slice(0, 10);
  const jobs = [
    ...JOB_TEMPLATES.map(({ kind, title, day: on, checklist }) => ({
      ...{ kind, title, dueOn: nextDay(on, day(today), house.of.latitude) },
      checklist: checklist.map((text) => ({ text })),
    })),
    {
      ...{ kind: 'own', title: 'Squeeze the north edge again', dueOn: day(today + 3 * DAY_MS) },
      checklist: [
        { text: 'Water it with the can where it is dry' },
        { text: 'Cover back on, hose weights on it' },
      ],
    },
  ];
  for (const job of jobs)
    await createHeapJob(holding, house.id, HeapJobCreate.parse({ source: heap.id, ...job }), act);
}
