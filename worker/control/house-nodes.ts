/** The nodes of one house: their relays, their links, and what is sent to them. */
import type { ChannelWiring, HouseRecord, NodeWiring } from '@/db/queries/plan';
import type { SwitchingRow } from '@/db/queries/running';
import type { Memory } from '@/lib/control/memory';
import type { StepResult } from '@/lib/control/step-result';
import type { ObservedRelay, State } from '@/lib/control/types';
import {
  epochOf,
  type BootId,
  type CommandFrame,
  type HelloFrame,
  type LogFrame,
  type RefusedRecord,
  type RelaysFrame,
} from '@/lib/field/frames';
import type { HouseState } from '@/lib/schema/house-state';
import type { ControlledHouse, HouseDeps } from './house-deps';
import { aloneRows, reportRows, tripRows } from './house-record';
import { keptAlone, NodeFallback, type AloneChange } from './node-fallback';
import { NodeLogs } from './node-logs';
import { refusalsOfBoot, withRefused } from './node-refusals';
import { NodeRelays, loadState, type Order, type Trip } from './node-relays';
import { houseState, type NodeStanding } from './state';

/** One connection of a node, as control sees it. */
export interface CommandLink {
  readonly boot: BootId;
  readonly canFallback: boolean;
  /** The latest `relays` frame on this connection: its seq, and when it came (app time); null before the first. */
  readonly seen: { seq: number; at: number } | null;
  /** @param madeAtMs monotonic; a command that would leave late is not sent */
  sendCommand(frame: CommandFrame, madeAtMs: number): void;
  close(code: number, why: string): void;
}

interface Attached {
  wiring: NodeWiring;
  relays: NodeRelays;
  fallback: NodeFallback;
  logs: NodeLogs;
  link: CommandLink | null;
  standing: NodeStanding;
  /** Relays that the node itself says it has. */
  relayCount: number;
  status: Record<string, unknown>;
  /** What is worth keeping in the node's row, as long as it has not been kept. */
  isNoted: boolean;
  /** Orders whose switchings are still being written. */
  pending: number;
  tail: Promise<unknown>;
}

/** An epoch this far above ours is a fault of the node, not a restored backup. */
const EPOCH_TRUST = 1000;

export class HouseNodes {
  private readonly nodes = new Map<string, Attached>();

  constructor(
    private readonly house: ControlledHouse,
    memory: Memory,
    formerLeaseEnd: number | null,
    private readonly deps: HouseDeps,
  ) {
    const known = new Map(memory.channels.map((one) => [one.id, one.relay?.reported ?? one.wanted]));
    for (const wiring of house.record.nodes) this.add(wiring, formerLeaseEnd, known);
  }

  /** Nodes may have come, gone, or lost their token. */
  rewire(record: HouseRecord): void {
    const wirings = new Map(record.nodes.map((one) => [one.id, one]));
    for (const [id, node] of this.nodes) {
      const wiring = wirings.get(id);
      if (wiring === undefined) {
        node.link?.close(1008, 'this node was taken out of use');
        this.nodes.delete(id);
      } else {
        node.wiring = wiring;
        node.relays.rewire(this.channelsOf(id));
      }
    }
    for (const wiring of record.nodes) if (!this.nodes.has(wiring.id)) this.add(wiring, null, new Map());
  }

  attach(nodeId: string, link: CommandLink): void {
    const node = this.nodes.get(nodeId);
    if (node === undefined) return link.close(1008, 'this node was taken out of use');
    node.link = link;
    node.standing.online = true;
    this.heard(nodeId);
    this.house.step();
  }

  detach(nodeId: string, link: CommandLink): void {
    const node = this.nodes.get(nodeId);
    if (node === undefined || node.link !== link) return;
    node.link = null;
    node.standing.online = false;
    this.house.step();
  }

  /** Something came from this node: a frame, a pong, a pack by HTTP. */
  heard(nodeId: string): void {
    const node = this.nodes.get(nodeId);
    if (node === undefined) return;
    node.standing.lastHeardAt = this.deps.clock.appNow();
    node.isNoted = true;
  }

  /** What a node says of itself at the beginning of a connection. */
  greet(nodeId: string, hello: HelloFrame, at: number): void {
    const node = this.nodes.get(nodeId);
    if (node === undefined) return;
    const { firmware, channels, clock } = hello;
    node.status = {
      ...node.status,
      ...refusalsOfBoot(node.status, hello.boot),
      firmware,
      channels,
      clockErrorS: clock === null ? null : clock - at / 1000,
      can: hello.can ?? [],
    };
    node.relayCount = channels;
    node.isNoted = true;
    this.house.step();
  }

  /** A pack came; what was refused of it is kept where whoever wires the node finds it. */
  tookPack(nodeId: string, refused: readonly RefusedRecord[]): void {
    const node = this.nodes.get(nodeId);
    if (node === undefined) return;
    this.heard(nodeId);
    node.status = { ...node.status, ...withRefused(node.status, refused, this.deps.clock.appNow()) };
  }

