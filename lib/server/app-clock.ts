import 'server-only';
import { everyHolding } from '@/db/client';
import { appTime, readClockAnchor, type ClockAnchor } from '@/db/queries/clock';

// An anchor is made once and never changes, so one reading serves; until the worker has made it, app time is real time.
let anchor: ClockAnchor | null = null;

export async function appClock(): Promise<{ now: Date; rate: number }> {
  anchor ??= await readClockAnchor(everyHolding());
  const real = Date.now();
  return anchor === null
    ? { now: new Date(real), rate: 1 }
    : { now: new Date(Math.round(appTime(anchor, real))), rate: anchor.rate };
}

/** App time: what readings, leases, control and the interface go by. */
export async function appNow(): Promise<Date> {
  return (await appClock()).now;
}
