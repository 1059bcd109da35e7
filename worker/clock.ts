/**
 * The worker's only clock and timers. App time (readings, leases, control) runs at `rate` from an anchor that the database
 * keeps; sessions, lines and leases in the database run in real time; spans are taken on the monotonic clock.
 */
import { everyHolding } from '@/db/client';
import { appTime, keepClockAnchor, readClockAnchor, type ClockAnchor } from '@/db/queries/clock';

export type Cancel = () => void;

export interface Clock {
  readonly rate: number;
  /** App time, epoch ms. */
  appNow(): number;
  /** App time, epoch ms, at a real time, epoch ms. */
  appAt(realAt: number): number;
  /** Real time, epoch ms. */
  realNow(): number;
  monotonicMs(): number;
  /** Runs `work` once after `ms` of real time. */
  after(ms: number, work: () => void): Cancel;
  /** Runs `work` each `ms` of real time. */
  every(ms: number, work: () => void): Cancel;
}

/** Node's timers turn anything longer into one millisecond. */
const LONGEST_TIMER_MS = 2 ** 31 - 1;

export function clockFrom(anchor: ClockAnchor): Clock {
  return {
    rate: anchor.rate,
    appNow: () => appTime(anchor, Date.now()),
    appAt: (realAt) => appTime(anchor, realAt),
    realNow: () => Date.now(),
    monotonicMs: () => performance.now(),
    after(ms, work) {
      const timer = setTimeout(work, Math.min(Math.max(ms, 0), LONGEST_TIMER_MS));
      return () => clearTimeout(timer);
    },
    every(ms, work) {
      const timer = setInterval(work, ms);
      return () => clearInterval(timer);
    },
  };
}

/**
 * The clock of this installation; its anchor is made at the very first start.
 * @param evening app time begins at the last 16:00 UTC instead of now, so that a night can be watched from its dusk on
 * @throws ClockRateError where the database runs at another rate
 */
export async function startClock({
  rate,
  evening = false,
}: {
  rate: number;
  evening?: boolean;
}): Promise<Clock> {
  const db = everyHolding();
  const kept = await readClockAnchor(db);
  const realAt = Date.now();
  const appAt = evening && kept === null ? lastDusk(realAt) : realAt;
  return clockFrom(await keepClockAnchor(db, rate, realAt, appAt));
}

function lastDusk(at: number): number {
  const dayMs = 86_400_000;
  const duskMs = 16 * 3_600_000;
  return Math.floor((at - duskMs) / dayMs) * dayMs + duskMs;
}

export function pause(clock: Clock, ms: number): Promise<void> {
  return new Promise((resolve) => {
    clock.after(ms, resolve);
  });
}

/** Before there is a clock: real time. */
export function pauseReal(ms: number): Promise<void> {
  return new Promise((resolve) => {
    setTimeout(resolve, ms);
  });
}
