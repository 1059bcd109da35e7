'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { say } from '@/components/ui/toast';
import { authenticate } from './authenticate';

/** For a phone that was lost: every session but this one ends. */
export function SignOutElsewhere() {
  const router = useRouter();
  const [isBusy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);

  async function end() {
    setBusy(true);
    const refusal = await authenticate('revoke-other-sessions', {});
    setBusy(false);
    setFailure(refusal?.message ?? null);
    if (refusal !== null) return;
    say('You are signed out everywhere else.');
    router.refresh();
  }

  return (
    <>
      <Button busy={isBusy} onClick={() => void end()}>
        Sign out everywhere else
      </Button>
      <p role="alert" className="w-full font-semibold text-alarm empty:hidden">
        {failure}
      </p>
    </>
  );
}
