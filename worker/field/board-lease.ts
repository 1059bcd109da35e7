/** The lease that a board on Modbus cannot keep, kept for it: it runs from when its coils were reported. */
import { leaseS } from '@/lib/field/frames';
import type { Cancel, Clock } from '../clock';

export class BoardLease {
  private untilMs = 0;
  private cancelEnd: Cancel = () => undefined;

  constructor(
    private readonly clock: Clock,
    private readonly onEnd: () => void,
  ) {}

  get isOver(): boolean {
    return this.clock.monotonicMs() >= this.untilMs;
  }

  /** @param fromMs the clock's monotonic ms */
  runFrom(fromMs: number): void {
    this.untilMs = fromMs + (leaseS * 1000) / this.clock.rate;
    this.cancelEnd();
    this.cancelEnd = this.clock.after(this.untilMs - this.clock.monotonicMs(), this.onEnd);
  }

  /** Nobody is told of its end any more. */
  rest(): void {
    this.cancelEnd();
  }
}
