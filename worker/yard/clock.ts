/**
 * The yard's only way to time and chance: its tests hand in another. A node measures spans by the
 * monotonic clock, since a wall clock may be set back and a lease must not grow by it.
 */
import { randomUUID } from 'node:crypto';

export interface Clock {
  /** epoch milliseconds, real time */
  wallMs(): number;
  /** milliseconds that only grow, real time */
  monotonicMs(): number;
  /** runs `then` once after `ms` of real time; the answer calls it off */
  after(ms: number, then: () => void): () => void;
  /** from 0 up to 1 */
  random(): number;
  /** a new id */
  id(): string;
}

export const systemClock: Clock = {
  wallMs: () => Date.now(),
  monotonicMs: () => performance.now(),
  after: (ms, then) => {
    const timer = setTimeout(then, ms);
    return () => clearTimeout(timer);
  },
  random: () => Math.random(),
  id: () => randomUUID(),
};

/** A moment as people and other programs read it. */
export function iso(ms: number): string {
  return new Date(ms).toISOString();
}

/**
 * App time as a node without a clock of its own keeps it: set from `welcome.now`, carried on by the
 * monotonic clock times the rate. At rate 1 the machine's own clock serves until the first welcome.
 */
export class AppTime {
  private anchor: { appMs: number; monotonicMs: number } | undefined;

  constructor(
    private readonly clock: Clock,
    private readonly rate: number,
  ) {
    if (rate === 1) this.anchor = { appMs: clock.wallMs(), monotonicMs: clock.monotonicMs() };
  }

  /** Epoch ms of app time; null before it is known. */
  nowMs(): number | null {
    return this.atMs(this.clock.monotonicMs());
  }

  /** Epoch ms of app time at a monotonic moment; null before it is known. */
  atMs(monotonicMs: number): number | null {
    if (this.anchor === undefined) return null;
    return this.anchor.appMs + (monotonicMs - this.anchor.monotonicMs) * this.rate;
  }

  /** Takes the server's time where ours is unknown or has drifted from it by more than half a second. */
  set(appMs: number): void {
    const now = this.nowMs();
    if (now !== null && Math.abs(now - appMs) <= 500 * this.rate) return;
    this.anchor = { appMs, monotonicMs: this.clock.monotonicMs() };
  }

  /** Real milliseconds in which `seconds` of app time pass. */
  realMs(seconds: number): number {
    return (seconds * 1000) / this.rate;
  }
}
