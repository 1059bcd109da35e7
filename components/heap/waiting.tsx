'use client';
import { useRouter } from 'next/navigation';
import { useCallback, useEffect, useState } from 'react';
import { Button } from '@/components/ui/button';
import { say } from '@/components/ui/toast';
import { deliverAll } from './deliver';
import { rememberBook, type BookFacts } from './book-facts';
import { dropPiece, onOutboxChange, piecesOf, type Piece } from './outbox';

const TRY_EVERY_MS = 30_000;

/** "Waiting to be sent: 2", and the sending. It also keeps on the phone what the book needs without a line. */
export function Waiting({ owner, facts }: { owner: string; facts?: BookFacts }) {
  const router = useRouter();
  const [pieces, setPieces] = useState<Piece[]>([]);
  const [isBusy, setBusy] = useState(false);
  const look = useCallback(() => {
    // a browser that keeps nothing (a private window) has nothing that waits
    piecesOf(owner).then(setPieces, () => undefined);
  }, [owner]);
  const sendNow = useCallback(async () => {
    setBusy(true);
    const sent = await deliverAll(owner).catch(() => 0);
    setBusy(false);
    if (sent === 0) return;
    say(sent === 1 ? 'What waited is sent.' : `Sent: ${sent}.`);
    router.refresh();
  }, [owner, router]);
  useEffect(() => {
    look();
    void sendNow();
    const stop = onOutboxChange(look);
    const tick = setInterval(() => void sendNow(), TRY_EVERY_MS);
    const online = () => void sendNow();
    window.addEventListener('online', online);
    return () => {
      stop();
      clearInterval(tick);
      window.removeEventListener('online', online);
    };
  }, [look, sendNow]);
  useEffect(() => {
    if (facts !== undefined) rememberBook(facts);
  }, [facts]);
  if (pieces.length === 0) return null;
  return (
    <section
      aria-label="Waiting to be sent"
      className="rounded-lg border border-l-4 border-line border-l-warn bg-sheet p-4"
    >
      <div className="flex flex-wrap items-center justify-between gap-2">
        <p role="status" className="font-semibold">
          Waiting to be sent: {pieces.length}
        </p>
        <Button busy={isBusy} onClick={() => void sendNow()}>
          Send now
        </Button>
      </div>
      <p className="text-[0.9rem] text-soft">
        Kept on this device. Sent by itself, once, when there is a line and you are signed in.
      </p>
      <ul className="mt-1 divide-y divide-faint">
        {pieces.map((piece) => (
          <li key={piece.id} className="flex flex-wrap items-center justify-between gap-2 py-1">
            <span className="min-w-0 break-words">
              {piece.label}
              {piece.refused === null ? null : (
                <strong className="block text-[0.9rem] font-semibold text-alarm">
                  Not taken: {piece.refused}
                </strong>
              )}
            </span>
            {piece.refused === null ? null : (
              <Button onClick={() => void dropPiece(piece.id)}>Throw away</Button>
            )}
          </li>
        ))}
      </ul>
    </section>
  );
}
