'use client';
import { Button } from '@/components/ui/button';
import { useAppNow } from '@/components/ui/clock';
import { CLEAR_HOLDS_MS, type RunKind } from '@/lib/analysis/proof';
import type { Proof } from '@/lib/schema/proof';
import { BIG } from './big';
import { ConfirmStep } from './confirm-step';
import { useProving } from './context';

/** When somebody last looked that nobody is at the load, epoch ms; null: nobody has. */
function clearedAt(proof: Proof | null): number | null {
  const clear = proof?.steps.find((one) => one.step === 'clear');
  return clear?.state === 'done' && clear.record !== null ? Date.parse(clear.record.at) : null;
}

/** Orders a run; where it is long since somebody looked at the load, it asks for that look first. */
export function RunButton({
  kind,
  seconds,
  label,
  isAgain = false,
}: {
  kind: RunKind;
  seconds?: number | undefined;
  label: string;
  /** It has run already: what was seen is asked first. */
  isAgain?: boolean;
}) {
  const { act, busy, proof } = useProving();
  const now = useAppNow();
  const at = clearedAt(proof);
  if (at === null || now - at > CLEAR_HOLDS_MS)
    return (
      <div className="flex flex-col gap-2">
        <p>It is a while since anybody looked at the load. Look again:</p>
        <ConfirmStep step="clear" />
      </div>
    );
  return (
    <Button
      kind={isAgain ? 'plain' : 'primary'}
      className={BIG}
      busy={busy}
      onClick={() => void act('POST', 'runs', { kind, ...(seconds === undefined ? {} : { seconds }) })}
    >
      {label}
    </Button>
  );
}
