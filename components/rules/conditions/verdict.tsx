import type { Verdict as Truth } from '@/lib/control/conditions';
import { classes } from '@/components/ui/classes';

export type Standing = Truth | 'unfinished';

export function standingWords(standing: Standing): string {
  switch (standing) {
    case true:
      return 'holds';
    case false:
      return 'does not hold';
    case null:
      return 'not known, so not met';
    case 'unfinished':
      return 'not finished';
  }
}

/** How it stands now, in words; the mark beside them only helps the eye, by its shape. */
export function Verdict({ standing, now }: { standing: Standing; now?: string | undefined }) {
  return (
    <p className="flex flex-wrap items-center gap-x-2 text-[0.9rem] text-soft">
      <svg aria-hidden="true" viewBox="0 0 12 12" className="size-3 shrink-0" fill="none" strokeWidth="2">
        {standing === true ? (
          <path d="M1.5 6.5l3 3 6-7" className="stroke-house" />
        ) : standing === false ? (
          <path d="M2.5 2.5l7 7M9.5 2.5l-7 7" className="stroke-ink" />
        ) : (
          <circle cx="6" cy="6" r="4" strokeDasharray="2 2" className="stroke-warn" />
        )}
      </svg>
      <span>
        {now === undefined ? null : (
          <>
            now <span className="font-mono">{now}</span>,{' '}
          </>
        )}
        <span className={classes(standing === null && 'text-warn', standing === true && 'text-ink')}>
          {standingWords(standing)}
        </span>
      </span>
    </p>
  );
}
