'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { TextField } from '@/components/ui/field';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import { dueWord } from '@/lib/wording/heap-job-days';

interface Link {
  id: string;
  createdAt: string;
  lastUsedAt: string | null;
}

/** The secret address for one's own calendar: told once, ended at any time. */
export function CalendarLinks({ links }: { links: Link[] }) {
  const router = useRouter();
  const [address, setAddress] = useState<string | null>(null);
  const [failure, setFailure] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);
  async function act(work: () => Promise<{ ok: true } | { ok: false; message: string }>) {
    setBusy(true);
    const answer = await work();
    setBusy(false);
    setFailure(answer.ok ? null : answer.message);
    router.refresh();
  }
  const make = () =>
    act(async () => {
      const answer = await send<{ address: string }>('POST', '/calendar-links');
      if (answer.ok) setAddress(answer.value.address);
      return answer;
    });
  const end = (id: string) =>
    act(async () => {
      const answer = await send('DELETE', `/calendar-links/${id}`);
      if (answer.ok) setAddress(null);
      if (answer.ok) say('The link is ended; that calendar learns nothing more.');
      return answer;
    });
  return (
    <details className="border-t border-line">
      <summary className="flex min-h-11 cursor-pointer items-center text-[0.95rem] text-soft underline underline-offset-4">
        In your calendar
      </summary>
      <div className="flex flex-col items-start gap-2 pb-1">
        <p className="text-[0.9rem] text-soft">
          A calendar program that subscribes to this address shows the jobs of all heaps. Whoever has the
          address can read them, and nothing else.
        </p>
        {address === null ? null : (
          <div className="w-full">
            <TextField
              label="Your address, told this once"
              readOnly
              value={address}
              onFocus={(event) => event.target.select()}
            />
          </div>
        )}
        <ul className="w-full divide-y divide-faint empty:hidden">
          {links.map((link) => (
            <li key={link.id} className="flex flex-wrap items-center justify-between gap-2 py-1">
              <span className="text-[0.95rem]">
                Made {dueWord(link.createdAt.slice(0, 10))},{' '}
                {link.lastUsedAt === null
                  ? 'not read yet'
                  : `last read ${dueWord(link.lastUsedAt.slice(0, 10))}`}
              </span>
              <Button disabled={isBusy} onClick={() => void end(link.id)}>
                End it
              </Button>
            </li>
          ))}
        </ul>
        <Button busy={isBusy} onClick={() => void make()}>
          Make an address
        </Button>
        <p role="alert" className="font-semibold text-alarm empty:hidden">
          {failure}
        </p>
      </div>
    </details>
  );
}
