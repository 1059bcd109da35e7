/** The nodes of one house: which there are, what reaches each of them, and what the house orders of all of them. */
import type { HouseRecord, NodeWiring } from '@/db/queries/plan';
import type { Memory } from '@/lib/control/memory';
import type { StepResult } from '@/lib/control/step-result';
import type { ObservedRelay } from '@/lib/control/types';
import type { HelloFrame, LogFrame, RelaysFrame } from '@/lib/field/frames';
import type { TailRecord } from '@/lib/live/frames';
import type { HouseState } from '@/lib/schema/house-state';
import { AttachedNode, type RememberedLoads, type TookPack } from './attached-node';
import type { CommandLink } from './command-link';
import type { ControlledHouse, HouseDeps } from './house-deps';
import { NodeReports } from './node-reports';
import { houseState, type NodeStanding } from './state';

export class HouseNodes {
  private readonly nodes = new Map<string, AttachedNode>();
  private readonly reports: NodeReports;

  constructor(
    private readonly house: ControlledHouse,
    memory: Memory,
    formerLeaseEnd: number | null,
    private readonly deps: HouseDeps,
  ) {
    this.reports = new NodeReports(house, deps);
    const remembered = new Map(memory.channels.map((one) => [one.id, one]));
    for (const wiring of house.record.nodes) this.add(wiring, formerLeaseEnd, remembered);
  }

  /** Nodes may have come, gone, or lost their token. */
  rewire(record: HouseRecord): void {
    const wirings = new Map(record.nodes.map((one) => [one.id, one]));
    for (const [id, node] of this.nodes) {
      const wiring = wirings.get(id);
      if (wiring === undefined) {
        node.link?.close(1008, 'this node was taken out of use');
        this.nodes.delete(id);
      } else node.rewire(wiring);
    }
    for (const wiring of record.nodes) if (!this.nodes.has(wiring.id)) this.add(wiring, null, new Map());
  }

  attach(nodeId: string, link: CommandLink): void {
    const node = this.nodes.get(nodeId);
    if (node === undefined) return link.close(1008, 'this node was taken out of use');
    node.attach(link);
    this.heard(nodeId);
    this.house.step();
  }

  detach(nodeId: string, link: CommandLink): void {
    const node = this.nodes.get(nodeId);
    if (node === undefined || node.link !== link) return;
    node.detach();
    this.house.step();
  }

  /** Something came from this node: a frame, a pong, a pack by HTTP. */
  heard(nodeId: string): void {
    this.nodes.get(nodeId)?.heard(this.deps.clock.appNow());
  }

  /** What a node says of itself at the beginning of a connection. */
  greet(nodeId: string, hello: HelloFrame, at: number): void {
    const node = this.nodes.get(nodeId);
    if (node === undefined) return;
    node.greet(hello, at);
    this.house.step();
  }

  /** A pack came; what was refused of it is kept where whoever wires the node finds it. */
  tookPack(nodeId: string, took: TookPack, told: () => TailRecord[]): void {
    const node = this.nodes.get(nodeId);
    if (node === undefined) return;
    node.tookPack(took, this.deps.clock.appNow());
    this.deps.onPack(this.house, node.wiring.key, told);
  }

  /** How the way to a node stands that the worker goes to itself; null: it is there. */
  tellLink(nodeId: string, why: string | null): void {
    this.nodes.get(nodeId)?.tellLink(why, this.deps.clock.appNow());
  }

  setCloned(nodeId: string, isCloned: boolean): void {
    const node = this.nodes.get(nodeId);
    if (node === undefined) return;
    node.standing.isCloned = isCloned;
    this.house.step();
  }

  takeRelays(nodeId: string, link: CommandLink, frame: RelaysFrame, at: number): void {
    const node = this.nodes.get(nodeId);
    if (node === undefined || node.link !== link) return;
    this.heard(nodeId);
    this.reports.takeRelays(node, link, frame, at);
  }

  /** @returns whether the log is kept, or never will be: the node need not say it again */
  async takeLog(nodeId: string, frame: LogFrame, at: number): Promise<boolean> {
    const node = this.nodes.get(nodeId);
    if (node === undefined) return false;
    this.heard(nodeId);
    return this.reports.takeLog(node, frame, at);
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
      const channels = node.channels();
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
      if (all || fresh.includes(id)) node.orders.release(committed);
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
  takeNotes(): {
    id: string;
    holdingId: string;
    lastHeardAt: number | null;
    status: Record<string, unknown>;
  }[] {
    return [...this.nodes].flatMap(([id, node]) => {
      const note = node.takeNote();
      return note === null ? [] : { id, holdingId: this.house.holdingId, ...note };
    });
  }

  private add(wiring: NodeWiring, formerLeaseEnd: number | null, remembered: RememberedLoads): void {
    this.nodes.set(wiring.id, new AttachedNode(wiring, this.house, formerLeaseEnd, remembered, this.deps));
  }
}
