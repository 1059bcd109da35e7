'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';

/** Takes out what stands on one row. */
export function RemoveButton({ path, what }: { path: string; what: string }) {
  const router = useRouter();
  const [isBusy, setBusy] = useState(false);
  async function remove() {
    setBusy(true);
    const answer = await send('DELETE', path);
    setBusy(false);
    say(answer.ok ? `${what} is taken out.` : answer.message);
    if (answer.ok) router.refresh();
  }
  return (
    <Button busy={isBusy} onClick={() => void remove()}>
      Take out<span className="sr-only"> {what}</span>
    </Button>
  );
}
