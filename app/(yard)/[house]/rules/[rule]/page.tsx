import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { RuleView } from '@/components/rules/rule-view';
import { inHolding } from '@/db/client';
import { readRule } from '@/db/queries/rules-page';
import { requireViewer, viewerHouse } from '@/lib/server/next-session';
import { shellFacts } from '@/lib/server/shell';

export const metadata: Metadata = { title: 'Rule' };

export default async function RulePage({ params }: { params: Promise<{ house: string; rule: string }> }) {
  const { house: slug, rule } = await params;
  const house = await viewerHouse(slug);
  const viewer = await requireViewer();
  const { preferences, now } = await shellFacts(viewer);
  const data = await inHolding(viewer.holdingId, (holding) => readRule(holding, house, rule, now));
  if (data === null) notFound();
  return <RuleView data={data} allowed={viewer.allowed} preferences={preferences} now={now} />;
}
