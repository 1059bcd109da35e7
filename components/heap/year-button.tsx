'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { send } from '@/components/ui/send';

export interface YearJob {
  kind: string;
  title: string;
  dueOn: string;
  checklist: { text: string }[];
}

/** Sets down the four jobs of a heap's year, each on the next such day; days and lists are then the holding's own. */
export function YearButton({ house, heap, jobs }: { house: string; heap: string; jobs: YearJob[] }) {
  const router = useRouter();
  const [isBusy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  async function setDown() {
    setBusy(true);
    for (const job of jobs) {
      const answer = await send('POST', `/houses/${house}/heap-jobs`, { source: heap, ...job });
      if (answer.ok) continue;
      setFailure(answer.message);
      break;
    }
    setBusy(false);
    router.refresh();
  }
  return (
    <>
      <Button busy={isBusy} onClick={() => void setDown()}>
        Set down the four
      </Button>
      <p className="text-[0.9rem] text-soft">
        With days and lists of common practice for cold winters (no source); change them as you like.
      </p>
      <p role="alert" className="font-semibold text-alarm empty:hidden">
        {failure}
      </p>
    </>
  );
}
