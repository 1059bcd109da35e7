'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';

/** "I've got it": others see who has it. The alarm stands until its cause is gone. */
export function TakeOn({ alarm }: { alarm: string }) {
  const router = useRouter();
  const [isBusy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);

  async function take() {
    setBusy(true);
    const answer = await send('POST', `/alarms/${alarm}/acknowledge`, {});
    setBusy(false);
    setFailure(answer.ok ? null : answer.message);
    if (!answer.ok) return;
    say('You have it. Others see that.');
    router.refresh();
  }

  return (
    <div className="flex flex-col gap-1">
      <Button kind="primary" busy={isBusy} onClick={() => void take()}>
        I’ve got it
      </Button>
      <p role="alert" className="max-w-60 text-[0.9rem] font-semibold text-alarm empty:hidden">
        {failure}
      </p>
    </div>
  );
}
