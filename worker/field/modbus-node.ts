/**
 * A board on Modbus TCP, played as a node: polled for readings, its coils commanded, read back and reported. What a lost
 * link leaves behind is said to be unknown.
 */
import { v7 as uuid } from 'uuid';
import { relaysEveryS, type CommandFrame } from '@/lib/field/frames';
import type { ModbusBus, Register } from '@/lib/schema/bus';
import type { Cancel } from '../clock';
import type { CommandLink } from '../control/command-link';
import { BoardCoils } from './board-coils';
import { BoardDial, errorWords } from './board-dial';
import { BoardFence } from './board-fence';
import { BoardLease } from './board-lease';
import { BoardReadings } from './board-readings';
import { wiringOf, type Bus, type BusDeps, type BusNode } from './bus';
import type { ModbusLine } from './modbus-line';
import { readOnce, type ReadOnce } from './modbus-poll';

/** reliability.md: no command older than 2 s. */
const COMMAND_AGE_MS = 2000;
/** A clean end waits so long for the coils of a board without watchdog. */
const END_LIMIT_MS = 2500;

export class ModbusNode implements Bus, CommandLink {
  readonly boot = uuid();
  readonly canFallback = false;
  seen: { seq: number; at: number } | null = null;
  private seq = 0;
  private line: ModbusLine | null = null;
  private busy = false;
  private underWay: Promise<void> = Promise.resolve();
  private asked = false;
  private isDropDue = false;
  private reportedAtMs = 0;
  private cancels: Cancel[] = [];
  private readonly board: BoardCoils;
  private readonly lease: BoardLease;
  private readonly fence: BoardFence;
  private readonly readings: BoardReadings;
  private readonly link: BoardDial;

  constructor(
    private readonly node: BusNode,
    private readonly settings: ModbusBus,
    private readonly deps: BusDeps,
  ) {
    this.board = new BoardCoils(
      settings,
      () => this.wiring?.channels ?? 0,
      (relay) => this.isBarred(relay),
      (ms) => new Promise((resolve) => void deps.clock.after(ms, resolve)),
    );
    this.fence = new BoardFence(deps, node.nodeId);
    this.lease = new BoardLease(deps.clock, () => this.endLease());
    this.readings = new BoardReadings(node, deps);
    this.link = new BoardDial(node, settings, deps, {
      // what the coils are is read before anything is said of them
      first: (line) => this.board.read(line),
      up: (line) => this.up(line),
      lost: (why) => this.lost(why),
    });
    void this.link.dial();
  }

  get isUp(): boolean {
    return this.line !== null;
  }

  private get wiring() {
    return wiringOf(this.node);
  }

  /** Somebody at the panel wants to see one register. @throws Error in words */
  async readOnce(row: Omit<Register, 'point'>): Promise<ReadOnce> {
    if (this.line === null) throw new Error(`There is no link to the board: ${this.link.why}.`);
    return readOnce(this.line, row);
  }

  sendCommand(frame: CommandFrame, madeAtMs: number): void {
    const { clock, metrics } = this.deps;
    const isStale = clock.monotonicMs() - madeAtMs > COMMAND_AGE_MS || frame.seen !== this.seen?.seq;
    if (isStale || this.fence.isShut) return metrics.add('commands_withheld_total');
    if (!this.board.take(frame)) return;
    metrics.add('commands_sent_total');
    this.lease.runFrom(this.reportedAtMs);
    this.asked = true;
    this.work();
  }

  close(): void {
    // who closes it has taken it out of the plan; that it goes is seen there
  }

  async stop(isEnd: boolean): Promise<void> {
    this.link.stop();
    this.rest();
    const { line } = this;
    this.line = null;
    if (line === null) return;
    // nobody else would: such a board keeps a fan running for ever
    if (isEnd && this.settings.watchdog === null && !this.fence.isShut) {
      const limit = new Promise<void>((resolve) => void this.deps.clock.after(END_LIMIT_MS, resolve));
      // what is being written just now would put a coil on behind our back
      const dropped = this.underWay.then(() => this.board.drop(line)).catch(() => false);
      await Promise.race([dropped, limit]);
    }
    line.close();
    this.node.house.nodes.detach(this.node.nodeId, this);
  }

