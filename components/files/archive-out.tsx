'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { send } from '@/components/ui/send';
import type { Archive } from '@/lib/schema/archive';
import { megabytes } from './files-data';

/** Asks for an archive, and has the browser fetch it: it is made while it is sent, however large it is. */
export function ArchiveOut({ one, onAsked }: { one: Archive | null; onAsked: (made: Archive) => void }) {
  const [failure, setFailure] = useState('');
  const [isBusy, setBusy] = useState(false);

  async function ask() {
    setBusy(true);
    const answer = await send<Archive>('POST', '/archives/out');
    setBusy(false);
    setFailure(answer.ok ? '' : answer.message);
    if (!answer.ok) return;
    onAsked(answer.value);
    // an attachment: the page stays where it is
    window.location.assign(`/api/v1/archives/${answer.value.id}/file`);
  }
  const isUnderWay = one?.state === 'asked' || one?.state === 'sending';
  return (
    <div className="flex flex-col items-start gap-3">
      <h3 className="font-semibold">Take it away</h3>
      <p className="max-w-prose text-soft">
        One file with everything of this holding: houses and wiring, rules with all their versions, every
        reading and switching, nights, the heap book with its photographs, money, alarms and the audit log.
        Passwords, tokens of nodes, keys of programs and settings of mail stay here; people are listed by
        name, e-mail and role. Keep it like the holding’s papers: whoever has it can read all of that.
      </p>
      <Button busy={isBusy || isUnderWay} onClick={() => void ask()}>
        Make an archive
      </Button>
      <p role="status" className="text-[0.95rem] empty:hidden">
        {one?.state === 'sent' ? `${one.name} went out, ${megabytes(one.bytes)}.` : ''}
        {one?.state === 'broken-off' ? `${one.name} broke off on its way; make it anew.` : ''}
        {isUnderWay ? 'Your browser fetches it; leave it running.' : ''}
      </p>
      <p role="alert" className="font-semibold text-alarm empty:hidden">
        {failure}
      </p>
    </div>
  );
}
