import type { Metadata } from 'next';
import { SetupView } from '@/components/setup/setup-view';
import { KeepFresh } from '@/components/ui/keep-fresh';
import { inHolding } from '@/db/client';
import { readSetup } from '@/db/queries/setup';
import { requireViewer, viewerHouse } from '@/lib/server/next-session';
import { shellFacts } from '@/lib/server/shell';

export const metadata: Metadata = { title: 'Set-up' };

export default async function SetupPage({ params }: { params: Promise<{ house: string }> }) {
  const house = await viewerHouse((await params).house);
  const viewer = await requireViewer();
  const [data, { preferences }] = await Promise.all([
    inHolding(viewer.holdingId, (holding) => readSetup(holding, house)),
    shellFacts(viewer),
  ]);
  return (
    <>
      <KeepFresh everyS={15} />
      <SetupView data={data} allowed={viewer.allowed} preferences={preferences} />
    </>
  );
}
