/**
 * One house of the demo through the past: the core, the orders to its node and the rows that are kept are the worker's own;
 * only the node at the other end answers by call instead of by socket.
 */
import { correct } from '@/db/queries/reading';
import type { HouseRecord, NodeWiring } from '@/db/queries/plan';
import type { MemoryRow } from '@/db/queries/running';
import { compile } from '@/lib/control/compile';
import { emptyMemory, type Memory } from '@/lib/control/memory';
import type { Plan } from '@/lib/control/plan';
import { step } from '@/lib/control/step';
import type { StepResult } from '@/lib/control/step-result';
import type { Observed, ObservedPoint, PersonCommand, State } from '@/lib/control/types';
import { relaysEveryS, type Coils } from '@/lib/field/frames';
import { readPack } from '@/lib/field/pack';
import { wantedAlarms } from '../../alarms/wanted';
import { decisionRows, reportRows, switchingRows } from '../../control/house-record';
import { NodeRelays } from '../../control/node-relays';
import { houseState, type NodeStanding } from '../../control/state';
import { pointsOf, qualityOf } from '../../field/node-points';
import type { Kept } from './kept';

/** From a command to the report that acknowledges it: a line and a commit. */
const ACKNOWLEDGED_AFTER_MS = 40;
const RELAYS_EVERY_MS = relaysEveryS * 1000;

export interface Sent {
  n: string;
  u: string;
  v: number;
  t: number;
}

export class HouseRun {
  private plan: Plan;
  private memory: Memory = emptyMemory();
  private last: StepResult | null = null;
  private readonly points: Record<string, ObservedPoint> = {};
  private commands: PersonCommand[] = [];
  private readonly node: NodeWiring;
  private readonly relays: NodeRelays;
  private board: { coils: Coils; number: number };
  private reportedAt = -Infinity;
  private acknowledgeAt: number | null = null;
  private readonly standing = new Set<string>();
  private seq = 0;
  /** Where each point stands in the plan's order, which is that of the configuration and of results. */
  private places = new Map<string, number>();

  constructor(
    readonly slug: string,
    private record: HouseRecord,
    private readonly epoch: number,
    private readonly startedAt: number,
    private readonly kept: Kept,
    /** Tells which coils are on from this instant on. */
    private readonly onCoils: (nodeKey: string, coils: Coils, at: number) => void,
  ) {
    const [node] = record.nodes;
    if (node === undefined) throw new Error(`${slug} has no node, so it has no history.`);
    this.node = node;
    this.plan = this.compiled();
    this.relays = new NodeRelays(record.channels, null, null, {});
    const coils = Array.from({ length: node.channels }, (_, index) => [String(index + 1), 'off'] as const);
    this.board = { coils: Object.fromEntries(coils), number: 0 };
  }

  get taken(): number {
    return this.memory.taken;
  }

  /** Epoch ms at which this house wants to step although nothing is sent; Infinity: not before the next pack. */
  get dueAt(): number {
    return Math.min(this.last?.wakeAt ?? Infinity, this.acknowledgeAt ?? Infinity);
  }

  replan(record: HouseRecord, at: number): void {
    this.record = record;
    this.plan = this.compiled();
    this.relays.rewire(record.channels);
    this.stepAt(at);
  }

  order(commands: PersonCommand[], at: number): void {
    this.commands = commands;
    this.stepAt(at);
  }

  /** A pack as the node sends it, received at once. */
  take(pack: readonly Sent[], at: number): void {
    const points = pointsOf(this.record.points, this.node.id);
    const { readings, refused } = readPack(pack, points, at);
    if (refused[0] !== undefined)
      throw new Error(`The yard's ${refused[0].name} was refused: ${refused[0].why}.`);
    const known = readings.flatMap((reading) => {
      const point = points.get(reading.key);
      return point === undefined ? [] : [{ point, reading }];
    });
    for (const { point, reading } of known) {
      const value = correct(point.calibrations, reading.at, reading.value);
      const raw = value === reading.value ? {} : { raw: reading.value };
      this.points[point.id] = { value, at: reading.at, ...raw };
    }
    const result = this.stepAt(at);
    const { points: configs } = this.record.config;
    for (const { point, reading } of known) {
      const place = this.places.get(point.id) ?? -1;
      const quality = qualityOf(configs[place], result.points[place], true, reading);
      this.kept.readings.push({ point: point.number, at: reading.at, value: reading.value, quality });
    }
  }

  stepAt(at: number): StepResult {
    this.report(at);
    const result = step(this.plan, this.memory, this.observed(), at);
    this.memory = result.memory;
    this.last = result;
    this.commands = this.commands.filter((one) => one.number > result.memory.taken);
    this.orderRelays(result, at);
    const { record, kept } = this;
    const numberOf = () => this.relays.current?.number ?? null;
    if (result.events.length > 0) {
      kept.running.switchings.push(...switchingRows(record, result.events, numberOf));
      kept.running.decisions.push(...decisionRows(record, result.events));
    }
    this.keepAlarms(result, at);
    return result;
  }

