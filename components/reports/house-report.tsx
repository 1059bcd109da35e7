import type { NightSummary } from '@/lib/analysis/nights';
import type { ReportBlock } from '@/lib/wording/report';
import { Block } from './block';
import { HeatChart } from './heat-chart';

export interface HouseReportData {
  house: { slug: string; name: string };
  blocks: ReportBlock[];
  sources: { slug: string; name: string; nights: NightSummary[] }[];
}

/** One house's part; among several it has its name above it, and begins a sheet. */
export function HouseReport({
  report,
  hasCharts,
  isAmong,
}: {
  report: HouseReportData;
  hasCharts: boolean;
  isAmong: boolean;
}) {
  const charts = hasCharts
    ? report.sources.filter((source) => source.nights.some((night) => night.heat !== null))
    : [];
  return (
    <article
      aria-label={`Report of ${report.house.name}`}
      className={`flex flex-col gap-5 rounded-lg border border-line bg-sheet p-4 print:block print:border-0 print:p-0 ${isAmong ? 'print:break-before-page' : ''}`}
    >
      {isAmong ? <h2 className="font-serif text-[1.4rem]">{report.house.name}</h2> : null}
      {charts.map((source) => (
        <HeatChart key={source.slug} name={source.name} nights={source.nights} />
      ))}
      {report.blocks.map((block, at) => (
        <Block key={at} block={block} level={isAmong ? 3 : 2} />
      ))}
      {report.blocks.length === 0 ? <p>There is nothing to tell of these nights.</p> : null}
    </article>
  );
}
