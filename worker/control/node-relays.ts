/** One node's relays: what is wanted of them, under which number, and what they say of themselves. No I/O, no clock. */
import type { ObservedRelay, State } from '@/lib/control/types';
import {
  commandNumber,
  epochOf,
  leaseS,
  type BootId,
  type Coils,
  type CommandFrame,
  type FallbackSetting,
  type RelaysFrame,
} from '@/lib/field/frames';
import type { ChannelWiring } from '@/db/queries/plan';

/** Wanted coils under a number: equal numbers carry equal channels. */
export interface Order {
  number: number;
  channels: Coils;
  fallback: Record<string, FallbackSetting>;
}

export interface Report {
  /** App time of receipt. */
  at: number;
  boot: BootId;
  channels: Coils;
  number: number;
  /** Nobody commanded the node when it sent this, and it may have run its fallback. */
  isAlone: boolean;
}

/** Coils that fell off with a lease, told once. */
export interface Trip {
  /** Stable name of the trip: boot and count. */
  trip: string;
  /** Channels whose coil was on before it. */
  dropped: ChannelWiring[];
}

const LEASE_MS = leaseS * 1000;
/** The greatest that a date can be: the memory keeps it as JSON, which has no infinity. */
const LAST_INSTANT = 8.64e15;
/** A node's lease ends sooner than it can by our reckoning: by as long as frames are under way. */
const UNDER_WAY_MS = 2000;

export class NodeRelays {
  private wanted: Order | null = null;
  /** The order that may be sent: its switchings are stored. */
  private released: Order | null = null;
  private changedBy = new Map<number, number>();
  private report: Report | null = null;
  private trips: { boot: BootId; count: number } | null;
  /** Coils as last known, over boots and connections. */
  private lastCoils: Coils = {};
  private isLost = false;
  private heldMs = 0;

  constructor(
    private channels: ChannelWiring[],
    /** Latest end that a lease given so far can have; null: none was given. */
    private leaseEndsAt: number | null,
    kept: { boot: BootId; trips: number } | null,
    lastCoils: Coils,
    /** What the worker before left: coils by what counted, and those that were known to be as they were ordered. */
    private readonly former: { counted: Coils; known: Coils } = { counted: lastCoils, known: lastCoils },
  ) {
    this.trips = kept === null ? null : { boot: kept.boot, count: kept.trips };
    this.lastCoils = lastCoils;
  }

  rewire(channels: ChannelWiring[]): void {
    this.channels = channels;
  }

  /** Coils may stay as they are for so long (app ms) after a lease has ended; Infinity: for ever. */
  hold(ms: number): void {
    this.heldMs = ms;
  }

  /** Nothing is known of the coils until they are reported again. */
  lost(): void {
    this.isLost = true;
  }

  get lastReport(): Report | null {
    return this.report;
  }

  get leaseEnd(): number | null {
    return this.leaseEndsAt;
  }

  /**
   * Orders coils by relay number; relays that no channel is wired to are off.
   * @returns the order's number, and whether it is a new one that has to be sent
   */
  order(
    epoch: number,
    relays: number,
    coils: ReadonlyMap<number, State>,
  ): { number: number; isNew: boolean } {
    const channels: Coils = {};
    for (let relay = 1; relay <= relays; relay += 1) channels[String(relay)] = 'off';
    for (const [relay, coil] of coils) channels[String(relay)] = coil;
    const fallback = this.fallbacks();
    const before = this.wanted;
    if (before !== null && sameOrder(before, channels, fallback) && epochOf(before.number) === epoch) {
      return { number: before.number, isNew: false };
    }
    const number = nextNumber(before, epoch);
    const former = before?.channels ?? this.former.known;
    for (const [relay, coil] of Object.entries(channels)) {
      if (former[relay] !== coil) this.changedBy.set(Number(relay), number);
    }
    this.wanted = { number, channels, fallback };
    return { number, isNew: true };
  }

  /** The same coils under a new number: after a trip, or when the node knows a number that is not ours. */
  renumber(epoch: number, above = 0): number {
    const before = this.wanted;
    if (before === null) return 0;
    const number = Math.max(nextNumber(before, epoch), above + 1);
    this.wanted = { ...before, number };
    for (const relay of Object.keys(before.channels)) this.changedBy.set(Number(relay), number);
    return number;
  }

  /** What may be sent from now on: the order of this number, if no later one has been given meanwhile. */
  release(order: Order): void {
    if (this.released === null || order.number >= this.released.number) this.released = order;
  }

  get current(): Order | null {
    return this.wanted;
  }

  /** Nothing of this node is commanded any more: its leases run out. */
  withhold(): void {
    this.released = null;
  }

