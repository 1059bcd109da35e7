import type { SpanOfNights } from '@/lib/analysis/report-span';
import type { ReportSchedule } from '@/lib/schema/report';
import type { Preferences } from '@/lib/units/preferences';
import { housesBlock } from '@/lib/wording/report';
import type { ReportAddress } from './address';
import { Block } from './block';
import { HouseReport, type HouseReportData } from './house-report';
import { ReportControls } from './report-controls';
import { SchedulesPanel } from './schedules-panel';

export interface ReportViewData extends HouseReportData {
  title: string;
  before: SpanOfNights;
  after: SpanOfNights | null;
}

/** A report as it will lie on paper; above it, and not on paper, what it is of; below, to whom it is sent. */
export function ReportView({
  house,
  holding,
  address,
  report,
  reports,
  schedules,
  members,
  preferences,
  mayWrite,
}: {
  house: { slug: string; name: string };
  holding: string;
  address: ReportAddress;
  /** Of this house. */
  report: ReportViewData;
  /** Of all houses, where that is asked for. */
  reports: ReportViewData[] | null;
  schedules: ReportSchedule[];
  members: { name: string; email: string }[];
  preferences: Preferences;
  mayWrite: boolean;
}) {
  const shown = reports ?? [report];
  const isAmong = reports !== null;
  return (
    <div className="flex flex-col gap-4">
      <h1 className="font-serif text-[1.4rem] leading-[1.38] sm:text-[1.7rem]">
        {isAmong ? holding : house.name}: {report.title}
      </h1>
      <div className="not-on-paper">
        <ReportControls house={house.slug} address={address} report={report} />
      </div>
      {isAmong ? (
        <Block
          block={housesBlock(
            shown.map((one) => ({ name: one.house.name, sources: one.sources })),
            preferences,
          )}
        />
      ) : null}
      {shown.map((one) => (
        <HouseReport
          key={one.house.slug}
          report={one}
          hasCharts={address.sections.includes('figures')}
          isAmong={isAmong}
        />
      ))}
      <div className="not-on-paper">
        <SchedulesPanel
          house={house.slug}
          {...{ schedules, members, mayWrite }}
          sections={address.sections}
        />
      </div>
    </div>
  );
}
