/** What a node reports, and what is made of it: its `relays` frames, leases that ran out, the log of its fallback. */
import type { SwitchingRow } from '@/db/queries/running';
import { epochOf, leaseS, type LogFrame, type RelaysFrame } from '@/lib/field/frames';
import type { AttachedNode } from './attached-node';
import type { CommandLink } from './command-link';
import type { ControlledHouse, HouseDeps } from './house-deps';
import { aloneRows, reportRows, tripRows } from './house-record';
import type { AloneChange } from './node-fallback';
import { loadState, type Trip } from './node-relays';

/** An epoch this far above ours is a fault of the node, not a restored backup. */
const EPOCH_TRUST = 1000;
/**
 * A report that says what the one before said decides nothing: it goes along with the step of the next pack. This long
 * after it (app time) it is told by itself, long before the core takes the one that it knows for stale.
 */
const TELL_WITHIN_MS = 6000;

export class NodeReports {
  constructor(
    private readonly house: ControlledHouse,
    private readonly deps: HouseDeps,
  ) {}

  /** What each coil really is. Its answer is a command. */
  takeRelays(node: AttachedNode, link: CommandLink, frame: RelaysFrame, at: number): void {
    const { changed, trip, isNews } = node.relays.take(link.boot, frame, at, link.canFallback);
    const report = node.relays.lastReport;
    const turned = new Set([...changed, ...(trip?.dropped ?? [])].map(({ relay }) => relay));
    const alone = node.fallback.takeReport(frame.channels, report?.isAlone === true, at, turned);
    if (alone.length > 0) void this.deps.journal.append(this.noteAlone(node, alone));
    if (report !== null && changed.length > 0) {
      void this.deps.journal.append({ reports: reportRows(this.house.record, changed, report) });
    }
    if (trip !== null) this.noteTrip(node, trip, at);
    const before = node.relays.current?.number;
    if (isNews || alone.length > 0) this.house.step();
    else this.house.stepWithin(TELL_WITHIN_MS / this.deps.clock.rate);
    this.compareNumbers(node, frame.number);
    if (trip !== null && node.relays.current?.number === before) {
      node.relays.renumber(this.deps.epoch());
      node.orders.releaseWhenWritten();
    }
    node.orders.answer();
  }

  /**
   * A node says something of itself; where it tells what its fallback did, that is taken into account at its own times.
   * @returns whether it is kept, or never will be: the node need not say it again
   */
  async takeLog(node: AttachedNode, frame: LogFrame, at: number): Promise<boolean> {
    const taken = node.logs.take(this.house.record, node.wiring.id, frame, at);
    if (taken === null) return true;
    const alone = taken.fallback === null ? [] : node.fallback.takeLog(taken.fallback);
    const entry = { ...this.noteAlone(node, alone), logs: [taken.row] };
    if (taken.fallback !== null) this.house.step();
    return this.deps.journal.keep(entry);
  }

  private compareNumbers(node: AttachedNode, theirs: number): void {
    const ours = this.deps.epoch();
    const seen = epochOf(theirs);
    node.standing.isEpochTooFar = seen > ours + EPOCH_TRUST;
    if (node.standing.isEpochTooFar) return;
    if (seen > ours) return this.deps.raiseEpoch(seen);
    const current = node.relays.current;
    if (seen === ours && current !== null && theirs > current.number) {
      node.relays.renumber(ours, theirs);
      node.orders.release(null);
    }
  }

  /** A trip is stored as what it was; the answer to it carries a new number, whether or not the coils change. */
  private noteTrip(node: AttachedNode, trip: Trip, at: number): void {
    const { record } = this.house;
    this.deps.log.warn(
      { house: record.id, node: node.wiring.key, trip: trip.trip },
      'a lease ran out; coils dropped',
    );
    const droppedAt = Math.min(node.relays.leaseEnd ?? at, at);
    node.fallback.dropped(droppedAt);
    const end = node.relays.leaseEnd;
    // the node counts its trips without their times: it dropped the coil between its last renewal and this report
    const lease = { renewedAt: end === null ? null : end - leaseS * 1000, toldAt: at };
    const switchings = tripRows(record, trip, droppedAt, lease);
    if (switchings.length > 0) node.orders.waitFor(this.deps.journal.append({ switchings }));
  }

  /** What a fallback did is stored as what it was, and whoever looks is told. */
  private noteAlone(node: AttachedNode, changes: readonly AloneChange[]): { switchings: SwitchingRow[] } {
    for (const { channel, at, coil } of changes) {
      this.deps.log.info(
        { house: this.house.id, node: node.wiring.key, channel: channel.key, coil, at },
        'a node ran its fallback',
      );
      this.deps.onSwitching(this.house, channel.number, at, loadState(channel, coil), 'fail-safe');
    }
    return { switchings: aloneRows(this.house.record, changes) };
  }
}