  /** A command in answer to the `relays` frame that was received at `seenAt`; null where there is nothing to say. */
  command(boot: BootId, seen: number, seenAt: number, canFallback: boolean): CommandFrame | null {
    if (this.released === null) return null;
    const { number, channels, fallback } = this.released;
    this.leaseEndsAt = Math.max(this.leaseEndsAt ?? 0, seenAt + LEASE_MS);
    return {
      type: 'command',
      number,
      lease: leaseS,
      boot,
      seen,
      channels,
      ...(canFallback && Object.keys(fallback).length > 0 ? { fallback } : {}),
    };
  }

  /**
   * Takes a report in.
   * @param canFallback the node can run fallbacks by itself
   * @returns the channels whose relay now says another thing than before, a trip if it tells of a new one, and whether it
   * says anything at all that the report before it did not
   */
  take(
    boot: BootId,
    frame: RelaysFrame,
    at: number,
    canFallback = false,
  ): { changed: ChannelWiring[]; trip: Trip | null; isNews: boolean } {
    const before = this.lastCoils;
    const former = this.report;
    const known = this.trips?.boot === boot ? this.trips.count : 0;
    const changed = this.channels.filter(({ relay }) => {
      const now = frame.channels[String(relay)];
      return now !== undefined && now !== before[String(relay)];
    });
    let trip: Trip | null = null;
    if (frame.trips > known) {
      // one that was ordered on and never heard of may have been on all the same
      const were = former === null ? this.former.counted : before;
      const dropped = this.channels.filter(({ relay, fallback }) => {
        if (were[String(relay)] !== 'on') return false;
        // one that is on again was put on by its fallback: the trip dropped it all the same
        return frame.channels[String(relay)] === 'off' || (canFallback && fallback !== null);
      });
      trip = { trip: `${boot}/${frame.trips}`, dropped };
    }
    this.trips = { boot, count: Math.max(known, frame.trips) };
    const isOver = this.leaseEndsAt === null || at >= this.leaseEndsAt - UNDER_WAY_MS;
    const isAlone = canFallback && (isOver || trip !== null);
    this.report = { at, boot, channels: frame.channels, number: frame.number, isAlone };
    this.lastCoils = { ...before, ...frame.channels };
    const isNews =
      trip !== null || changed.length > 0 || this.isLost || former === null || !saysSame(former, this.report);
    this.isLost = false;
    return { changed, trip, isNews };
  }

  observed(channel: ChannelWiring): ObservedRelay | null {
    const coil = this.isLost ? undefined : this.report?.channels[String(channel.relay)];
    if (this.report === null && this.leaseEndsAt === null) return null;
    const isAlone = this.report?.isAlone === true && coil === 'on' && channel.fallback !== null;
    return {
      ...(isAlone ? { isAlone } : {}),
      reported: coil === undefined ? null : loadState(channel, coil),
      reportedAt: coil === undefined ? null : (this.report?.at ?? null),
      // while its fallback runs, no order of ours stands against what it says
      acknowledges:
        isAlone ||
        (this.report !== null &&
          !this.isLost &&
          this.report.number >= (this.changedBy.get(channel.relay) ?? 0)),
      leaseEndsAt: this.leaseEndsAt === null ? null : Math.min(this.leaseEndsAt + this.heldMs, LAST_INSTANT),
    };
  }

  /** What is worth keeping of the link over a restart of the worker. */
  status(): { boot: BootId; trips: number } | null {
    return this.trips === null ? null : { boot: this.trips.boot, trips: this.trips.count };
  }

  private fallbacks(): Record<string, FallbackSetting> {
    const wired = this.channels.flatMap(({ relay, fallback, lockedOut }) =>
      // Somebody works at a locked-out load: the node must not start it by itself either.
      fallback === null || lockedOut ? [] : [[String(relay), fallback] as const],
    );
    return Object.fromEntries(wired);
  }
}

/** The load's state behind a coil: a normally closed contact runs it while the coil is off. */
export function loadState(channel: { contact: 'NO' | 'NC' }, coil: State): State {
  if (channel.contact === 'NO') return coil;
  return coil === 'on' ? 'off' : 'on';
}

function nextNumber(before: Order | null, epoch: number): number {
  if (before === null || epochOf(before.number) !== epoch) return commandNumber(epoch, 1);
  return before.number + 1;
}

/** But for its time. */
function saysSame(before: Report, now: Report): boolean {
  return (
    before.boot === now.boot &&
    before.number === now.number &&
    before.isAlone === now.isAlone &&
    isSame(before.channels, now.channels)
  );
}

const isSame = (one: object, other: object): boolean => JSON.stringify(one) === JSON.stringify(other);

function sameOrder(before: Order, channels: Coils, fallback: Record<string, FallbackSetting>): boolean {
  return isSame(before.channels, channels) && isSame(before.fallback, fallback);
}
