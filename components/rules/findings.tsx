'use client';
import { Button } from '@/components/ui/button';
import { classes } from '@/components/ui/classes';
import type { Finding } from '@/lib/schema/rule';
import { capital, counted } from '@/lib/wording/counts';
import { fieldOfPath } from './form-values';

/** What the check found: what keeps the draft out of force first. A press goes to the field. */
export function Findings({ findings, onGo }: { findings: Finding[] | null; onGo: (field: string) => void }) {
  if (findings === null) return null;
  const sorted = [...findings].sort(
    (one, other) => Number(other.level === 'stop') - Number(one.level === 'stop'),
  );
  const hasStop = findings.some((finding) => finding.level === 'stop');
  return (
    <section
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
            const path = finding.paths[0];
            return (
              <li key={place} className="text-[0.95rem]">
                {finding.level === 'stop' ? (
                  <strong className="text-alarm">Keeps it out of force: </strong>
                ) : null}
                {finding.text}
                {path === undefined || path === '' ? null : (
                  <Button kind="quiet" className="-my-2 ml-1 px-1" onClick={() => onGo(fieldOfPath(path))}>
                    <span>
                      Go to the field<span className="sr-only"> {path}</span>
                    </span>
                  </Button>
                )}
              </li>
            );
          })}
        </ul>
      )}
    </section>
  );
}
