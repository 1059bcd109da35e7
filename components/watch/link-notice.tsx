'use client';
import { useEffect, useState } from 'react';
import { Age } from '@/components/ui/age';
import { Notice } from '@/components/ui/notice';
import { safeStates } from '@/lib/wording/channel-state';
import { becauseInstant } from '@/lib/wording/instants';
import { useHouse, type LiveHouse } from './live-house';

/** A link that is lost for a breath is nobody's business. */
const PATIENCE_MS = 4000;
/** A stop of a second must still be read. */
const SHOWN_MS = 6000;

export function LinkNotice() {
  const house = useHouse();
  const isLost = useLasting(house.link === 'lost', PATIENCE_MS);
  const at = house.state === null ? null : becauseInstant(house.state.at);
  const shown =
    at === null ? null : (
      <>
        What is shown is from <Age at={at} />.
      </>
    );
  const isDown = useHeld(house.controlRuns === false, SHOWN_MS);
  if (isDown) {
    return (
      <Notice tone="alarm" role="alert" title="Control is not running.">
        <p>
          {fallen(house)} {shown} It is started again by itself; if this stays, restart the machine that runs
          it, and watch the house by hand.
        </p>
      </Notice>
    );
  }
  if (!isLost) return null;
  return house.controlRuns === null ? (
    <Notice tone="warn" role="status" title="This page has lost its link to the server.">
      <p>
        {shown} It is tried again by itself. Rules and rests go on without this page; hand commands cannot be
        given from here.
      </p>
    </Notice>
  ) : (
    <Notice tone="quiet" role="status" title="The live view is interrupted.">
      <p>{shown} It is asked for every 5 s until the link is back. Control runs.</p>
    </Notice>
  );
}

/** "Every relay falls to its safe state within 30 s: gate-heap fan, ground fan stand still." */
function fallen({ channels }: LiveHouse): string {
  const { still, running } = safeStates(channels);
  const states = [
    still.length > 0 && `${still.join(', ')} ${still.length === 1 ? 'is' : 'are'} off`,
    running.length > 0 && `${running.join(', ')} ${running.length === 1 ? 'is' : 'are'} on`,
  ].filter(Boolean);
  return `Every relay is in its safe state, or falls to it within 30 s${states.length === 0 ? '' : `: ${states.join('; ')}`}.`;
}

/** True while `is`, and for a while after. */
function useHeld(is: boolean, ms: number): boolean {
  const [held, setHeld] = useState(is);
  useEffect(() => {
    if (is) {
      setHeld(true);
      return;
    }
    const timer = setTimeout(() => setHeld(false), ms);
    return () => clearTimeout(timer);
  }, [is, ms]);
  return is || held;
}

/** True once `is` has been true for a while without a break. */
function useLasting(is: boolean, ms: number): boolean {
  const [lasting, setLasting] = useState(false);
  useEffect(() => {
    if (!is) {
      setLasting(false);
      return;
    }
    const timer = setTimeout(() => setLasting(true), ms);
    return () => clearTimeout(timer);
  }, [is, ms]);
  return lasting;
}
