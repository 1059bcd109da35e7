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
      {open.map((finding) => {
        const words = findingWords(finding, preferences);
        return (
          <article
            key={finding.kind}
            className={classes(
              'rounded-lg border border-l-4 border-line bg-sheet p-4',
              finding.urgency === 'act' ? 'border-l-alarm' : 'border-l-warn',
            )}
          >
            <h3 className="font-semibold">
              <span className={finding.urgency === 'act' ? 'text-alarm' : 'text-warn'}>
                {WHEN[finding.urgency]}:
              </span>{' '}
              {words.title}
            </h3>
            <p className="max-w-prose">{words.why}</p>
            <p className="mt-1 max-w-prose">
              <strong className="font-semibold">Next:</strong> {words.next}
            </p>
            <div className="mt-1 flex flex-wrap items-end justify-between gap-2">
              <p className="text-[0.9rem] text-soft">
                {words.sure} After: {words.source}.
              </p>
              {mayWrite ? (
                <DismissButton
                  house={house}
                  heap={heap}
                  title={words.title}
                  evidence={{ kind: finding.kind, mark: finding.mark, level: finding.level }}
                />
              ) : null}
            </div>
          </article>
        );
      })}
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

const titleOf = (finding: Finding, preferences: Preferences) => findingWords(finding, preferences).title;
const lower = (text: string) => `${text.charAt(0).toLowerCase()}${text.slice(1)}`;
