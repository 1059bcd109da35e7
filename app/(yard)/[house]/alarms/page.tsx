import type { Metadata } from 'next';
import { AlarmsView } from '@/components/alarms/alarms-view';
import { readBefore } from '@/components/alarms/before';
import { KeepFresh } from '@/components/ui/keep-fresh';
import { inHolding } from '@/db/client';
import { readAlarms } from '@/db/queries/alarms-page';
import { requireViewer, viewerHouse } from '@/lib/server/next-session';
import { shellFacts } from '@/lib/server/shell';

export const metadata: Metadata = { title: 'Alarms' };

export default async function AlarmsPage({
  params,
  searchParams,
}: {
  params: Promise<{ house: string }>;
  searchParams: Promise<{ before?: string | string[] }>;
}) {
  const house = await viewerHouse((await params).house);
  const viewer = await requireViewer();
  const before = readBefore((await searchParams).before);
  const { preferences, now } = await shellFacts(viewer);
  const page = await inHolding(viewer.holdingId, (holding) => readAlarms(holding, house.id, before));
  const { names, ...alarms } = page;
  return (
    <>
      <KeepFresh everyS={5} />
      <AlarmsView
        {...alarms}
        house={house.slug}
        isFirstPage={before === undefined}
        scene={{ ...names, now, zone: house.zone, preferences }}
        mayAnswer={viewer.allowed.includes('alarm.answer')}
      />
    </>
  );
}
