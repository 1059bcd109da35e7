import type { ReportSection, ReportSpan } from '@/lib/schema/report';

export const SECTION_WORDS: Record<ReportSection, string> = {
  figures: 'Figures',
  nights: 'Every night',
  recovery: 'Recovery',
  money: 'Money',
  book: 'Heap book',
  alarms: 'Alarms, answers and tests',
};
export const SPAN_WORDS: Record<ReportSpan, string> = { week: 'Week', month: 'Month', winter: 'Winter' };
