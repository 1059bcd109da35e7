/** One connection of a node: frames in, frames out, the line watched from both sides. */
import type { NodeWiring } from '@/db/queries/plan';
import {
  closeCode,
  leaseS,
  malformedPerMinuteMax,
  parseNodeFrame,
  pingEveryMs,
  type BootId,
  type CommandFrame,
  type HelloFrame,
  type NodeFrame,
  type ServerFrame,
} from '@/lib/field/frames';
import type { Base } from '../base';
import type { CommandLink } from '../control/command-link';
import type { House } from '../control/house';
import type { Ingest } from './ingest';
import { takePack } from './intake';
import type { Line } from './line';
import type { Stall } from './stall';

/** A command that leaves later than this after it was made is not sent: the state of the house has moved on. */
const COMMAND_AGE_MS = 2000;
const MINUTE_MS = 60_000;
/** Looks come each quarter of the time between two pings; one that comes a little early must not make a ping wait for the next. */
const PING_SLACK_MS = pingEveryMs / 8;
/** What our own log keeps of a node's text. */
const LOG_TEXT_MAX = 4000;

export interface LinkDeps extends Base {
  ingest: Ingest;
  stall: Stall;
  /** A node says who it is: this connection is the node's now. */
  onHello: (link: NodeLink) => void;
  onClose: (link: NodeLink) => void;
}

export class NodeLink implements CommandLink {
  boot: BootId = '';
  canFallback = false;
  seen: { seq: number; at: number } | null = null;
  private hello: HelloFrame | null = null;
  private malformedAt: number[] = [];
  private heardAtMs: number;
  private isClosed = false;
  private lastPingMs = -Infinity;

  constructor(
    private readonly line: Line,
    readonly house: House,
    readonly nodeId: string,
    readonly tokenHash: string,
    private readonly deps: LinkDeps,
  ) {
    this.heardAtMs = deps.clock.monotonicMs();
    line.listen({
      text: (text, isBinary) => this.guard(() => this.take(text, isBinary)),
      pong: (mark) => this.guard(() => this.takePong(mark)),
      heard: () => this.guard(() => this.heard()),
      closed: () => this.closed(),
    });
  }

  /** As wired now; a change of plan may have changed it. */
  get node(): NodeWiring | undefined {
    return this.house.record.nodes.find((one) => one.id === this.nodeId);
  }

  get saidHello(): boolean {
    return this.hello !== null;
  }

  close(code: number, why: string): void {
    if (this.isClosed) return;
    this.line.close(code, why);
    // One that does not answer the closing is cut: it may be half-open.
    this.deps.clock.after(1000, () => this.line.cut());
    this.closed();
  }

  sendCommand(frame: CommandFrame, madeAtMs: number): void {
    const isLate = this.deps.clock.monotonicMs() - madeAtMs > COMMAND_AGE_MS;
    if (isLate || this.deps.stall.isSuspect(this)) {
      this.deps.metrics.add('commands_withheld_total');
      return;
    }
    this.deps.metrics.add('commands_sent_total');
    this.send(frame);
  }

  private take(text: string, isBinary: boolean): void {
    this.heard();
    const parsed = isBinary ? ({ ok: false, why: 'not a text message' } as const) : parseNodeFrame(text);
    if (!parsed.ok) return this.malformed(parsed.why, 'seq' in parsed ? parsed.seq : undefined);
    const { frame } = parsed;
    if (frame.type === 'hello') return this.takeHello(frame);
    if (this.hello === null) return this.malformed('hello comes first', frame.seq);
    this.takeAfterHello(frame);
  }

  private takeHello(hello: HelloFrame): void {
    const { clock, log } = this.deps;
    const { node } = this;
    if (node === undefined) return this.close(closeCode.policy, 'this node was taken out of use');
    if (hello.node !== node.key && hello.node !== node.id) {
      log.warn({ said: hello.node, node: node.key }, 'a node calls itself by another name than its token');
    }
    this.hello = hello;
    this.boot = hello.boot;
    this.canFallback = hello.can?.includes('fallback') === true;
    this.seen = null;
    this.deps.onHello(this);
    this.house.nodes.greet(this.nodeId, hello, clock.appNow());
    this.send({
      type: 'welcome',
      now: clock.appNow() / 1000,
      rate: clock.rate,
      lease: leaseS,
      report: node.reportEveryS,
    });
  }

  private takeAfterHello(frame: Exclude<NodeFrame, HelloFrame>): void {
    const { clock, log, ingest } = this.deps;
    const { node } = this;
    if (node === undefined) return this.close(closeCode.policy, 'this node was taken out of use');
    switch (frame.type) {
      case 'relays': {
        const at = clock.appNow();
        this.seen = { seq: frame.seq, at };
        return this.house.nodes.takeRelays(this.nodeId, this, frame, at);
      }
      case 'log': {
        const { seq, level, text } = frame;
        log.info({ node: node.key, level, text: text.slice(0, LOG_TEXT_MAX) }, 'a node says');
        this.house.nodes.takeLog(this.nodeId, frame, clock.appNow()).then(
          (isKept) => isKept && this.send({ type: 'ack', seq }),
          (error: unknown) => log.warn({ err: error, node: node.key }, 'a log could not be kept'),
        );
        return;
      }
      case 'readings': {
        const { seq } = frame;
        takePack(this.deps, ingest, this.house, node, frame.pack).then(
          (taken) => this.send({ type: 'ack', seq, ...taken }),
          (error: unknown) => {
            // No acknowledgement: the node keeps its readings.
            log.warn({ err: error, node: node.key }, 'a pack could not be stored');
            this.send({
              type: 'error',
              why: 'this pack could not be stored; keep it and send it again',
              seq,
            });
          },
        );
      }
    }
  }

  private malformed(why: string, seq?: number): void {
    const { clock, metrics } = this.deps;
    metrics.add('frames_malformed_total');
    const now = clock.monotonicMs();
    this.malformedAt = [...this.malformedAt.filter((at) => now - at < MINUTE_MS), now];
    this.send({ type: 'error', why, ...(seq === undefined ? {} : { seq }) });
    if (this.malformedAt.length >= malformedPerMinuteMax)
      this.close(closeCode.policy, 'too many malformed frames');
  }

  private send(frame: ServerFrame): void {
    if (!this.isClosed) this.line.send(JSON.stringify(frame));
  }

  private heard(): void {
    this.heardAtMs = this.deps.clock.monotonicMs();
    if (this.hello !== null) this.house.nodes.heard(this.nodeId);
  }

  private takePong(data: Buffer): void {
    this.heard();
    this.deps.stall.pong(this, data);
  }

  /** Called each quarter of the time between two pings. */
  watch(): void {
    const now = this.deps.clock.monotonicMs();
    if (now - this.heardAtMs > this.line.silenceMs) {
      this.deps.log.info({ node: this.nodeId }, 'a node is silent; its line is cut');
      this.line.cut();
      return this.closed();
    }
    if (now - this.lastPingMs < pingEveryMs - PING_SLACK_MS) return;
    this.lastPingMs = now;
    this.ping('');
  }

  ping(mark: string): void {
    if (!this.isClosed) this.line.ping(mark);
  }

  private closed(): void {
    if (this.isClosed) return;
    this.isClosed = true;
    this.deps.onClose(this);
  }

  /** What one node sends must not harm the others. */
  private guard(work: () => void): void {
    try {
      work();
    } catch (error) {
      this.deps.log.error({ err: error, node: this.nodeId }, 'a frame could not be dealt with');
      this.malformed('this frame could not be dealt with');
    }
  }
}
