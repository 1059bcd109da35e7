import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { PointView } from '@/components/wiring/point-view';
import { inHolding } from '@/db/client';
import { readPointPage } from '@/db/queries/point-page';
import { requireViewer, viewerHouse } from '@/lib/server/next-session';
import { shellFacts } from '@/lib/server/shell';

export const metadata: Metadata = { title: 'Point' };

export default async function PointPage({ params }: { params: Promise<{ house: string; point: string }> }) {
  const { house: slug, point } = await params;
  const house = await viewerHouse(slug);
  const viewer = await requireViewer();
  const { preferences, now } = await shellFacts(viewer);
  const data = await inHolding(viewer.holdingId, (holding) => readPointPage(holding, house, point, now));
  if (data === null) notFound();
  return <PointView allowed={viewer.allowed} {...{ data, preferences, now }} />;
}