  /** How things stand at the end, for whoever drives on. */
  memoryRow(at: number): MemoryRow {
    if (this.last === null) throw new Error(`${this.slug} was never stepped.`);
    const standings = this.standings(at);
    const reported = new Map(Object.entries(this.observed().relays).map(([id, one]) => [id, one.reported]));
    return {
      holdingId: this.record.holdingId,
      houseId: this.record.id,
      state: { ...houseState(this.record, this.last, reported, standings, at) },
      stateAt: new Date(at),
      memory: { ...this.memory },
      memoryAt: new Date(at),
      taken: this.memory.taken,
      planRevision: this.record.planRevision,
      epoch: this.epoch,
    };
  }

  nodeStatus(at: number) {
    const status = {
      firmware: 'yard 1',
      channels: this.node.channels,
      clockErrorS: 0,
      // take() stops at a refusal
      refused: 0,
      ...this.relays.status(),
    };
    return { id: this.node.id, holdingId: this.record.holdingId, lastHeardAt: at, status };
  }

  private compiled(): Plan {
    this.places = new Map(this.record.config.points.map((point, index) => [point.id, index]));
    return compile(this.record.config);
  }

  /** The reports that came since the last step, and the leases that went out in answer. */
  private report(at: number): void {
    const regularAt = Math.floor(at / RELAYS_EVERY_MS) * RELAYS_EVERY_MS;
    const dueAt = this.acknowledgeAt !== null && this.acknowledgeAt <= at ? at : regularAt;
    if (dueAt <= this.reportedAt || (this.reportedAt === -Infinity && dueAt < this.startedAt)) return;
    this.reportedAt = dueAt;
    this.acknowledgeAt = null;
    const { coils, number } = this.board;
    this.seq += 1;
    const frame = { type: 'relays', seq: this.seq, channels: coils, number, trips: 0 } as const;
    const { changed } = this.relays.take('history', frame, dueAt);
    const report = this.relays.lastReport;
    if (report !== null && changed.length > 0)
      this.kept.running.reports.push(...reportRows(this.record, changed, report));
    this.relays.command('history', this.seq, dueAt, false);
  }

  /** As HouseNodes.order: a switching always has a number of its own. */
  private orderRelays(result: StepResult, at: number): void {
    const isSwitched = result.events.some((event) => event.kind === 'switching');
    if (!isSwitched && this.relays.current !== null) return;
    const coilOf = new Map(result.channels.map((one) => [one.id, one.coil]));
    const coils = new Map<number, State>(
      this.record.channels.map(({ id, relay }) => [relay, coilOf.get(id) ?? 'off']),
    );
    const { isNew } = this.relays.order(this.epoch, this.node.channels, coils);
    if (isSwitched && !isNew) this.relays.renumber(this.epoch);
    const order = this.relays.current;
    if (order === null || !(isSwitched || isNew)) return;
    this.relays.release(order);
    this.relays.command('history', this.seq, at, false);
    if (Object.entries(order.channels).some(([relay, coil]) => this.board.coils[relay] !== coil))
      this.onCoils(this.node.key, order.channels, at);
    this.board = { coils: order.channels, number: order.number };
    this.acknowledgeAt = at + ACKNOWLEDGED_AFTER_MS;
  }

  private keepAlarms(result: StepResult, at: number): void {
    const { record, standing, kept } = this;
    if (result.faults.length === 0 && standing.size === 0) return;
    const { alarms } = wantedAlarms(record, result, this.standings(at), this.startedAt, at);
    const wanted = new Set(alarms.map((one) => one.key));
    const of = { holdingId: record.holdingId, houseId: record.id };
    for (const { since, ...alarm } of alarms) {
      if (standing.has(alarm.key)) continue;
      standing.add(alarm.key);
      kept.alarms.push({ ...of, does: 'raise', at: since, ...alarm });
    }
    for (const key of standing) {
      if (wanted.has(key)) continue;
      standing.delete(key);
      kept.alarms.push({ ...of, does: 'clear', at, key });
    }
  }

  private observed(): Observed {
    const relays = this.record.channels.flatMap((channel) => {
      const seen = this.relays.observed(channel);
      return seen === null ? [] : [[channel.id, seen] as const];
    });
    return {
      workerStartedAt: this.startedAt,
      points: this.points,
      relays: Object.fromEntries(relays),
      commands: this.commands,
    };
  }

  private standings(at: number): Map<string, NodeStanding> {
    return new Map([
      [this.node.id, { online: true, lastHeardAt: at, isCloned: false, isEpochTooFar: false }],
    ]);
  }
}
