/**
 * One house under control: what was observed, the core's memory, its nodes' relays, and the loop that steps whenever
 * something came in or falls due. Nothing that goes wrong in here leaves it.
 */
import type { HouseRecord } from '@/db/queries/plan';
import type { MemoryRow } from '@/db/queries/running';
import { compile } from '@/lib/control/compile';
import type { Memory } from '@/lib/control/memory';
import type { Plan } from '@/lib/control/plan';
import { step } from '@/lib/control/step';
import type { StepResult } from '@/lib/control/step-result';
import type { Observed, ObservedPoint, PersonCommand } from '@/lib/control/types';
import type { HouseState } from '@/lib/schema/house-state';
import { controlFailed, wantedAlarms } from '../alarms/wanted';
import type { Cancel } from '../clock';
import { decisionRows, switchingRows } from './house-record';
import type { ControlledHouse, HouseDeps } from './house-deps';
import { HouseNodes } from './house-nodes';
import type { Entry } from './journal';

/** A reading as control takes it. */
export interface Seen {
  pointId: string;
  at: number;
  /** Corrected by calibration. */
  value: number;
  /** As sent. */
  raw: number;
}

/** A look at least this often, real time, should a wake be lost; the step itself finds nothing new then. */
const LOOK_EVERY_MS = 15_000;
const RETRY_FAILED_MS = 30_000;
/** States go to browsers and database at most five times a second. */
const STATE_EVERY_MS = 200;
/** Without any event the memory is kept this often all the same. */
const MEMORY_EVERY_MS = 60_000;
/** Times of a point's readings that are remembered between two steps. */
const BETWEEN_MAX = 1000;

export class House implements ControlledHouse {
  readonly nodes: HouseNodes;
  last: StepResult | null = null;
  state: HouseState | null = null;
  /** Null: what is to be driven by has not been compiled yet, or cannot be. */
  private plan: Plan | null;
  private readonly points = new Map<string, ObservedPoint>();
  /** Points whose newest reading no step has seen yet. */
  private readonly untold = new Set<string>();
  private commands: PersonCommand[] = [];
  private failure: { why: string; since: number } | null = null;
  private cancelWake: Cancel = () => undefined;
  private cancelState: Cancel | null = null;
  private stateAtMs = -Infinity;
  private memoryAtMs = -Infinity;
  private takenKept: number;
  private stopped = false;

  constructor(
    public record: HouseRecord,
    private memory: Memory,
    latest: readonly Seen[],
    /** Latest end that leases given before this worker led can have; null: nobody ever led. */
    formerLeaseEnd: number | null,
    private readonly deps: HouseDeps,
  ) {
    this.plan = compile(record.config);
    this.takenKept = memory.taken;
    this.nodes = new HouseNodes(this, memory, formerLeaseEnd, deps);
    this.observe(latest);
  }

  get id(): string {
    return this.record.id;
  }

  get holdingId(): string {
    return this.record.holdingId;
  }

  get taken(): number {
    return this.memory.taken;
  }

  get lastStepAt(): number | null {
    return this.memory.at;
  }

  get isFailed(): boolean {
    return this.failure !== null;
  }

  /** Takes readings in; one older than the newest of its point only tells that there was no silence. */
  observe(readings: readonly Seen[]): void {
    for (const { pointId, at, value, raw } of readings) {
      const before = this.points.get(pointId);
      const between = before?.between ?? [];
      if (before !== undefined && at <= before.at) {
        if (at < before.at && between.length < BETWEEN_MAX)
          before.between = [...between, at].sort((a, b) => a - b);
        continue;
      }
      const times = before !== undefined && this.untold.has(pointId) ? [...between, before.at] : between;
      this.untold.add(pointId);
      this.points.set(pointId, {
        value,
        at,
        ...(raw === value ? {} : { raw }),
        between: times.slice(-BETWEEN_MAX),
      });
    }
  }

  /** Time of the newest reading of a point, believed or not. */
  newestAt(pointId: string): number | null {
    return this.points.get(pointId)?.at ?? null;
  }

  /** Commands of people; each number is taken once. */
  order(commands: readonly PersonCommand[]): void {
    const known = new Set(this.commands.map((one) => one.number));
    const fresh = commands.filter((one) => one.number > this.memory.taken && !known.has(one.number));
    if (fresh.length === 0) return;
    this.commands = [...this.commands, ...fresh].sort((a, b) => a.number - b.number);
    this.step();
  }

  /** Another plan from now on; the memory is fitted to it by the core. */
  replan(record: HouseRecord): void {
    this.record = record;
    this.nodes.rewire(record);
    // not the former plan, should this one be none: who changed it believes that it is in force
    this.plan = null;
    this.step();
  }

  /** Looks at everything again. */
  step(): void {
    if (this.stopped) return;
    this.guard(() => this.stepOnce());
    this.sleep();
  }

  stop(): void {
    this.stopped = true;
    this.cancelWake();
    this.cancelState?.();
    this.deps.alarms.forget(this.id);
  }

