import { Panel } from '@/components/ui/panel';
import type { HeapJob } from '@/lib/schema/heap-job';
import { JOB_TEMPLATES, nextDay } from '@/lib/wording/heap-jobs';
import { daysWord, dueWord } from '@/lib/wording/heap-job-days';
import { CalendarLinks } from './calendar-links';
import { JobButton } from './job-button';
import { JobChecklist } from './job-checklist';
import { YearButton, type YearJob } from './year-button';

/** The heap's year: what is due when, with its list; and the calendar that carries it. */
export function JobsPanel({
  house,
  heap,
  today,
  jobs,
  links,
  latitude,
  mayWrite,
}: {
  house: string;
  heap: string;
  /** YYYY-MM-DD in the house's zone. */
  today: string;
  jobs: HeapJob[];
  links: { id: string; createdAt: string; lastUsedAt: string | null }[];
  latitude: number;
  mayWrite: boolean;
}) {
  const open = jobs.filter((job) => job.doneAt === null);
  const done = jobs.filter((job) => job.doneAt !== null);
  return (
    <Panel
      title={<span id="jobs">Jobs of the year</span>}
      actions={mayWrite ? <JobButton house={house} heap={heap} today={today} /> : undefined}
    >
      {jobs.length === 0 ? (
        <div className="flex flex-col items-start gap-2">
          <p className="text-soft">
            None yet. A heap has four: build it, make it ready for the first frost, let it go in spring,
            rebuild it.
          </p>
          {mayWrite ? <YearButton house={house} heap={heap} jobs={yearOf(today, latitude)} /> : null}
        </div>
      ) : null}
      <ul className="divide-y divide-line border-t border-line empty:hidden">
        {open.map((job) => (
          <li key={job.id}>
            <details>
              <summary className="flex min-h-11 cursor-pointer flex-wrap items-baseline justify-between gap-x-4 py-2">
                <span className="font-semibold underline underline-offset-4">{job.title}</span>
                <span className={job.dueOn < today ? 'font-semibold text-warn' : 'text-soft'}>
                  {dueWord(job.dueOn)}, {daysWord(job.dueOn, today)}
                  {job.checklist.length === 0
                    ? null
                    : `; ${job.checklist.filter((item) => item.doneAt !== null).length} of ${job.checklist.length}`}
                </span>
              </summary>
              <JobChecklist house={house} job={job} mayWrite={mayWrite} />
            </details>
          </li>
        ))}
      </ul>
      {done.length === 0 ? null : (
        <details className="border-t border-line">
          <summary className="flex min-h-11 cursor-pointer items-center text-[0.95rem] text-soft underline underline-offset-4">
            Done: {done.length}
          </summary>
          <ul className="flex flex-col gap-1 pb-2">
            {done.map((job) => (
              <li key={job.id}>
                {job.title}, {dueWord((job.doneAt ?? job.dueOn).slice(0, 10))}, {job.doneBy}
              </li>
            ))}
          </ul>
        </details>
      )}
      <CalendarLinks links={links} />
    </Panel>
  );
}

function yearOf(today: string, latitude: number): YearJob[] {
  return JOB_TEMPLATES.map(({ kind, title, day, checklist }) => ({
    ...{ kind, title, dueOn: nextDay(day, today, latitude) },
    checklist: checklist.map((text) => ({ text })),
  }));
}
