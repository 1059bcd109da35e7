'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import { day } from '@/lib/units/time';
import { capital } from '@/lib/wording/counts';

export interface Invitation {
  id: string;
  email: string;
  role: string;
  expiresAt: number;
}

/** Who was invited and has not answered yet. */
export function Invitations({ invitations, zone }: { invitations: Invitation[]; zone: string }) {
  const router = useRouter();
  const [busy, setBusy] = useState<string | null>(null);
  const [failure, setFailure] = useState<string | null>(null);
  if (invitations.length === 0) return null;

  async function takeBack(invitation: Invitation) {
    setBusy(invitation.id);
    const answer = await send('DELETE', `/invitations/${invitation.id}`);
    setBusy(null);
    setFailure(answer.ok ? null : answer.message);
    if (!answer.ok) return;
    say('The invitation is taken back.');
    router.refresh();
  }

  return (
    <div className="mt-4">
      <h3 className="pb-1 font-semibold">Invited, no answer yet</h3>
      <ul className="divide-y divide-line border-y border-line">
        {invitations.map((one) => (
          <li key={one.id} className="flex flex-wrap items-center justify-between gap-2 py-1.5">
            <span className="min-w-0 break-all">
              {one.email}
              <span className="text-soft">
                , {capital(one.role)}, good until {day(one.expiresAt, zone)}
              </span>
            </span>
            <Button busy={busy === one.id} onClick={() => void takeBack(one)}>
              Take back<span className="sr-only"> the invitation of {one.email}</span>
            </Button>
          </li>
        ))}
      </ul>
      <p role="alert" className="pt-2 font-semibold text-alarm empty:hidden">
        {failure}
      </p>
    </div>
  );
}