  private up(line: ModbusLine): void {
    const { clock } = this.deps;
    const { house, nodeId } = this.node;
    const { wiring } = this;
    if (wiring === undefined) return line.close();
    this.line = line;
    this.fence.openIfSure();
    this.lease.runFrom(clock.monotonicMs());
    house.nodes.attach(nodeId, this);
    const { host, port, unit } = this.settings;
    const firmware = `Modbus unit ${unit} at ${host}:${port}`;
    house.nodes.tellLink(nodeId, null);
    house.nodes.greet(
      nodeId,
      { type: 'hello', node: wiring.key, firmware, channels: wiring.channels, boot: this.boot, clock: null },
      clock.appNow(),
    );
    // readings before coils: points that fell silent with the link must not switch what they would leave on
    void this.readings.poll(line).then(() => {
      if (this.line === line) this.report();
    });
    this.cancels = [
      clock.every((relaysEveryS * 1000) / clock.rate, () => this.look()),
      clock.every((wiring.reportEveryS * 1000) / clock.rate, () => void this.readings.poll(line)),
    ];
    const { watchdog } = this.settings;
    // three chances within its time; its time is the board's own and passes at no other rate
    if (watchdog !== null)
      this.cancels.push(clock.every((watchdog.within * 1000) / 3, () => void this.feed()));
  }

  /** Tells what the coils were just read to be; the answer is a command. */
  private report(): void {
    const { clock } = this.deps;
    const at = clock.appNow();
    this.seen = { seq: ++this.seq, at };
    this.reportedAtMs = clock.monotonicMs();
    const { coils, number, trips } = this.board;
    this.node.house.nodes.takeRelays(
      this.node.nodeId,
      this,
      { type: 'relays', seq: this.seq, channels: coils, number, trips },
      at,
    );
  }

  private look(): void {
    this.fence.openIfSure();
    if (this.lease.isOver) this.endLease();
    this.run(async (line) => {
      this.fence.seen(await this.board.read(line));
      this.report();
    });
  }

  /** Asked for again when what is under way is done, should it be. */
  private endLease(): void {
    if (!this.lease.isOver || this.fence.isShut) return;
    if (this.busy) this.isDropDue = true;
    else this.run((line) => this.dropAll(line));
  }

  private async dropAll(line: ModbusLine): Promise<void> {
    if ((await this.fence.mayWrite(() => this.board.read(line))) && (await this.board.drop(line)))
      this.deps.log.warn({ node: this.node.nodeId }, 'a lease ran out; coils dropped');
    this.report();
  }

  /** One after the other: an order that comes while coils are written is followed right after. */
  private work(): void {
    this.run(async (line) => {
      while (this.asked) {
        this.asked = false;
        if (!(await this.fence.mayWrite(() => this.board.read(line)))) return this.report();
        const before = JSON.stringify(this.board.coils);
        const { refused } = await this.board.apply(line);
        this.readings.tellRefused(refused);
        await this.feed();
        if (JSON.stringify(this.board.coils) !== before || refused.length > 0) this.report();
      }
    });
  }

  private run(work: (line: ModbusLine) => Promise<void>): void {
    const { line } = this;
    if (line === null || this.busy) return;
    this.busy = true;
    this.underWay = work(line)
      .catch((error: unknown) =>
        this.deps.log.info({ err: error, node: this.node.nodeId }, 'a board did not answer'),
      )
      .finally(() => {
        this.busy = false;
        if (this.line === null) return;
        const isDropDue = this.isDropDue;
        this.isDropDue = false;
        if (isDropDue) this.endLease();
        else if (this.asked) this.work();
      });
  }

  /** Only while the lease holds: a house that is not controlled lets its board drop. */
  private async feed(): Promise<void> {
    const { watchdog } = this.settings;
    if (watchdog === null || this.lease.isOver || this.fence.isShut || this.line === null) return;
    const { house, nodeId } = this.node;
    await this.line.writeRegister(watchdog.address, watchdog.value).then(
      () => house.nodes.tellLink(nodeId, null),
      (error: unknown) => house.nodes.tellLink(nodeId, `its watchdog is not fed: ${errorWords(error)}`),
    );
  }

  /** A heater stays cold on a board that would keep it on, however it came to be wired there. */
  private isBarred(relay: number): boolean {
    if (this.settings.watchdog !== null) return false;
    const { channels, config } = this.node.house.record;
    const wired = channels.find((one) => one.nodeId === this.node.nodeId && one.relay === relay);
    return config.channels.find((one) => one.id === wired?.id)?.loadKind === 'heater';
  }

  private lost(why: string): void {
    if (this.line === null) return;
    this.line = null;
    // no order is an answer to what was said on the former connection
    this.seen = null;
    this.rest();
    this.node.house.nodes.detach(this.node.nodeId, this);
    this.link.again(why);
  }

  private rest(): void {
    for (const cancel of this.cancels) cancel();
    this.cancels = [];
    this.lease.rest();
    this.asked = false;
  }
}
