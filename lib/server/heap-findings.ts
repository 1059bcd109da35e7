import 'server-only';
import type { z } from 'zod';
import type { Holding } from '@/db/client';
import { heapRows, readHeapRecord } from '@/db/queries/heap-record';
import type { Finding } from '@/lib/analysis/heap-facts';
import type { HeapFinding } from '@/lib/schema/heap-finding';
import { USUAL } from '@/lib/units/preferences';
import { findingWords } from '@/lib/wording/heap-findings';
import { Problem } from './errors';

type Told = z.infer<typeof HeapFinding>;

/** @throws Problem `not-valid` at `source` for what is no heap of the house */
export async function findingsOfHeap(
  holding: Holding,
  house: { id: string },
  heap: string,
  now: Date,
): Promise<Told[]> {
  const row = (await heapRows(holding, house.id)).find((one) => one.slug === heap || one.id === heap);
  if (row === undefined)
    throw new Problem('not-valid', {
      errors: [{ path: 'source', message: `This house has no heap ${JSON.stringify(heap)}.` }],
    });
  const { findings } = await readHeapRecord(holding, house.id, row, now.getTime());
  return [
    ...findings.open.map((finding) => told(finding, null)),
    ...findings.dismissed.map(({ finding, dismissal: { id, why, by, at } }) =>
      told(finding, { id, why, by, at: new Date(at).toISOString() }),
    ),
  ];
}

function told(finding: Finding, dismissed: Told['dismissed']): Told {
  const { kind, urgency, sure, mark, level } = finding;
  const words = findingWords(finding, USUAL);
  return {
    ...{ kind, urgency, sure, mark, level, dismissed },
    at: new Date(finding.at).toISOString(),
    text: words.title,
    ...{ why: words.why, next: words.next, source: words.source },
  };
}
