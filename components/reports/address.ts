/** What the address of a report says: which span, which night is in it, which sections. */
import { type ReportSection, type ReportSpan, SECTIONS, SPANS } from '@/lib/schema/report';

export interface ReportAddress {
  span: ReportSpan;
  night?: string | undefined;
  sections: ReportSection[];
  /** All houses of the holding, one after another. */
  isOfAll: boolean;
}

type Params = Record<string, string | string[] | undefined>;

export function readReportAddress(params: Params): ReportAddress {
  const one = (name: string) => [params[name]].flat()[0];
  const wanted = [params['section']].flat();
  const sections = SECTIONS.filter((section) => wanted.includes(section));
  return {
    span: SPANS.find((span) => span === one('span')) ?? 'week',
    night: one('night'),
    // none chosen is a bare address: all of them
    sections: sections.length === 0 ? [...SECTIONS] : sections,
    isOfAll: one('of') === 'all',
  };
}

export function reportHref(house: string, { span, night, sections, isOfAll }: ReportAddress): string {
  const query = new URLSearchParams({ span });
  if (isOfAll) query.set('of', 'all');
  if (night !== undefined) query.set('night', night);
  if (sections.length < SECTIONS.length) for (const section of sections) query.append('section', section);
  return `/${house}/reports?${query.toString()}`;
}
