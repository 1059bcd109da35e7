/**
 * The whole simulated yard: one world, and the nodes that are wired into it. The world is brought up to the
 * moment whenever somebody looks at it or a coil is about to change, so that a coil acts for as long as it was on.
 */
import { reportEveryS, yardHouse } from './catalogue';
import { AppTime, iso, type Clock } from './clock';
import type { YardConfig } from './config';
import { Faults } from './faults';
import { FieldNode } from './node';
import { sensorReadings } from './sensors';
import { nodeFlash } from './store';
import { hashOf, type FaultOrder, type TrainedNode, type Trainer } from './training-door';
import { createWorld, stepWorld, type World, type YardRelays } from './world';

/** A world that stood still for longer is taken up from here: nobody waits for a summer to be stepped. */
const catchUpMsMost = 36 * 3_600_000;
/** A world that is further ahead than this, from a wrong clock, would stand still until time caught up. */
const aheadMsMost = 60_000;
/** How often the world is stepped when nothing asks for it, s of app time. */
const stepEveryS = 5;

export type YardLog = (event: string, fields: Record<string, unknown>) => void;

/** A node of the yard, with what is made to go wrong about it. */
interface Standing {
  node: FieldNode;
  faults: Faults;
  given: YardConfig['nodes'][number];
}

export class Yard implements Trainer {
  private world: World | undefined;
  private readonly time: AppTime;
  private readonly standing: Standing[];
  private cancelStep: (() => void) | undefined;

  /** @param saved the world of an earlier run, to go on from */
  constructor(
    private readonly config: YardConfig,
    private readonly clock: Clock,
    private readonly log: YardLog,
    saved: World | undefined,
  ) {
    this.world = saved;
    this.time = new AppTime(clock, config.rate);
    this.standing = config.nodes.map((given) => {
      const faults = new Faults();
      return { node: this.node(given, faults), faults, given };
    });
  }

  start(): void {
    for (const { node } of this.standing) node.start();
    this.keepStepping();
  }

  stop(): void {
    this.cancelStep?.();
    for (const { node } of this.standing) node.stop();
  }

  /** The world as it is now, for saving; undefined while the time is not known yet. */
  current(): World | undefined {
    this.bringUpTo(this.clock.monotonicMs());
    return this.world;
  }

  /** Every node with what is wrong about it just now. */
  nodes(): TrainedNode[] {
    const now = this.clock.monotonicMs();
    return this.standing.map(({ faults, given }) => ({
      tokenHash: hashOf(given.token),
      points: yardHouse(given.house).points.map(({ key }) => key),
      relays: yardHouse(given.house).relays,
      faults: faults.at(now).map(({ endsMs, ...fault }) => ({
        ...fault,
        leftS: Math.ceil(((endsMs - now) * this.config.rate) / 1000),
      })),
    }));
  }

  /** Puts a fault, or ends it. */
  order({ tokenHash, on, seconds, ...about }: FaultOrder): string | null {
    const found = this.standing.find(({ given }) => hashOf(given.token) === tokenHash);
    if (found === undefined) return 'this node is not of the yard';
    const place = yardHouse(found.given.house);
    const has = (point: string | null) => place.points.some(({ key }) => key === point);
    const { fault, point, other, relay } = about;
    const isProbe = fault === 'dead-sensor' || fault === 'lying-85' || fault === 'swapped-probes';
    if (isProbe && !has(point)) return `this node has no point "${point ?? ''}"`;
    if (fault === 'swapped-probes' && (!has(other) || other === point))
      return 'two different points are swapped';
    const isRelay = fault === 'welded-relay' || fault === 'dead-fan';
    if (isRelay && !(relay !== null && relay <= place.relays)) return 'give the relay';
    // what has been until now is reckoned with the faults of until now
    this.current();
    const one = { ...about, endsMs: this.clock.monotonicMs() + this.time.realMs(seconds) };
    if (on) found.faults.put(one);
    else found.faults.end(one);
    this.log('training', { ...this.at(), node: found.given.key, on, ...about });
    this.supply();
    return null;
  }

  private node({ key, token, house }: YardConfig['nodes'][number], faults: Faults): FieldNode {
    const place = yardHouse(house);
    return new FieldNode({
      key,
      token,
      server: this.config.server,
      relays: place.relays,
      rate: this.config.rate,
      reportS: reportEveryS,
      clock: this.clock,
      time: this.time,
      sample: (appMs) => {
        const world = this.current();
        if (world === undefined) return [];
        const seen = sensorReadings(world, house, appMs).map(({ key: n, unit: u, value: v }) => ({
          n,
          u,
          v,
        }));
        return faults.readings(seen, this.clock.monotonicMs());
      },
      beforeCoilsChange: (monotonicMs) => this.bringUpTo(monotonicMs),
      log: (event, fields) => this.log(event, { ...this.at(), node: key, ...fields }),
      flash: nodeFlash(this.config.stateFile, key, (why) =>
        this.log('flash not written', { node: key, why }),
      ),
    });
  }

  private at(): { at?: string } {
    const appMs = this.time.nowMs();
    return appMs === null ? {} : { at: iso(appMs) };
  }

  private keepStepping(): void {
    // Between 20 steps a second and one: often enough for 60 times the real rate, idle enough for 1.
    const everyMs = Math.min(1000, Math.max(50, this.time.realMs(stepEveryS)));
    this.cancelStep = this.clock.after(everyMs, () => {
      // After a stall each node first sees which coils dropped meanwhile; then the world is stepped.
      for (const { node } of this.standing) node.wake();
      this.supply();
      this.current();
      this.keepStepping();
    });
  }

  private bringUpTo(monotonicMs: number): void {
    const appMs = this.time.atMs(monotonicMs);
    if (appMs === null) return;
    let world = this.world ?? createWorld(this.config.seed, appMs);
    if (world.ms > appMs + aheadMsMost) {
      this.log('world moved back', { hours: Math.round((world.ms - appMs) / 3_600_000) });
      world = { ...world, ms: appMs };
    }
    const gapMs = appMs - world.ms;
    if (gapMs > catchUpMsMost) {
      this.log('world moved on', { hours: Math.round(gapMs / 3_600_000) });
      this.world = stepWorld({ ...world, ms: appMs - catchUpMsMost }, {}, catchUpMsMost / 1000);
    } else {
      this.world = gapMs > 0 ? stepWorld(world, this.contacts(), gapMs / 1000, this.leaks()) : world;
    }
  }

  /** Which loads run, by the node that the catalogue wires to each house, whatever key the config gave it. */
  private contacts(): YardRelays {
    const now = this.clock.monotonicMs();
    return Object.fromEntries(
      this.standing.map(({ node, faults, given }) => [
        yardHouse(given.house).node,
        faults.contacts(node.state().channels, now),
      ]),
    );
  }

  private leaks(): Record<string, number> {
    const now = this.clock.monotonicMs();
    return Object.fromEntries(this.standing.map(({ faults, given }) => [given.house, faults.leak(now)]));
  }

  /** Power and line of each node are as its faults say; what has ended by itself is mended here. */
  private supply(): void {
    const now = this.clock.monotonicMs();
    for (const { node, faults } of this.standing) {
      node.supply({ power: !faults.has('power-cut', now), line: !faults.has('lost-link', now) });
    }
  }
}
