import type { Metadata } from 'next';
import { KeepFresh } from '@/components/ui/keep-fresh';
import { WiringView } from '@/components/wiring/wiring-view';
import { inHolding } from '@/db/client';
import { readSetup } from '@/db/queries/setup';
import { setupSteps } from '@/lib/analysis/setup';
import { requireViewer, viewerHouse } from '@/lib/server/next-session';
import { shellFacts } from '@/lib/server/shell';
import { readTraining } from '@/lib/server/training';
import { missingSentence } from '@/lib/wording/setup';

export const metadata: Metadata = { title: 'Wiring' };

export default async function WiringPage({ params }: { params: Promise<{ house: string }> }) {
  const house = await viewerHouse((await params).house);
  const viewer = await requireViewer();
  const [{ facts, ...data }, training, { preferences, now }] = await Promise.all([
    inHolding(viewer.holdingId, (holding) => readSetup(holding, house)),
    inHolding(viewer.holdingId, (holding) => readTraining(holding, house)),
    shellFacts(viewer),
  ]);
  return (
    <>
      <KeepFresh everyS={15} />
      <WiringView
        missing={missingSentence(setupSteps(facts))}
        allowed={viewer.allowed}
        {...{ data, training, preferences, now }}
      />
    </>
  );
}
