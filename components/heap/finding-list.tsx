import type { Finding, Findings } from '@/lib/analysis/heap-facts';
import type { Preferences } from '@/lib/units/preferences';
import { findingWords } from '@/lib/wording/heap-findings';
import { longDay } from '@/lib/wording/heap';
import { classes } from '@/components/ui/classes';
import { DismissButton } from './dismiss-button';
import { TakeBackButton } from './take-back-button';

const WHEN = { act: 'Now', soon: 'Soon', look: 'To look at' } as const;

/** What to do about the heap, most urgent first; what was set aside stays below, with who and why. */
export function FindingList({
  house,
  heap,
  zone,
  findings,
  mayWrite,
  preferences,
}: {
  house: string;
  heap: string;
  zone: string;
  findings: Findings;
  mayWrite: boolean;
  preferences: Preferences;
}) {
  const { open, dismissed } = findings;
  if (open.length === 0 && dismissed.length === 0) return null;
  return (
    <section aria-labelledby="findings" className="flex flex-col gap-3">
      <h2 id="findings" className="sr-only">
        What to do about the heap
      </h2>
      <div className="grid gap-3 lg:grid-cols-2 lg:items-start">
        {[open.filter((one) => one.urgency !== 'look'), open.filter((one) => one.urgency === 'look')].map(
          (column, place) => (
            <div key={place} className="flex flex-col gap-3 empty:hidden">
              {column.map((finding) => (
                <OpenFinding key={finding.kind} {...{ finding, house, heap, mayWrite, preferences }} />
              ))}
            </div>
          ),
        )}
      </div>
      {dismissed.length === 0 ? null : (
        <details className="rounded-lg border border-line px-4">
          <summary className="flex min-h-11 cursor-pointer items-center text-[0.95rem] text-soft underline underline-offset-4">
            Set aside: {dismissed.map(({ finding }) => lower(titleOf(finding, preferences))).join('; ')}
          </summary>
          <ul className="flex flex-col gap-3 pb-3">
            {dismissed.map(({ finding, dismissal }) => (
              <li key={dismissal.id} className="flex flex-wrap items-start justify-between gap-2">
                <div>
                  <p className="font-semibold">{titleOf(finding, preferences)}</p>
                  <p className="max-w-prose break-words">
                    {dismissal.by}, {longDay(dismissal.at, zone)}: {dismissal.why}
                  </p>
                  <p className="text-[0.9rem] text-soft">It comes back when its evidence is new or worse.</p>
                </div>
                {mayWrite ? <TakeBackButton house={house} dismissal={dismissal.id} /> : null}
              </li>
            ))}
          </ul>
        </details>
      )}
    </section>
  );
}

/** What presses stands open; what is only to be looked at is folded, so that a phone shows the heap sooner. */
function OpenFinding({
  finding,
  house,
  heap,
  mayWrite,
  preferences,
}: {
  finding: Finding;
  house: string;
  heap: string;
  mayWrite: boolean;
  preferences: Preferences;
}) {
  const { urgency, kind, mark, level } = finding;
  const words = findingWords(finding, preferences);
  return (
    <details
      open={urgency !== 'look'}
      className={classes(
        'rounded-lg border border-l-4 border-line bg-sheet px-4',
        urgency === 'act' ? 'border-l-alarm' : urgency === 'soon' ? 'border-l-warn' : 'border-l-edge',
      )}
    >
      <summary className="min-h-11 cursor-pointer py-2.5">
        <h3 className="inline font-semibold">
          <span className={urgency === 'act' ? 'text-alarm' : urgency === 'soon' ? 'text-warn' : 'text-soft'}>
            {WHEN[urgency]}:
          </span>{' '}
          {words.title}
        </h3>
      </summary>
      <p className="max-w-prose">{words.why}</p>
      <p className="mt-1 max-w-prose">
        <strong className="font-semibold">Next:</strong> {words.next}
      </p>
      <div className="mt-1 flex flex-wrap items-end justify-between gap-2 pb-3">
        <p className="min-w-0 flex-1 basis-60 text-[0.9rem] text-soft">
          {words.sure} After: {words.source}.
        </p>
        {mayWrite ? (
          <DismissButton house={house} heap={heap} title={words.title} evidence={{ kind, mark, level }} />
        ) : null}
      </div>
    </details>
  );
}

const titleOf = (finding: Finding, preferences: Preferences) => findingWords(finding, preferences).title;
const lower = (text: string) => `${text.charAt(0).toLowerCase()}${text.slice(1)}`;
