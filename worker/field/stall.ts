/**
 * Notices that the process stood still (stopped, swapped out, a blocked loop). What lies in the sockets then may be old, and a
 * command in answer to an old `relays` frame would drive by a state that is past. So each line is asked for a pong first.
 */
import type { Base } from '../base';
import type { Cancel } from '../clock';

const TICK_MS = 250;
/** reliability.md: no command older than 2 s. */
const STALL_MS = 2000;

export interface Pinged {
  ping(mark: string): void;
}

export class Stall {
  private tickedAtMs: number;
  private count = 0;
  private readonly suspects = new Map<Pinged, string>();
  private readonly lines = new Set<Pinged>();
  private readonly cancel: Cancel;

  constructor(private readonly base: Pick<Base, 'clock' | 'log'>) {
    this.tickedAtMs = base.clock.monotonicMs();
    this.cancel = base.clock.every(TICK_MS, () => this.tick());
  }

  add(line: Pinged): void {
    this.lines.add(line);
  }

  remove(line: Pinged): void {
    this.lines.delete(line);
    this.suspects.delete(line);
  }

  /** Whether what came from this line may have lain there for too long. */
  isSuspect(line: Pinged): boolean {
    // After a stall the sockets are read before the timers run.
    if (this.base.clock.monotonicMs() - this.tickedAtMs > STALL_MS) return true;
    return this.suspects.has(line);
  }

  pong(line: Pinged, mark: Buffer): void {
    if (this.suspects.get(line) === mark.toString()) this.suspects.delete(line);
  }

  stop(): void {
    this.cancel();
  }

  private tick(): void {
    const now = this.base.clock.monotonicMs();
    const stoodMs = now - this.tickedAtMs;
    this.tickedAtMs = now;
    if (stoodMs <= STALL_MS) return;
    this.count += 1;
    this.base.log.warn(
      { stoodMs: Math.round(stoodMs) },
      'this process stood still; no line is answered before its pong',
    );
    for (const line of this.lines) {
      const mark = `stall ${this.count}`;
      this.suspects.set(line, mark);
      line.ping(mark);
    }
  }
}
