/**
 * One house under control: the core's memory, and the loop that steps whenever something came in or falls due. Nothing
 * that goes wrong in here leaves it.
 */
import type { HouseRecord } from '@/db/queries/plan';
import { compile } from '@/lib/control/compile';
import type { Memory } from '@/lib/control/memory';
import type { Plan } from '@/lib/control/plan';
import { step } from '@/lib/control/step';
import type { StepResult } from '@/lib/control/step-result';
import type { Observed, PersonCommand } from '@/lib/control/types';
import type { HouseState } from '@/lib/schema/house-state';
import { controlFailed, wantedAlarms } from '../alarms/wanted';
import type { Cancel } from '../clock';
import { decisionRows, switchingRows } from './house-record';
import type { ControlledHouse, HouseDeps } from './house-deps';
import { HouseNodes } from './house-nodes';
import { HouseRows } from './house-rows';
import type { Entry } from './journal';
import { SeenPoints, type Seen } from './seen-points';

/** A look at least this often, real time, should a wake be lost; the step itself finds nothing new then. */
const LOOK_EVERY_MS = 15_000;
const RETRY_FAILED_MS = 30_000;

export class House implements ControlledHouse {
  readonly nodes: HouseNodes;
  last: StepResult | null = null;
  /** Null: what is to be driven by has not been compiled yet, or cannot be. */
  private plan: Plan | null;
  private readonly points = new SeenPoints();
  private readonly rows: HouseRows;
  private commands: PersonCommand[] = [];
  private failure: { why: string; since: number } | null = null;
  private cancelWake: Cancel = () => undefined;
  /** A look that was asked for within a time; whatever is looked at earlier makes it needless. */
  private soon: { atMs: number; cancel: Cancel } | null = null;
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
    this.nodes = new HouseNodes(this, memory, formerLeaseEnd, deps);
    this.rows = new HouseRows(this, memory.taken, deps);
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

  /** How the house stood when that was last told. */
  get state(): HouseState | null {
    return this.rows.state;
  }

  observe(readings: readonly Seen[]): void {
    this.points.observe(readings);
  }

  /** Time of the newest reading of a point, believed or not. */
  newestAt(pointId: string): number | null {
    return this.points.newestAt(pointId);
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
    this.forgetSoon();
    this.guard(() => this.stepOnce());
    this.sleep();
  }

  stepWithin(ms: number): void {
    const { clock } = this.deps;
    const atMs = clock.monotonicMs() + ms;
    if (this.stopped || (this.soon !== null && this.soon.atMs <= atMs)) return;
    this.forgetSoon();
    this.soon = { atMs, cancel: clock.after(ms, () => this.step()) };
  }

  stop(): void {
    this.stopped = true;
    this.cancelWake();
    this.forgetSoon();
    this.deps.alarms.forget(this.id);
  }

  /** What a clean end keeps: the memory as it stands, so that no second of it is lost. */
  keepMemory(): void {
    if (this.last === null) return;
    const memory = this.rows.memoryRow(this.memory, this.deps.clock.appNow());
    void this.deps.journal.append({ memory });
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
    this.points.told();
    this.nodes.told();

    const orders = this.nodes.order(result);
    const entry: Entry = {
      switchings: switchingRows(this.record, result.events, (id) => this.nodes.numberOf(id)),
      decisions: decisionRows(this.record, result.events),
    };
    metrics.add('switchings_total', entry.switchings?.length ?? 0);
    const isEvent = result.events.length > 0 || result.memory.taken > this.rows.takenKept;
    const memory = this.rows.toKeep(result.memory, () => this.nodes.state(result, now), now, isEvent);
    if (memory !== null) entry.memory = memory;
    // an order that nothing happened for (another plan, another epoch) has nothing that must be stored before it
    const committed = isEvent ? journal.append(entry) : null;
    if (!isEvent && memory !== null) void journal.keep({ ...entry, mayWait: true });
    this.nodes.release(orders, wasFailed, committed);

    this.deps.alarms.want(
      this.holdingId,
      this.id,
      wantedAlarms(this.record, result, this.nodes.standings(), this.deps.startedAt, now),
    );
    this.tell(result);
  }

  private forgetSoon(): void {
    this.soon?.cancel();
    this.soon = null;
  }

  private observed(): Observed {
    return {
      workerStartedAt: this.deps.startedAt,
      points: this.points.observed(),
      relays: this.nodes.observed(),
      commands: this.commands,
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