  /** What a clean end keeps: the memory as it stands, so that no second of it is lost. */
  keepMemory(): void {
    if (this.last !== null)
      void this.deps.journal.append({ memory: this.memoryRow(this.deps.clock.appNow()) });
  }

  private stepOnce(): void {
    const { clock, metrics, journal } = this.deps;
    const now = Math.max(clock.appNow(), this.memory.at ?? 0);
    const startedMs = clock.monotonicMs();
    this.plan ??= compile(this.record.config);
    const result = step(this.plan, this.memory, this.observed(), now);
    metrics.add('steps_total');
    metrics.add('step_seconds_total', (clock.monotonicMs() - startedMs) / 1000);

    const wasFailed = this.failure !== null;
    this.failure = null;
    this.memory = result.memory;
    this.last = result;
    this.commands = this.commands.filter((one) => one.number > result.memory.taken);
    for (const point of this.points.values()) delete point.between;
    this.untold.clear();
    this.nodes.told();

    const orders = this.nodes.order(result);
    const entry: Entry = {
      switchings: switchingRows(this.record, result.events, (id) => this.nodes.numberOf(id)),
      decisions: decisionRows(this.record, result.events),
    };
    metrics.add('switchings_total', entry.switchings?.length ?? 0);
    const isEvent = result.events.length > 0 || result.memory.taken > this.takenKept;
    const memory = this.rowToKeep(now, isEvent);
    if (memory !== null) entry.memory = memory;
    const committed = memory !== null || isEvent ? journal.append(entry) : null;
    this.nodes.release(orders, wasFailed, committed);

    this.deps.alarms.want(
      this.holdingId,
      this.id,
      wantedAlarms(this.record, result, this.nodes.standings(), this.deps.startedAt, now),
    );
    this.tell(result);
  }

  private observed(): Observed {
    return {
      workerStartedAt: this.deps.startedAt,
      points: Object.fromEntries(this.points),
      relays: this.nodes.observed(),
      commands: this.commands,
    };
  }

  /** State always, memory where something happened; null while the last one is too fresh to write again. */
  private rowToKeep(now: number, isEvent: boolean): MemoryRow | null {
    const nowMs = this.deps.clock.monotonicMs();
    const isDue = nowMs - this.stateAtMs >= STATE_EVERY_MS;
    if (!isEvent && !isDue) {
      this.cancelState ??= this.deps.clock.after(STATE_EVERY_MS, () => {
        this.cancelState = null;
        this.step();
      });
      return null;
    }
    this.stateAtMs = nowMs;
    this.state = this.last === null ? null : this.nodes.state(this.last, now);
    if (this.state === null) return null;
    this.deps.onState(this, this.state);
    const withMemory = isEvent || nowMs - this.memoryAtMs >= MEMORY_EVERY_MS;
    if (withMemory) this.memoryAtMs = nowMs;
    return withMemory ? this.memoryRow(now) : this.stateRow(now);
  }

  private stateRow(now: number): MemoryRow {
    return {
      holdingId: this.holdingId,
      houseId: this.id,
      state: this.state === null ? null : { ...this.state },
      stateAt: new Date(now),
    };
  }

  private memoryRow(now: number): MemoryRow {
    this.takenKept = this.memory.taken;
    return {
      ...this.stateRow(now),
      memory: { ...this.memory },
      memoryAt: new Date(now),
      taken: this.memory.taken,
      planRevision: this.record.planRevision,
      epoch: this.deps.epoch(),
    };
  }

  private tell(result: StepResult): void {
    for (const event of result.events) {
      if (event.kind !== 'switching') continue;
      const number = this.record.channels.find((one) => one.id === event.channel)?.number;
      if (number !== undefined) this.deps.onSwitching(this, number, event.at, event.to, event.claim);
    }
  }

  private sleep(): void {
    const { clock } = this.deps;
    this.cancelWake();
    const wakeAt = this.failure === null ? (this.last?.wakeAt ?? null) : null;
    const longest = this.failure === null ? LOOK_EVERY_MS : RETRY_FAILED_MS;
    // A millisecond late rather than early: a step before its time would find nothing and sleep again.
    const untilWakeMs = wakeAt === null ? longest : Math.max((wakeAt - clock.appNow()) / clock.rate + 1, 0);
    this.cancelWake = clock.after(Math.min(untilWakeMs, longest), () => this.step());
  }

  /** A house that throws is no longer commanded, so that its leases run out; the others go on. */
  private guard(work: () => void): void {
    try {
      work();
    } catch (error) {
      this.deps.metrics.add('steps_failed_total');
      this.deps.log.error({ err: error, house: this.id }, 'this house is not controlled: its step failed');
      this.nodes.withhold();
      const why = error instanceof Error ? error.message : String(error);
      this.failure ??= { why, since: this.deps.clock.appNow() };
      const alarms = controlFailed(this.id, this.failure.why, this.failure.since);
      this.deps.alarms.want(this.holdingId, this.id, alarms);
    }
  }
}
