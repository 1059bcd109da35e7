import type { Metadata } from 'next';
import { HeapView } from '@/components/heap/heap-view';
import { KeepFresh } from '@/components/ui/keep-fresh';
import { inHolding } from '@/db/client';
import { readHeapBook } from '@/db/queries/heap-page';
import { requireViewer, viewerHouse } from '@/lib/server/next-session';
import { shellFacts } from '@/lib/server/shell';

export const metadata: Metadata = { title: 'Heap book' };

export default async function HeapBookPage({
  params,
  searchParams,
}: {
  params: Promise<{ house: string }>;
  searchParams: Promise<{ heap?: string | string[] }>;
}) {
  const house = await viewerHouse((await params).house);
  const viewer = await requireViewer();
  const { heap } = await searchParams;
  const { preferences, now } = await shellFacts(viewer);
  const ask = { heap: typeof heap === 'string' ? heap : undefined };
  const data = await inHolding(viewer.holdingId, (holding) => readHeapBook(holding, house.id, ask, now));
  return (
    <>
      <KeepFresh everyS={60} />
      <HeapView house={house} data={data} allowed={viewer.allowed} preferences={preferences} now={now} />
    </>
  );
}
