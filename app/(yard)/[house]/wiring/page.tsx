import type { Metadata } from 'next';
import { KeepFresh } from '@/components/ui/keep-fresh';
import { WiringView } from '@/components/wiring/wiring-view';
import { inHolding } from '@/db/client';
import { readWiring } from '@/db/queries/wiring-page';
import { requireViewer, viewerHouse } from '@/lib/server/next-session';
import { shellFacts } from '@/lib/server/shell';
import { readTraining } from '@/lib/server/training';

export const metadata: Metadata = { title: 'Wiring' };

export default async function WiringPage({ params }: { params: Promise<{ house: string }> }) {
  const house = await viewerHouse((await params).house);
  const viewer = await requireViewer();
  const [data, training, { preferences, now }] = await Promise.all([
    inHolding(viewer.holdingId, (holding) => readWiring(holding, house)),
    inHolding(viewer.holdingId, (holding) => readTraining(holding, house)),
    shellFacts(viewer),
  ]);
  return (
    <>
      <KeepFresh everyS={15} />
      <WiringView
        data={data}
        training={training}
        allowed={viewer.allowed}
        preferences={preferences}
        now={now}
      />
    </>
  );
}
