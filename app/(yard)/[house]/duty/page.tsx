import type { Metadata } from 'next';
import { readAddress } from '@/components/duty/read-address';
import { readAgainst } from '@/components/duty/against';
import { DutyView } from '@/components/duty/duty-view';
import { inHolding } from '@/db/client';
import { readDuty } from '@/db/queries/duty-page';
import { readPreferences } from '@/db/queries/preferences';
import { appNow } from '@/lib/server/app-clock';
import { requireViewer, viewerHouse } from '@/lib/server/next-session';

export const metadata: Metadata = { title: 'Duty' };

export default async function DutyPage({
  params,
  searchParams,
}: {
  params: Promise<{ house: string }>;
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  const { holdingId, userId } = await requireViewer();
  const house = await viewerHouse((await params).house);
  const address = readAddress(await searchParams);
  const now = (await appNow()).getTime();
  const against = address.against === undefined ? null : readAgainst(address.against);
  const data = await inHolding(holdingId, (holding) => readDuty(holding, house, address, against, now));
  return <DutyView house={house} address={address} data={data} preferences={await readPreferences(userId)} />;
}
