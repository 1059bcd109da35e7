import type { Metadata } from 'next';
import { Sheet } from '@/components/sheet/sheet';
import { inHolding } from '@/db/client';
import { readSheet } from '@/db/queries/sheet';
import { env } from '@/lib/server/env';
import { requireViewer, viewerHouse } from '@/lib/server/next-session';
import { shellFacts } from '@/lib/server/shell';

export const metadata: Metadata = { title: 'Wiring sheet' };

interface Address {
  params: Promise<{ house: string }>;
  searchParams: Promise<{ paper?: string | string[] }>;
}

export default async function SheetPage({ params, searchParams }: Address) {
  const house = await viewerHouse((await params).house);
  const viewer = await requireViewer();
  const { preferences, now } = await shellFacts(viewer);
  const data = await inHolding(viewer.holdingId, (holding) => readSheet(holding, house));
  const { paper } = await searchParams;
  return (
    <Sheet
      paper={paper === 'a4' || paper === 'letter' ? paper : null}
      address={`${env().PUBLIC_URL}/${house.slug}/wiring`}
      holding={viewer.holdingName}
      {...{ data, preferences, now }}
    />
  );
}
