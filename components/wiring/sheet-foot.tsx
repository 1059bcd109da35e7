'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import { ThrowAway } from './throw-away';

/** A sheet's buttons, and the two questions that may come before them: throw away what was typed, take out of use. */
export function SheetFoot({
  save,
  busy,
  isDirty,
  removal,
  path,
  isLeaving,
  setLeaving,
  onClose,
}: {
  save: string;
  busy: boolean;
  isDirty: boolean;
  removal: { word: string; what: string } | null;
  path: string;
  isLeaving: boolean;
  setLeaving: (leaving: boolean) => void;
  onClose: () => void;
}) {
  const router = useRouter();
  const [isRemoving, setRemoving] = useState(false);
  const [isSending, setSending] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);

  async function remove() {
    setSending(true);
    const answer = await send('DELETE', path);
    setSending(false);
    if (!answer.ok) return setFailure(answer.message);
    router.refresh();
    say('It is out of use.');
    onClose();
  }

  const strip =
    'sticky -bottom-5 -mx-5 -mb-5 flex flex-wrap items-center gap-2 border-t border-line bg-sheet px-5 py-3';
  if (isLeaving) {
    return <ThrowAway className={strip} onKeep={() => setLeaving(false)} onThrow={onClose} />;
  }
  if (isRemoving && removal !== null) {
    return (
      <div className={strip}>
        <p role="alert" className="w-full">
          <strong>Take this {removal.word} out of use?</strong> {removal.what}
        </p>
        <Button autoFocus onClick={() => setRemoving(false)}>
          Keep it
        </Button>
        <Button kind="alarm" busy={isSending} onClick={() => void remove()}>
          Take out of use
        </Button>
        <p role="alert" className="w-full font-semibold text-alarm empty:hidden">
          {failure}
        </p>
      </div>
    );
  }
  return (
    <div className={strip}>
      <Button type="submit" kind="primary" busy={busy}>
        {save}
      </Button>
      <Button onClick={() => (isDirty ? setLeaving(true) : onClose())}>Leave as it is</Button>
      {removal === null ? null : (
        <Button kind="quiet" className="ml-auto" onClick={() => setRemoving(true)}>
          Take out of use…
        </Button>
      )}
    </div>
  );
}
