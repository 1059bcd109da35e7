/**
 * What a node and its server say to each other: the greeting, frames under their numbers, and who is told of what came.
 * What a node knows of the server is what comes over the wire.
 */
import { parseServerFrame, type BootId, type CommandFrame } from '@/lib/field/frames';
import { Line } from './line';
import type { NodeParts } from './node-parts';

/** What the node makes of what was said. */
export interface Speaker {
  boot(): BootId;
  /** @param report interval of readings, s of app time */
  welcomed(report: number): void;
  commanded(frame: CommandFrame): void;
  logKept(seq: number): void;
  readingsKept(seq: number): void;
  lineDown(): void;
}

export class Conversation {
  private readonly line: Line;
  private seq = 0;
  private welcome = false;

  /** @param run what the line brings is done through it, as all that the node does */
  constructor(
    private readonly parts: Pick<NodeParts, 'key' | 'token' | 'server' | 'relays' | 'clock' | 'time' | 'log'>,
    run: (work: () => void) => void,
    private readonly node: Speaker,
  ) {
    this.line = new Line(parts.server, parts.token, parts.clock, {
      opened: () => run(() => this.greet()),
      text: (text) => run(() => this.received(text)),
      closed: (code, why, againInMs) => run(() => this.closed(code, why, againInMs)),
    });
  }

  /** The server has welcomed the node on this line: before that it may say nothing but who it is. */
  get isWelcome(): boolean {
    return this.welcome;
  }

  start(): void {
    this.line.dial();
  }

  stop(): void {
    this.line.stop();
  }

  unplug(): void {
    this.line.unplug();
  }

  plugIn(): void {
    this.line.plugIn();
  }

  /** A new boot: it numbers from the beginning, on a new line. */
  restart(): void {
    this.seq = 0;
    this.welcome = false;
    this.line.drop();
  }

  /** @returns the frame's seq, or null where the line is not open */
  send(frame: { type: 'relays' | 'readings' | 'log' } & Record<string, unknown>): number | null {
    if (!this.welcome) return null;
    this.seq += 1;
    return this.line.send({ ...frame, seq: this.seq }) ? this.seq : null;
  }

  private greet(): void {
    const appMs = this.parts.time.nowMs();
    this.line.send({
      type: 'hello',
      node: this.parts.key,
      firmware: 'yard 1',
      channels: this.parts.relays,
      boot: this.node.boot(),
      clock: appMs === null ? null : appMs / 1000,
      can: ['fallback'],
    });
  }

  private received(text: string): void {
    const parsed = parseServerFrame(text);
    if (!parsed.ok) return this.parts.log('frame not understood', { why: parsed.why });
    const { frame } = parsed;
    switch (frame.type) {
      case 'welcome':
        this.parts.time.set(frame.now * 1000);
        this.parts.log('welcome', { report: frame.report });
        this.line.welcomed();
        this.welcome = true;
        return this.node.welcomed(frame.report);
      case 'command':
        return this.node.commanded(frame);
      case 'ack':
        if (!('stored' in frame)) return this.node.logKept(frame.seq);
        if (frame.refused.length > 0) this.parts.log('readings refused', { refused: frame.refused });
        return this.node.readingsKept(frame.seq);
      case 'error':
        return this.parts.log('error from the server', { why: frame.why, seq: frame.seq ?? null });
    }
  }

  private closed(code: number, why: string, againInMs: number): void {
    this.parts.log('line down', { code, why, againInMs: Math.round(againInMs) });
    this.welcome = false;
    this.node.lineDown();
  }
}
