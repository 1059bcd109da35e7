/** One node under control: its relays, its link, and what its row keeps of it. */
import type { ChannelWiring, NodeWiring } from '@/db/queries/plan';
import type { ChannelMemory } from '@/lib/control/memory';
import type { State } from '@/lib/control/types';
import type { BootId, Coils, HelloFrame, RefusedRecord } from '@/lib/field/frames';
import type { CommandLink } from './command-link';
import type { ControlledHouse, HouseDeps } from './house-deps';
import { keptAlone, NodeFallback } from './node-fallback';
import { NodeLogs } from './node-logs';
import { NodeOrders } from './node-orders';
import { refusalsOfBoot, withRefused } from './node-refusals';
import { NodeRelays, loadState } from './node-relays';
import { ReadingRate, startsOf, withUnknown } from './node-told';
import type { NodeStanding } from './state';

/** What the core remembers of loads, by channel. */
export type RememberedLoads = ReadonlyMap<string, ChannelMemory>;

/** A pack as it was sent, how many readings were taken of it, and what was refused. */
export interface TookPack {
  pack: readonly unknown[];
  taken: number;
  refused: readonly RefusedRecord[];
}

export class AttachedNode {
  readonly relays: NodeRelays;
  readonly fallback: NodeFallback;
  readonly logs = new NodeLogs();
  readonly orders: NodeOrders;
  readonly standing: NodeStanding;
  link: CommandLink | null = null;
  /** Relays that the node itself says it has. */
  relayCount: number;
  private status: Record<string, unknown>;
  private readonly rate: ReadingRate;
  /** There is something worth keeping in the node's row that has not been kept. */
  private isNoted = false;

  constructor(
    public wiring: NodeWiring,
    private readonly house: ControlledHouse,
    formerLeaseEnd: number | null,
    remembered: RememberedLoads,
    private readonly deps: HouseDeps,
  ) {
    const channels = this.channels();
    this.relays = new NodeRelays(
      channels,
      formerLeaseEnd,
      keptTrips(wiring.status),
      coilsOf(channels, remembered, ({ relay, wanted }) => relay?.reported ?? wanted),
      {
        counted: coilsOf(channels, remembered, ({ counted }) => counted),
        known: coilsOf(channels, remembered, ({ known }) => known),
      },
    );
    this.standing = {
      online: false,
      lastHeardAt: wiring.lastHeardAt,
      isCloned: false,
      isEpochTooFar: false,
    };
    this.relays.hold(heldAfterLeaseMs(wiring, deps.clock.rate));
    this.fallback = new NodeFallback(() => this.channels(), keptAlone(wiring.status));
    this.orders = new NodeOrders(this.relays, () => this.link, house, deps);
    this.relayCount = wiring.channels;
    this.status = wiring.status;
    this.rate = new ReadingRate(deps.clock.appNow());
  }

  /** The channels wired to it, by the house's record of now. */
  channels(): ChannelWiring[] {
    return this.house.record.channels.filter((one) => one.nodeId === this.wiring.id);
  }

  rewire(wiring: NodeWiring): void {
    this.wiring = wiring;
    this.relays.rewire(this.channels());
    this.relays.hold(heldAfterLeaseMs(wiring, this.deps.clock.rate));
  }

  attach(link: CommandLink): void {
    this.link = link;
    this.standing.online = true;
  }

  detach(): void {
    this.link = null;
    this.standing.online = false;
    // a board holds no lease: what it last showed says nothing of what its coils are now
    if (this.wiring.kind === 'modbus') this.relays.lost();
  }

  /** Why there is no link to a node that the worker goes to itself; null: there is one. */
  tellLink(why: string | null, at: number): void {
    const { linkTrouble } = this.status;
    if ((linkTrouble ?? null) === why) return;
    this.status = { ...this.status, linkTrouble: why, linkSince: at };
    this.isNoted = true;
  }

  heard(now: number): void {
    this.standing.lastHeardAt = now;
    this.isNoted = true;
  }

  greet(hello: HelloFrame, at: number): void {
    const { firmware, channels, clock } = hello;
    this.status = {
      ...this.status,
      ...refusalsOfBoot(this.status, hello.boot),
      ...startsOf(this.status, hello.boot, at),
      boot: hello.boot,
      firmware,
      channels,
      clockErrorS: clock === null ? null : clock - at / 1000,
      can: hello.can ?? [],
    };
    this.relayCount = channels;
    this.isNoted = true;
  }

  tookPack({ pack, taken, refused }: TookPack, now: number): void {
    this.heard(now);
    this.rate.add(taken, now);
    this.status = {
      ...this.status,
      ...withRefused(this.status, refused, now),
      ...withUnknown(this.status, refused, pack, now),
      readingsAMinute: this.rate.perMinute(now),
    };
  }

  /** What has changed since the last call, for its row; null where nothing has. */
  takeNote(): { lastHeardAt: number | null; status: Record<string, unknown> } | null {
    const { lastHeardAt } = this.standing;
    if (!this.isNoted) return null;
    this.isNoted = false;
    return {
      lastHeardAt,
      status: { ...this.status, ...this.relays.status(), ...this.fallback.status() },
    };
  }
}

/** How long a coil may stay on after the last lease: a board drops it by its watchdog, or never. App ms. */
function heldAfterLeaseMs({ kind, modbus }: NodeWiring, rate: number): number {
  if (kind !== 'modbus') return 0;
  const watchdog = modbus?.watchdog ?? null;
  return watchdog === null ? Infinity : watchdog.within * 1000 * rate;
}

function keptTrips(status: Record<string, unknown>): { boot: BootId; trips: number } | null {
  const { boot, trips } = status;
  const isBoot = typeof boot === 'string' || typeof boot === 'number';
  return isBoot && typeof trips === 'number' ? { boot, trips } : null;
}

function coilsOf(
  channels: readonly ChannelWiring[],
  remembered: RememberedLoads,
  stateOf: (load: ChannelMemory) => State | null,
): Coils {
  const coils = channels.flatMap((channel) => {
    const load = remembered.get(channel.id);
    const state = load === undefined ? null : stateOf(load);
    // loadState is its own inverse: what turns a coil into a load turns a load into a coil.
    return state === null ? [] : [[String(channel.relay), loadState(channel, state)] as const];
  });
  return Object.fromEntries(coils);
}
