import type { Metadata } from 'next';
import { readReportAddress } from '@/components/reports/address';
import { ReportView } from '@/components/reports/report-view';
import { inHolding } from '@/db/client';
import { listMembers } from '@/db/queries/member';
import { readPreferences } from '@/db/queries/preferences';
import { readReport, readReports } from '@/db/queries/report-page';
import { listReportSchedules } from '@/db/queries/report-schedule';
import { appNow } from '@/lib/server/app-clock';
import { requireViewer, viewerHouse } from '@/lib/server/next-session';

export const metadata: Metadata = { title: 'Reports' };

export default async function ReportsPage({
  params,
  searchParams,
}: {
  params: Promise<{ house: string }>;
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  const house = await viewerHouse((await params).house);
  const { holdingId, holdingName, userId, allowed } = await requireViewer();
  const address = readReportAddress(await searchParams);
  const preferences = await readPreferences(userId);
  const now = (await appNow()).getTime();
  const data = await inHolding(holdingId, async (holding) => ({
    report: await readReport(holding, house, address, preferences, now),
    reports: address.isOfAll ? await readReports(holding, address, preferences, now) : null,
    schedules: await listReportSchedules(holding, house.id),
    members: (await listMembers(holding)).map(({ name, email }) => ({ name, email })),
  }));
  const mayWrite = allowed.includes('report.write');
  return <ReportView {...{ house, address, preferences, mayWrite, ...data }} holding={holdingName} />;
}
