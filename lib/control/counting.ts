/**
 * Which state of a load counts for timers and credit: what its relay reports, if that is fresh and acknowledges the
 * newest order, else what is wanted; and what it is known to be, for interlocks, which trust no wish.
 */
import type { ChannelMemory } from './memory';
import { entry, wakeAt, type Run } from './run';
import type { State } from './types';

const FRESH_MS = 25_000;
/** A node's lease (field protocol): for a gap of which nobody says when the leases can last have ended. */
const LEASE_MS = 30_000;

/** Keeps what the worker says of a channel's relay, and follows a load that dropped by itself. */
export function noteRelay(run: Run, index: number): void {
  let memory = entry(run.channels, index);
  const seen = run.observed.relays[memory.id];
  if (seen === undefined) return;
  const { safe } = entry(run.plan.channels, index);
  const before = memory.relay;
  const { reported, reportedAt, acknowledges, leaseEndsAt, isAlone = false } = seen;
  // a worker that has just started has heard nothing yet, which takes nothing back of what was said before; a node
  // that has had a lease of this one has spoken, and knows no such relay
  const isUnheard = (leaseEndsAt ?? Infinity) <= run.observed.workerStartedAt + LEASE_MS;
  const relay =
    reported === null && before !== null && isUnheard
      ? { ...before, leaseEndsAt }
      : { reported, reportedAt, acknowledges, leaseEndsAt, isAlone, seenAt: run.stepAt };
  memory = { ...memory, relay };
  // it ran by its own report and now says it stands: a lease trip, told as a switching of its own, not of ours
  const ran = before !== null && before.reported !== null && before.reported !== safe;
  const dropped = ran && reported === safe;
  if (dropped && memory.wanted !== safe && isFresh(memory, run.at)) memory.wanted = safe;
  run.channels[index] = memory;
}

/** A lease that was renewed reaches further than the last step knew. */
export function extendLease(run: Run, index: number): void {
  const memory = entry(run.channels, index);
  const until = run.observed.relays[memory.id]?.leaseEndsAt ?? null;
  if (until === null) return;
  const relay = memory.relay ?? {
    reported: null,
    reportedAt: null,
    acknowledges: false,
    leaseEndsAt: until,
    seenAt: run.at,
  };
  if (memory.relay === null || (relay.leaseEndsAt ?? 0) < until)
    run.channels[index] = { ...memory, relay: { ...relay, leaseEndsAt: until } };
}

function isFresh({ relay, orderedAt }: ChannelMemory, at: number): boolean {
  return (
    relay !== null &&
    relay.reported !== null &&
    relay.reportedAt !== null &&
    relay.acknowledges &&
    at - relay.reportedAt < FRESH_MS &&
    (orderedAt === null || orderedAt < relay.seenAt)
  );
}

/** Settles the counted and the known state of a channel at `run.at`. */
export function settleCounted(run: Run, index: number): void {
  const { safe } = entry(run.plan.channels, index);
  const memory = entry(run.channels, index);
  const { relay, wanted } = memory;
  const fresh = isFresh(memory, run.at);
  let counted: State = wanted;
  if (fresh) {
    counted = relay?.reported ?? wanted;
    wakeAt(run, (relay?.reportedAt ?? 0) + FRESH_MS);
  } else {
    const leaseEndsAt = relay?.leaseEndsAt ?? (run.undriven ? (run.awayFrom ?? 0) + LEASE_MS : null);
    if (wanted !== safe && leaseEndsAt !== null) {
      if (run.at >= leaseEndsAt) counted = safe;
      else wakeAt(run, leaseEndsAt);
    }
  }
  const known = knownState(memory, safe, fresh, counted, run.at);
  if (known === null && relay !== null) wakeAt(run, relay.leaseEndsAt ?? 0);
  if (counted === memory.counted && known === memory.known) return;
  const next = { ...memory };
  if (known !== memory.known) {
    next.known = known;
    // without memory it has been so for longer than anybody remembers
    next.knownSince = memory.claim === null ? null : run.at;
  }
  if (counted !== memory.counted) {
    next.counted = counted;
    next.countedSince = run.at;
    // a proving run begins no least time
    next.leastSince = counted === 'on' && memory.prove !== null ? null : run.at;
    // its lease ended: the load dropped, which is no switching of ours
    if (!fresh && counted !== wanted) next.wanted = counted;
  }
  run.channels[index] = next;
}

function knownState(
  memory: ChannelMemory,
  safe: State,
  fresh: boolean,
  counted: State,
  at: number,
): State | null {
  const { relay, wanted, known } = memory;
  // nobody reports here (a trial, or a house without its nodes yet): what is wanted is all there is
  if (relay === null) return counted;
  if (fresh) return relay.reported;
  if (wanted === safe && known === safe) return safe;
  if (relay.leaseEndsAt === null) return wanted === safe ? safe : null;
  if (at >= relay.leaseEndsAt) return safe;
  // a lease holds the coil as it was last known; one that is ordered another way may have followed or not
  return relay.reported !== null && known === wanted ? known : null;
}
