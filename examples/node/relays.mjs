// The relays, under a lease. What this file is for: nothing upstream, and nothing that gets stuck on the way, keeps a coil
// on for longer than the lease. It runs on the monotonic clock, from when we sent the `relays` frame that a command
// answers: a command that was held up on the way is worth less by as long as it was held up.

/** The protocol's lease, s of app time: a command may grant less, never more. */
const LEASE_MOST_S = 30;
/** The server answers the latest frame, so few sending times need be kept. */
const FRAMES_KEPT = 64;

export class Relays {
  /** The highest command number seen, and the leases that ended with a coil on; both since this boot. */
  number = 0;
  trips = 0;
  #wanted;
  #failed = new Set();
  #sentAtMs = new Map();
  #leaseEndsMs = null;
  #commandedTillMs;

  /**
   * @param outputs `set(relay, 'on' | 'off')` and `get(relay)`, which says what the coil is, or null where it cannot be read
   * @param count relays, numbered from 1
   * @param boot the id of this start
   * @param nowMs monotonic
   */
  constructor(outputs, count, boot, nowMs) {
    Object.assign(this, { outputs, count, boot, rate: 1 });
    this.#wanted = new Array(count).fill('off');
    // a board that has just got power waits for its first command as long as a lease before it is alone
    this.#commandedTillMs = nowMs + LEASE_MOST_S * 1000;
    this.#drive(this.#wanted);
  }

  /** App seconds a real second, as a welcome says or the last one said: a lease is in app time. */
  setRate(rate, nowMs) {
    if (this.number === 0) {
      const leftMs = Math.max(0, this.#commandedTillMs - nowMs) * (this.rate / rate);
      this.#commandedTillMs = nowMs + leftMs;
    }
    this.rate = rate;
  }

  /** What every coil is, read back; one that cannot be read is left out, and is never told as on. */
  state() {
    const read = this.#wanted.map((_coil, at) => [String(at + 1), this.#get(at + 1)]);
    const channels = Object.fromEntries(read.filter(([, coil]) => coil !== null));
    return { channels, number: this.number, trips: this.trips };
  }

  /** A new connection: what another one carried can no longer be answered. */
  connected() {
    this.#sentAtMs.clear();
  }

  /** A `relays` frame leaves now: a command may name it. */
  sent(seq, nowMs) {
    this.#sentAtMs.set(seq, nowMs);
    if (this.#sentAtMs.size > FRAMES_KEPT) this.#sentAtMs.delete(this.#sentAtMs.keys().next().value);
  }

  /**
   * Applies a command.
   * @returns `{ ignored: why }`, or `{ changed }`: whether it changed a coil or brought a new number, and is to be reported
   */
  command(frame, nowMs) {
    this.expire(nowMs);
    if (frame.boot !== this.boot) return { ignored: 'it is for another boot' };
    const sentMs = this.#sentAtMs.get(frame.seen);
    if (sentMs === undefined) return { ignored: 'it answers no relays frame of this connection' };
    // numbers go beyond 32 bits: compared as numbers, never shifted
    if (frame.number < this.number) return { ignored: 'a higher number was seen' };
    const endsMs = sentMs + (Math.min(frame.lease, LEASE_MOST_S) * 1000) / this.rate;
    if (endsMs <= nowMs) return { ignored: 'its lease is over' };

    const isRenewal = frame.number === this.number;
    const wanted = this.#wanted.map((_coil, at) => (frame.channels[String(at + 1)] === 'on' ? 'on' : 'off'));
    const changed = !isRenewal || wanted.some((coil, at) => coil !== this.#wanted[at]);
    this.number = frame.number;
    this.#commandedTillMs = Math.max(endsMs, this.#commandedTillMs);
    // a renewal never takes away of a lease; a new command has its own
    const leaseMs = isRenewal ? Math.max(endsMs, this.#leaseEndsMs ?? 0) : endsMs;
    this.#leaseEndsMs = wanted.includes('on') ? leaseMs : null;
    this.#drive(wanted);
    return { changed };
  }

  /** Drops every coil if the lease has ended. @returns whether it did so now */
  expire(nowMs) {
    if (this.#leaseEndsMs === null || nowMs < this.#leaseEndsMs) return false;
    this.#leaseEndsMs = null;
    this.trips += 1;
    this.allOff();
    return true;
  }

  /** When something ends by itself, monotonic ms; null while nothing does. */
  get leaseEndsMs() {
    return this.#leaseEndsMs;
  }

  /** The last command has run out, or none ever came: nobody commands this board. */
  isAlone(nowMs) {
    return nowMs >= this.#commandedTillMs;
  }

  get aloneFromMs() {
    return this.#commandedTillMs;
  }

  /** What the node does by itself while nobody commands it. */
  drive(relay, coil) {
    this.#drive(this.#wanted.map((was, at) => (at + 1 === relay ? coil : was)));
  }

  allOff() {
    this.#drive(this.#wanted.map(() => 'off'));
  }

  /** Outputs that could not be written are tried again; whoever owns the board calls this often. @returns whether all are as meant */
  tryAgain() {
    for (const relay of [...this.#failed]) this.#set(relay);
    return this.#failed.size === 0;
  }

  #drive(wanted) {
    this.#wanted = wanted;
    for (let relay = 1; relay <= this.count; relay += 1) this.#set(relay);
  }

  // one output that fails must not keep the others from being dropped
  #set(relay) {
    try {
      this.outputs.set(relay, this.#wanted[relay - 1]);
      this.#failed.delete(relay);
    } catch (error) {
      if (!this.#failed.has(relay)) console.error(`relay ${relay} cannot be set: ${error.message}`);
      this.#failed.add(relay);
    }
  }

  #get(relay) {
    try {
      return this.outputs.get(relay);
    } catch {
      return null;
    }
  }
}
