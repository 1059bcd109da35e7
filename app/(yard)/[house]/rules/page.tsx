import type { Metadata } from 'next';
import { RulesView } from '@/components/rules/rules-view';
import { KeepFresh } from '@/components/ui/keep-fresh';
import { inHolding } from '@/db/client';
import { readRules } from '@/db/queries/rules-page';
import { health } from '@/lib/server/health';
import { requireViewer, viewerHouse } from '@/lib/server/next-session';
import { shellFacts } from '@/lib/server/shell';

export const metadata: Metadata = { title: 'Rules' };

export default async function RulesPage({ params }: { params: Promise<{ house: string }> }) {
  const house = await viewerHouse((await params).house);
  const viewer = await requireViewer();
  const [data, { preferences }, { worker }] = await Promise.all([
    inHolding(viewer.holdingId, (holding) => readRules(holding, house)),
    shellFacts(viewer),
    health(),
  ]);
  return (
    <>
      <KeepFresh everyS={15} />
      <RulesView
        data={{ ...data, controlRuns: worker.up }}
        allowed={viewer.allowed}
        preferences={preferences}
      />
    </>
  );
}
