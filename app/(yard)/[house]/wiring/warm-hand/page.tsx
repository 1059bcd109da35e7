import type { Metadata } from 'next';
import { WarmHandView } from '@/components/wiring/warm-hand-view';
import { inHolding } from '@/db/client';
import { listNodes } from '@/db/queries/node';
import { listPoints } from '@/db/queries/point';
import { requireViewer, viewerHouse } from '@/lib/server/next-session';
import { shellFacts } from '@/lib/server/shell';

export const metadata: Metadata = { title: 'Warm-hand test' };

interface Address {
  params: Promise<{ house: string }>;
  searchParams: Promise<{ node?: string | string[] }>;
}

export default async function WarmHandPage({ params, searchParams }: Address) {
  const house = await viewerHouse((await params).house);
  const viewer = await requireViewer();
  const { preferences } = await shellFacts(viewer);
  const [nodes, points] = await inHolding(viewer.holdingId, async (holding) => [
    await listNodes(holding, house.id),
    await listPoints(holding, house.id),
  ]);
  const asked = (await searchParams).node;
  return (
    <WarmHandView
      asked={typeof asked === 'string' ? asked : null}
      {...{ house, nodes, points, preferences }}
    />
  );
}
