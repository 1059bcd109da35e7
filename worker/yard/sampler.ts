/**
 * When a node takes its readings: at whole multiples of the interval in app time, so that stamps are even,
 * and a restarted node falls into step. A stamp is given once and never goes back.
 */
import type { AppTime } from './clock';

/** How much sooner than asked a timer of Node may come, real ms. */
const timerEarlyMs = 5;

export class Sampler {
  private lastS = 0;

  /**
   * @param take takes the readings of a stamp, Unix seconds
   * @param later runs something once after some real ms, and calls off what it was asked before
   */
  constructor(
    private everyS: number,
    private readonly rate: number,
    private readonly time: AppTime,
    private readonly take: (t: number) => void,
    private readonly later: (ms: number, then: () => void) => void,
  ) {}

  /** True until the first readings have been taken. */
  get isFresh(): boolean {
    return this.lastS === 0;
  }

  setInterval(everyS: number): void {
    this.everyS = everyS;
  }

  /** Takes readings now, where none of this second were taken yet. */
  now(): void {
    this.takeAt(this.time.nowMs() ?? 0);
  }

  /** Waits for the next multiple after `afterMs`; does nothing while the time is not known. */
  schedule(afterMs = this.time.nowMs()): void {
    const appMs = this.time.nowMs();
    if (appMs === null || afterMs === null) return;
    const everyMs = this.everyS * 1000;
    const dueMs = (Math.floor(afterMs / everyMs) + 1) * everyMs;
    this.later(this.time.realMs((dueMs - appMs) / 1000), () => {
      const nowMs = this.time.nowMs() ?? 0;
      // A timer may come a little early, or late after a stall; the time may have been set back meanwhile.
      const isDue = nowMs > dueMs - timerEarlyMs * this.rate;
      const stampMs = Math.max(dueMs, Math.floor(nowMs / everyMs) * everyMs);
      if (isDue) this.takeAt(stampMs);
      this.schedule(isDue ? stampMs : nowMs);
    });
  }

  private takeAt(appMs: number): void {
    const t = Math.floor(appMs / 1000);
    if (t <= this.lastS) return;
    this.lastS = t;
    this.take(t);
  }
}
