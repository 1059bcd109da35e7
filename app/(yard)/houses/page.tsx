import type { Metadata } from 'next';
import { HousesView } from '@/components/duty/houses-view';
import { KeepFresh } from '@/components/ui/keep-fresh';
import { inHolding } from '@/db/client';
import { readHouses } from '@/db/queries/houses-page';
import { requireViewer } from '@/lib/server/next-session';
import { shellFacts } from '@/lib/server/shell';

export const metadata: Metadata = { title: 'All houses' };

export default async function HousesPage() {
  const viewer = await requireViewer();
  const { preferences, now } = await shellFacts(viewer);
  const page = await inHolding(viewer.holdingId, (holding) => readHouses(holding, now));
  return (
    <>
      <KeepFresh everyS={15} />
      <HousesView {...page} now={now} preferences={preferences} />
    </>
  );
}