  setCloned(nodeId: string, isCloned: boolean): void {
    const node = this.nodes.get(nodeId);
    if (node === undefined) return;
    node.standing.isCloned = isCloned;
    this.house.step();
  }

  /** A `relays` frame: what each coil really is. Its answer is a command. */
  takeRelays(nodeId: string, link: CommandLink, frame: RelaysFrame, at: number): void {
    const node = this.nodes.get(nodeId);
    if (node === undefined || node.link !== link) return;
    this.heard(nodeId);
    const { changed, trip } = node.relays.take(link.boot, frame, at, link.canFallback);
    const report = node.relays.lastReport;
    const turned = new Set([...changed, ...(trip?.dropped ?? [])].map(({ relay }) => relay));
    const alone = node.fallback.takeReport(frame.channels, report?.isAlone === true, at, turned);
    if (alone.length > 0) void this.deps.journal.append(this.noteAlone(node, alone));
    if (report !== null && changed.length > 0) {
      void this.deps.journal.append({ reports: reportRows(this.house.record, changed, report) });
    }
    if (trip !== null) this.noteTrip(node, trip, at);
    const before = node.relays.current?.number;
    this.house.step();
    this.compareNumbers(node, frame.number);
    if (trip !== null && node.relays.current?.number === before) {
      node.relays.renumber(this.deps.epoch());
      this.releaseNode(node, node.tail);
    }
    // An order whose switchings are being written is sent as soon as they are: it is the answer then.
    if (node.pending === 0) this.send(node, this.deps.clock.monotonicMs());
  }

  /**
   * A node says something of itself; where it tells what its fallback did, that is taken into account at its own times.
   * @returns whether it is kept, or never will be: the node need not say it again
   */
  async takeLog(nodeId: string, frame: LogFrame, at: number): Promise<boolean> {
    const node = this.nodes.get(nodeId);
    if (node === undefined) return false;
    this.heard(nodeId);
    const taken = node.logs.take(this.house.record, nodeId, frame, at);
    if (taken === null) return true;
    const alone = taken.fallback === null ? [] : node.fallback.takeLog(taken.fallback);
    const entry = { ...this.noteAlone(node, alone), logs: [taken.row] };
    if (taken.fallback !== null) this.house.step();
    return this.deps.journal.keep(entry);
  }

  /** A step has taken in what was observed. */
  told(): void {
    for (const node of this.nodes.values()) node.fallback.told();
  }

  /**
   * Orders what a step decided. A switching always has a number of its own, even where the coil was meant to be so already:
   * a load that dropped with its lease is switched on anew.
   * @returns nodes that have a new order
   */
  order(result: StepResult): string[] {
    const epoch = this.deps.epoch();
    const results = new Map(result.channels.map((one) => [one.id, one]));
    const switched = new Set(
      result.events.flatMap((event) => (event.kind === 'switching' ? event.channel : [])),
    );
    const fresh: string[] = [];
    for (const [id, node] of this.nodes) {
      const channels = this.channelsOf(id);
      const coils = new Map(
        channels.map(({ id: channel, relay }) => [relay, results.get(channel)?.coil ?? 'off']),
      );
      const { isNew } = node.relays.order(epoch, node.relayCount, coils);
      const isSwitched = channels.some((channel) => switched.has(channel.id));
      if (isSwitched && !isNew) node.relays.renumber(epoch);
      if (isSwitched || isNew) fresh.push(id);
    }
    return fresh;
  }

  /**
   * Lets orders out once their switchings are stored.
   * @param committed null where nothing has to be stored first
   */
  release(fresh: readonly string[], all: boolean, committed: Promise<unknown> | null): void {
    for (const [id, node] of this.nodes) {
      if (all || fresh.includes(id)) this.releaseNode(node, committed);
    }
  }

  /** Number of the newest order to the node of a channel. */
  numberOf(channelId: string): number | null {
    const nodeId = this.house.record.channels.find((one) => one.id === channelId)?.nodeId ?? '';
    return this.nodes.get(nodeId)?.relays.current?.number ?? null;
  }

  observed(): Record<string, ObservedRelay> {
    const relays: Record<string, ObservedRelay> = {};
    for (const channel of this.house.record.channels) {
      const node = this.nodes.get(channel.nodeId);
      const observed = node?.relays.observed(channel) ?? null;
      if (observed === null) continue;
      const ranAlone = node?.fallback.runsOf(channel.id) ?? [];
      relays[channel.id] = ranAlone.length === 0 ? observed : { ...observed, ranAlone };
    }
    return relays;
  }

  standings(): Map<string, NodeStanding> {
    return new Map([...this.nodes].map(([id, node]) => [id, node.standing]));
  }

  state(result: StepResult, now: number): HouseState {
    const relays = this.observed();
    const reported = new Map(Object.entries(relays).map(([id, relay]) => [id, relay.reported]));
    return houseState(this.house.record, result, reported, this.standings(), now);
  }

  /** Nothing in this house is commanded any more: its leases run out. */
  withhold(): void {
    for (const node of this.nodes.values()) node.relays.withhold();
  }

