import type { Metadata } from 'next';
import { HeapView } from '@/components/heap/heap-view';
import { ownerOf } from '@/components/heap/outbox';
import { KeepFresh } from '@/components/ui/keep-fresh';
import { inHolding } from '@/db/client';
import { readHeapBook } from '@/db/queries/heap-page';
import { requireViewer, viewerHouse } from '@/lib/server/next-session';
import { shellFacts } from '@/lib/server/shell';
import { toLocal } from '@/lib/units/local-time';

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
  const { userId, holdingId, email, name: person, allowed } = viewer;
  const ask = { heap: typeof heap === 'string' ? heap : undefined, userId };
  const data = await inHolding(holdingId, (holding) => readHeapBook(holding, house.id, ask, now));
  const reader = { owner: ownerOf({ holding: holdingId, email }), person };
  const today = toLocal(now, house.zone).slice(0, 10);
  return (
    <>
      <KeepFresh everyS={60} />
      <HeapView {...{ house, data, allowed, reader, preferences, now, today }} />
    </>
  );
}
