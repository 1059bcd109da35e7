'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';

export function TakeBackButton({ house, dismissal }: { house: string; dismissal: string }) {
  const router = useRouter();
  const [isBusy, setBusy] = useState(false);
  async function takeBack() {
    setBusy(true);
    const answer = await send('DELETE', `/houses/${house}/heap-dismissals/${dismissal}`);
    setBusy(false);
    if (answer.ok) router.refresh();
    else say(answer.message);
  }
  return (
    <Button busy={isBusy} onClick={() => void takeBack()}>
      Show it again
    </Button>
  );
}
