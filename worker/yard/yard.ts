/**
 * The whole simulated yard: one world, and the nodes that are wired into it. The world is brought up to the
 * moment whenever somebody looks at it or a coil is about to change, so that a coil acts for as long as it was on.
 */
import { reportEveryS, yardHouse } from './catalogue';
import { AppTime, iso, type Clock } from './clock';
import type { YardConfig } from './config';
import { FieldNode } from './node';
import { sensorReadings } from './sensors';
import { nodeFlash } from './store';
import { createWorld, stepWorld, type World, type YardRelays } from './world';

/** A world that stood still for longer is taken up from here: nobody waits for a summer to be stepped. */
const catchUpMsMost = 36 * 3_600_000;
/** A world that is further ahead than this, from a wrong clock, would stand still until time caught up. */
const aheadMsMost = 60_000;
/** How often the world is stepped when nothing asks for it, s of app time. */
const stepEveryS = 5;

export type YardLog = (event: string, fields: Record<string, unknown>) => void;

export class Yard {
  private world: World | undefined;
  private readonly time: AppTime;
  private readonly nodes: FieldNode[];
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
    this.nodes = config.nodes.map((node) => this.node(node));
  }

  start(): void {
    for (const node of this.nodes) node.start();
    this.keepStepping();
  }

  stop(): void {
    this.cancelStep?.();
    for (const node of this.nodes) node.stop();
  }

  /** The world as it is now, for saving; undefined while the time is not known yet. */
  current(): World | undefined {
    this.bringUpTo(this.clock.monotonicMs());
    return this.world;
  }

  private node({ key, token, house }: YardConfig['nodes'][number]): FieldNode {
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
        return sensorReadings(world, house, appMs).map(({ key: n, unit: u, value: v }) => ({ n, u, v }));
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
      for (const node of this.nodes) node.wake();
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
      this.world = gapMs > 0 ? stepWorld(world, this.relays(), gapMs / 1000) : world;
    }
  }

  /** Coils by the node that the catalogue wires to each house, whatever key the config gave it. */
  private relays(): YardRelays {
    return Object.fromEntries(
      this.nodes.map((node, i) => [yardHouse(this.config.nodes[i]?.house ?? '').node, node.state().channels]),
    );
  }
}
