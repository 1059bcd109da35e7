import { heapCautions } from '@/lib/wording/heap';
import type { EntryTarget } from './entry-target';

/** What to mind while doing it. */
export function Cautions({ kind }: { kind: EntryTarget['kind'] | 'probed' }) {
  const cautions = heapCautions(kind);
  if (cautions.length === 0) return <p>What was done and seen, kept with its time and your name.</p>;
  return (
    <ul className="flex list-disc flex-col gap-1 rounded-md border border-line border-l-4 border-l-warn py-2 pl-7 pr-3 text-[0.95rem]">
      {cautions.map((caution) => (
        <li key={caution}>{caution}</li>
      ))}
    </ul>
  );
}
