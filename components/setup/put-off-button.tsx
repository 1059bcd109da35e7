'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { send } from '@/components/ui/send';
import { CAN_WAIT, type SetupStep, type SetupStepName } from '@/lib/analysis/setup';
import { STEP_TITLES } from '@/lib/wording/setup';

/** Puts a step off, or takes it up again. It is kept with the house, so whoever goes on sees it. */
export function PutOffButton({
  house,
  putOff,
  step,
  state,
}: {
  house: string;
  putOff: readonly string[];
  step: SetupStepName;
  state: SetupStep['state'];
}) {
  const router = useRouter();
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  const isOff = state === 'put-off';
  if (state === 'done' || !CAN_WAIT.some((one) => one === step)) return null;

  async function change() {
    setBusy(true);
    const next = isOff ? putOff.filter((one) => one !== step) : [...putOff, step];
    const answer = await send('PUT', `/houses/${house}/setup`, { putOff: next });
    setBusy(false);
    setFailure(answer.ok ? null : answer.message);
    if (answer.ok) router.refresh();
  }
  return (
    <>
      <Button kind="quiet" busy={busy} onClick={() => void change()}>
        <span>
          {isOff ? 'Take it up again' : 'Put it off'}
          <span className="sr-only">: {STEP_TITLES[step]}</span>
        </span>
      </Button>
      <p role="alert" className="w-full font-semibold text-alarm empty:hidden">
        {failure}
      </p>
    </>
  );
}