  closeLinks(code: number, why: string): void {
    for (const node of this.nodes.values()) node.link?.close(code, why);
  }

  get online(): number {
    return [...this.nodes.values()].filter((node) => node.link !== null).length;
  }

  /** What has changed of each node since the last call, for its row. */
  takeNotes(): { id: string; holdingId: string; lastHeardAt: number; status: Record<string, unknown> }[] {
    const notes = [];
    for (const [id, node] of this.nodes) {
      const { lastHeardAt } = node.standing;
      if (!node.isNoted || lastHeardAt === null) continue;
      node.isNoted = false;
      const status = { ...node.status, ...node.relays.status(), ...node.fallback.status() };
      notes.push({ id, holdingId: this.house.holdingId, lastHeardAt, status });
    }
    return notes;
  }

  private add(wiring: NodeWiring, formerLeaseEnd: number | null, known: ReadonlyMap<string, State>): void {
    const channels = this.channelsOf(wiring.id);
    const coils = channels.flatMap((channel) => {
      const state = known.get(channel.id);
      // loadState is its own inverse: what turns a coil into a load turns a load into a coil.
      return state === undefined ? [] : [[String(channel.relay), loadState(channel, state)] as const];
    });
    const relays = new NodeRelays(
      channels,
      formerLeaseEnd,
      keptTrips(wiring.status),
      Object.fromEntries(coils),
    );
    const standing = {
      online: false,
      lastHeardAt: wiring.lastHeardAt,
      isCloned: false,
      isEpochTooFar: false,
    };
    this.nodes.set(wiring.id, {
      ...{ wiring, relays, standing, link: null, isNoted: false, pending: 0 },
      fallback: new NodeFallback(() => this.channelsOf(wiring.id), keptAlone(wiring.status)),
      logs: new NodeLogs(),
      relayCount: wiring.channels,
      status: wiring.status,
      tail: Promise.resolve(),
    });
  }

  private channelsOf(nodeId: string): ChannelWiring[] {
    return this.house.record.channels.filter((one) => one.nodeId === nodeId);
  }

  private compareNumbers(node: Attached, theirs: number): void {
    const ours = this.deps.epoch();
    const seen = epochOf(theirs);
    node.standing.isEpochTooFar = seen > ours + EPOCH_TRUST;
    if (node.standing.isEpochTooFar) return;
    if (seen > ours) return this.deps.raiseEpoch(seen);
    const current = node.relays.current;
    if (seen === ours && current !== null && theirs > current.number) {
      node.relays.renumber(ours, theirs);
      this.releaseNode(node, null);
    }
  }

  /** A trip is stored as what it was; the answer to it carries a new number, whether or not the coils change. */
  private noteTrip(node: Attached, trip: Trip, at: number): void {
    const { record } = this.house;
    this.deps.log.warn(
      { house: record.id, node: node.wiring.key, trip: trip.trip },
      'a lease ran out; coils dropped',
    );
    const droppedAt = Math.min(node.relays.leaseEnd ?? at, at);
    node.fallback.dropped(droppedAt);
    const switchings = tripRows(record, trip, droppedAt);
    if (switchings.length > 0) node.tail = Promise.all([node.tail, this.deps.journal.append({ switchings })]);
  }

  /** What a fallback did is stored as what it was, and whoever looks is told. */
  private noteAlone(node: Attached, changes: readonly AloneChange[]): { switchings: SwitchingRow[] } {
    for (const { channel, at, coil } of changes) {
      this.deps.log.info(
        { house: this.house.id, node: node.wiring.key, channel: channel.key, coil, at },
        'a node ran its fallback',
      );
      this.deps.onSwitching(this.house, channel.number, at, loadState(channel, coil), 'fail-safe');
    }
    return { switchings: aloneRows(this.house.record, changes) };
  }

  private releaseNode(node: Attached, committed: Promise<unknown> | null): void {
    const order: Order | null = node.relays.current;
    if (order === null) return;
    const madeAtMs = this.deps.clock.monotonicMs();
    const letOut = () => {
      if (this.house.isFailed) return;
      node.relays.release(order);
      this.send(node, madeAtMs);
    };
    if (committed === null && node.pending === 0) return letOut();
    node.pending += 1;
    // Orders leave as they were made, even if the later one had nothing to wait for.
    node.tail = Promise.all([node.tail, committed]).then(() => {
      node.pending -= 1;
      letOut();
    });
  }

  private send(node: Attached, madeAtMs: number): void {
    const { link } = node;
    if (link === null || link.seen === null) return;
    const frame = node.relays.command(link.boot, link.seen.seq, link.seen.at, link.canFallback);
    if (frame !== null) link.sendCommand(frame, madeAtMs);
  }
}

function keptTrips(status: Record<string, unknown>): { boot: BootId; trips: number } | null {
  const { boot, trips } = status;
  const isBoot = typeof boot === 'string' || typeof boot === 'number';
  return isBoot && typeof trips === 'number' ? { boot, trips } : null;
}
