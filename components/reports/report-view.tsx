import type { NightSummary } from '@/lib/analysis/nights';
import type { SpanOfNights } from '@/lib/analysis/report-span';
import type { ReportSchedule } from '@/lib/schema/report';
import type { ReportBlock } from '@/lib/wording/report';
import type { ReportAddress } from './address';
import { Block } from './block';
import { HeatChart } from './heat-chart';
import { ReportControls } from './report-controls';
import { SchedulesPanel } from './schedules-panel';

export interface ReportViewData {
  title: string;
  house: { slug: string; name: string };
  before: SpanOfNights;
  after: SpanOfNights | null;
  blocks: ReportBlock[];
  sources: { slug: string; name: string; nights: NightSummary[] }[];
}

/** A report as it will lie on paper; above it, and not on paper, what it is of, and to whom it is sent. */
export function ReportView({
  house,
  address,
  report,
  schedules,
  members,
  mayWrite,
}: {
  house: { slug: string; name: string };
  address: ReportAddress;
  report: ReportViewData;
  schedules: ReportSchedule[];
  members: { name: string; email: string }[];
  mayWrite: boolean;
}) {
  const charts = report.sources.filter((source) => source.nights.some((night) => night.heat !== null));
  return (
    <div className="flex flex-col gap-4">
      <h1 className="font-serif text-[1.4rem] leading-[1.38] sm:text-[1.7rem]">
        {house.name}: {report.title}
      </h1>
      <div className="not-on-paper">
        <ReportControls house={house.slug} address={address} report={report} />
      </div>
      <article
        aria-label="Report"
        className="flex flex-col gap-5 rounded-lg border border-line bg-sheet p-4 print:block print:border-0 print:p-0"
      >
        {address.sections.includes('figures')
          ? charts.map((source) => <HeatChart key={source.slug} name={source.name} nights={source.nights} />)
          : null}
        {report.blocks.map((block, at) => (
          <Block key={at} block={block} />
        ))}
        {report.blocks.length === 0 ? <p>There is nothing to tell of these nights.</p> : null}
      </article>
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
