/**
 * The relay board of a node: coils under a lease. No fault upstream can keep a coil on for longer than the
 * lease, since it runs on the node's own monotonic clock from when the node *sent* the `relays` frame that
 * the command answers: a command held up on the way is worth less by the time it was held up.
 *
 * Keeps no timer: whoever owns the board asks `leaseEndsMs` and calls `expire` then.
 */
import { leaseS, type BootId, type Coil, type Coils, type CommandFrame } from '@/lib/field/frames';

export type CommandAnswer =
  { taken: true; changed: boolean; isRenewal: boolean } | { taken: false; why: string };

/** Frames of one connection whose sending times are kept; the server answers the latest, so few are enough. */
const rememberedFrames = 64;

export class RelayBoard {
  private readonly coils: Coil[];
  private readonly sentAtMs = new Map<number, number>();
  private highest = 0;
  private trips = 0;
  private endsMs: number | null = null;
  private commandedTillMs: number;

  /**
   * @param count relays, numbered from 1
   * @param boot the id of this start; a board starts with every coil off
   * @param rate app seconds a real second: the lease is in app time, the monotonic clock in real time
   * @param startMs monotonic; a board that has just started waits for a first command as long as a lease
   */
  constructor(
    readonly count: number,
    readonly boot: BootId,
    private readonly rate: number,
    startMs = 0,
  ) {
    this.commandedTillMs = startMs + (leaseS * 1000) / rate;
    this.coils = Array.from({ length: count }, () => 'off');
  }

  /** What every coil really is, by relay number. */
  state(): { channels: Coils; number: number; trips: number } {
    const channels = Object.fromEntries(this.coils.map((coil, i) => [String(i + 1), coil]));
    return { channels, number: this.highest, trips: this.trips };
  }

  /** A new connection: frames that another one carried can no longer be answered. */
  connected(): void {
    this.sentAtMs.clear();
  }

  /** A `relays` frame is being sent: a command may name it from now on. */
  sent(seq: number, monotonicMs: number): void {
    this.sentAtMs.set(seq, monotonicMs);
    for (const old of this.sentAtMs.keys()) {
      if (this.sentAtMs.size <= rememberedFrames) break;
      this.sentAtMs.delete(old);
    }
  }

  /** When the lease ends on the monotonic clock; null while no coil is held by one. */
  leaseEndsMs(): number | null {
    return this.endsMs;
  }

  /**
   * When the last command runs out, on the monotonic clock, whether or not it had a coil on; nobody commands the board
   * from then on.
   */
  get aloneFromMs(): number {
    return this.commandedTillMs;
  }

  /** The node's own doing while nobody commands it. */
  drive(relay: number, coil: Coil): void {
    if (relay >= 1 && relay <= this.count) this.coils[relay - 1] = coil;
  }

  /** Applies a command, or says why it is ignored. */
  command(frame: CommandFrame, monotonicMs: number): CommandAnswer {
    this.expire(monotonicMs);
    if (frame.boot !== this.boot) return { taken: false, why: 'it is for another boot' };
    const sentMs = this.sentAtMs.get(frame.seen);
    if (sentMs === undefined) return { taken: false, why: 'it answers no relays frame of this connection' };
    if (frame.number < this.highest) return { taken: false, why: 'a higher number was seen' };
    const endsMs = sentMs + (Math.min(frame.lease, leaseS) * 1000) / this.rate;
    if (endsMs <= monotonicMs) return { taken: false, why: 'it came after its lease' };

    const isRenewal = frame.number === this.highest;
    const changed = this.coils.map((coil, i) => coil !== wanted(frame, i + 1)).includes(true);
    this.highest = frame.number;
    this.commandedTillMs = Math.max(endsMs, this.commandedTillMs);
    this.coils.forEach((_coil, i) => (this.coils[i] = wanted(frame, i + 1)));
    // A lease is held for coils that are on; without one nothing can drop, and nothing is to be counted.
    this.endsMs = this.coils.includes('on') ? Math.max(endsMs, this.endsMs ?? 0) : null;
    return { taken: true, changed, isRenewal };
  }

  /** Drops every coil if the lease has ended. @returns true where that happened now */
  expire(monotonicMs: number): boolean {
    if (this.endsMs === null || monotonicMs < this.endsMs) return false;
    this.endsMs = null;
    this.coils.fill('off');
    this.trips += 1;
    return true;
  }
}

/** The coil that a command wants; a relay that it does not name is off. */
function wanted(frame: CommandFrame, relay: number): Coil {
  return frame.channels[String(relay)] ?? 'off';
}
