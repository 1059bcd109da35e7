'use client';
import { Button } from '@/components/ui/button';
import { useAppNow } from '@/components/ui/clock';
import type { Claim } from '@/lib/control/types';
import type { RunSeen } from '@/lib/schema/proof';
import { CLAIM_NAMES } from '@/lib/wording/claims';
import { leftWords } from '@/lib/wording/proving';
import { BIG } from './big';
import { useProving } from './context';

/** The count-down of a run that goes on, what the relay says, and the way to stop it. */
export function Running({ run, isOrdered = true }: { run: RunSeen; isOrdered?: boolean }) {
  const { act, busy } = useProving();
  const left = Date.parse(run.until) - useAppNow(200);
  return (
    <div className="flex flex-col gap-3">
      <p className="flex items-baseline gap-3">
        <span
          role="timer"
          aria-label="Seconds left"
          className="font-mono text-[3.2rem] leading-none tabular-nums"
        >
          {leftWords(left, run.seconds)}
        </span>
        <span>s left. It ends by itself.</span>
      </p>
      <p role="status" className={run.heldBy === null ? '' : 'font-semibold text-warn'}>
        {isOrdered ? stands(run) : 'Its coil is on, and the load stands. Nothing has to be ordered.'}
      </p>
      {isOrdered ? (
        <Button kind="alarm" className={BIG} busy={busy} onClick={() => void act('DELETE', 'runs')}>
          Stop now
        </Button>
      ) : null}
    </div>
  );
}

function stands({ heldBy, startedAt, endedAt }: RunSeen): string {
  if (heldBy !== null) {
    const name = Object.hasOwn(CLAIM_NAMES, heldBy) ? CLAIM_NAMES[heldBy as Claim] : heldBy;
    return `It does not run: ${name} decides, and goes before a proving run.`;
  }
  if (startedAt === null) return 'Ordered; the relay has not reported yet.';
  return endedAt === null ? 'The relay reports it on.' : 'The relay reports it off again.';
}
