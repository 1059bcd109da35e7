import { RemoveButton } from '@/components/money/remove-button';
import { Panel } from '@/components/ui/panel';
import type { ReportSchedule, ReportSection } from '@/lib/schema/report';
import { nightDate } from '@/lib/wording/duty';
import { ScheduleForm } from './schedule-form';
import { SECTION_WORDS, SPAN_WORDS } from './words';

/** Who is sent which report when its nights have ended. */
export function SchedulesPanel({
  house,
  schedules,
  members,
  sections,
  mayWrite,
}: {
  house: string;
  schedules: readonly ReportSchedule[];
  members: readonly { name: string; email: string }[];
  sections: readonly ReportSection[];
  mayWrite: boolean;
}) {
  return (
    <Panel title="Sent by mail">
      {schedules.length === 0 ? <p className="text-soft">No report is sent yet.</p> : null}
      <ul className="divide-y divide-line empty:hidden">
        {schedules.map((one) => (
          <li key={one.id} className="flex flex-wrap items-center justify-between gap-2 py-2">
            <span className="min-w-0">
              <span className="font-semibold">{SPAN_WORDS[one.span]}</span> to {one.to.join(', ')}
              <span className="block text-[0.85rem] text-soft">
                {one.sections.map((section) => SECTION_WORDS[section]).join(', ')}. {lastWords(one.last)}
              </span>
            </span>
            {mayWrite ? (
              <RemoveButton path={`/houses/${house}/report-schedules/${one.id}`} what="Report by mail" />
            ) : null}
          </li>
        ))}
      </ul>
      {mayWrite ? <ScheduleForm {...{ house, members, sections }} /> : null}
    </Panel>
  );
}

function lastWords(last: ReportSchedule['last']): string {
  if (last === null) return 'None has gone yet.';
  const span = `${nightDate(last.fromNight)} to ${nightDate(last.toNight)}`;
  return last.sentAt === null
    ? `Whether that of ${span} went is not known; it is not sent again by itself.`
    : `The last was of ${span}.`;
}
