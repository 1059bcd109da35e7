'use client';
import Link from 'next/link';
import { useId } from 'react';
import { Button } from '@/components/ui/button';
import { classes } from '@/components/ui/classes';
import type { Finding } from '@/lib/schema/rule';
import type { Findings as Told } from '@/lib/schema/rule-view';
import { capital, counted } from '@/lib/wording/counts';

/** What the check found: what keeps the draft out of force first. A press goes to the field. */
export function Findings({
  told,
  house,
  onGo,
}: {
  told: Told | null;
  house: string;
  onGo: (path: string) => void;
}) {
  if (told === null) return null;
  const { findings, notKnown } = told;
  const sorted = [...findings].sort(
    (one, other) => Number(other.level === 'stop') - Number(one.level === 'stop'),
  );
  const hasStop = findings.some((finding) => finding.level === 'stop');
  return (
    <section
      id="look-at"
      aria-label="Things to look at"
      aria-live="polite"
      className={classes(
        'rounded-lg border border-l-4 border-line bg-sheet p-4',
        hasStop ? 'border-l-alarm' : findings.length > 0 ? 'border-l-warn' : 'border-l-edge',
      )}
    >
      <h2 className="font-semibold">
        {findings.length === 0
          ? 'Nothing to look at'
          : capital(counted(findings.length, 'thing to look at', 'things to look at'))}
      </h2>
      {findings.length === 0 ? (
        <p className="text-[0.95rem] text-soft">The checks found nothing against this draft.</p>
      ) : (
        <ul className="mt-1 flex flex-col gap-2">
          {sorted.map((finding, place) => {
            return (
              <li key={`${place} ${finding.kind}`} className="text-[0.95rem]">
                {finding.level === 'stop' ? (
                  <strong className="text-alarm">Keeps it out of force: </strong>
                ) : null}
                <Remedy finding={finding} house={house} onGo={onGo} />
              </li>
            );
          })}
        </ul>
      )}
      {notKnown.length === 0 ? null : (
        <p className="mt-2 text-[0.9rem] text-soft">Not known yet: {notKnown.join(' ')}</p>
      )}
    </section>
  );
}

/** What is wrong, and where the remedy is: a field of this form, or Wiring for what the rule hangs on. */
function Remedy({ finding, house, onGo }: { finding: Finding; house: string; onGo: (path: string) => void }) {
  const id = useId();
  const path = finding.paths.find((one) => one !== '' && one !== 'channel');
  const said = <span id={id}>{finding.text} </span>;
  if (path === undefined)
    return (
      <>
        {said}
        <Link
          aria-describedby={id}
          href={`/${house}/wiring`}
          className="inline-flex min-h-11 items-center font-semibold underline underline-offset-4"
        >
          Go to Wiring
        </Link>
      </>
    );
  return (
    <>
      {said}
      <Button kind="quiet" aria-describedby={id} className="-my-2 -ml-1 px-1" onClick={() => onGo(path)}>
        Go to the field
      </Button>
    </>
  );
}
