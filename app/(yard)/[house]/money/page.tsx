import type { Metadata } from 'next';
import { MoneyView } from '@/components/money/money-view';
import { inHolding } from '@/db/client';
import { readMoney } from '@/db/queries/money-page';
import { appNow } from '@/lib/server/app-clock';
import { requireViewer, viewerHouse } from '@/lib/server/next-session';
import { toLocal } from '@/lib/units/local-time';

export const metadata: Metadata = { title: 'Money' };

export default async function MoneyPage({
  params,
  searchParams,
}: {
  params: Promise<{ house: string }>;
  searchParams: Promise<{ source?: string | string[] }>;
}) {
  const house = await viewerHouse((await params).house);
  const { holdingId, allowed } = await requireViewer();
  const { source } = await searchParams;
  const now = (await appNow()).getTime();
  const slug = typeof source === 'string' ? source : undefined;
  const data = await inHolding(holdingId, (holding) => readMoney(holding, house, slug, now));
  const today = toLocal(now, house.zone).slice(0, 10);
  return <MoneyView {...{ house, data, today }} mayWrite={allowed.includes('money.write')} />;
}
