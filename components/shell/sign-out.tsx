'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { forgetBook } from '@/components/heap/book-facts';

/** Leaves by a whole page load, so that nothing of the holding stays in the browser's memory. */
export function SignOut() {
  const [failed, setFailed] = useState(false);
  async function leave() {
    const response = await fetch('/api/auth/sign-out', {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: '{}',
    }).catch(() => null);
    if (response?.ok !== true) return setFailed(true);
    forgetBook();
    window.location.assign('/sign-in');
  }
  return (
    <>
      <Button onClick={() => void leave()}>Sign out</Button>
      <p role="alert" className="text-[0.9rem] font-semibold text-alarm empty:hidden">
        {failed ? 'You are still signed in: the server did not answer. Try again.' : null}
      </p>
    </>
  );
}
