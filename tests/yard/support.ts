import { once } from 'node:events';
import type { AddressInfo } from 'node:net';
import { WebSocketServer, type WebSocket } from 'ws';
import { parseNodeFrame, type Coils, type NodeFrame } from '@/lib/field/frames';
import { AppTime, type Clock } from '@/worker/yard/clock';
import { FieldNode } from '@/worker/yard/node';
import type { KeptNode, NodeParts } from '@/worker/yard/node-parts';

/** A clock that stands until it is told to go on; timers fire in their order, each at its own time. */
export class FakeClock implements Clock {
  private ms = 1_000;
  private ids = 0;
  private timers: Array<{ at: number; then: () => void }> = [];

  wallMs = (): number => Date.UTC(2026, 11, 1, 18) + this.ms;
  monotonicMs = (): number => this.ms;
  random = (): number => 0.5;
  id = (): string => `id-${(this.ids += 1)}`;
  after(ms: number, then: () => void): () => void {
    const timer = { at: this.ms + ms, then };
    this.timers.push(timer);
    return () => (this.timers = this.timers.filter((other) => other !== timer));
  }

  advance(ms: number): void {
    const end = this.ms + ms;
    for (;;) {
      const due = this.timers.filter(({ at }) => at <= end).sort((a, b) => a.at - b.at)[0];
      if (due === undefined) break;
      this.timers = this.timers.filter((other) => other !== due);
      this.ms = Math.max(this.ms, due.at);
      due.then();
    }
    this.ms = end;
  }

  /** Time goes by while the process does not run: timers are overdue and fire afterwards. */
  freeze(ms: number): void {
    this.ms += ms;
    this.advance(0);
  }
}

/** One connection as the fake server sees it. */
export class Connection {
  readonly frames: NodeFrame[] = [];
  closedWith: number | undefined;

  constructor(readonly socket: WebSocket) {
    socket.on('message', (data) => {
      const parsed = parseNodeFrame(Buffer.isBuffer(data) ? data.toString('utf8') : '');
      if (!parsed.ok) throw new Error(`the node sent a malformed frame: ${parsed.why}`);
      this.frames.push(parsed.frame);
    });
    socket.on('close', (code) => (this.closedWith = code));
  }

  send(frame: object): void {
    this.socket.send(JSON.stringify(frame));
  }

  of<Type extends NodeFrame['type']>(type: Type): Array<Extract<NodeFrame, { type: Type }>> {
    return this.frames.filter((frame): frame is Extract<NodeFrame, { type: Type }> => frame.type === type);
  }

  /** The seq of the latest `relays` frame: what a command answers. */
  seen(): number {
    return this.of('relays').at(-1)?.seq ?? -1;
  }

  boot(): string | number {
    return this.of('hello')[0]?.boot ?? '';
  }

  /** Waits until the node has read all that was sent, and what it answered has arrived. */
  async settled(): Promise<void> {
    if (this.socket.readyState !== this.socket.OPEN) return;
    this.socket.ping();
    await new Promise<void>((resolve) => {
      const done = (): void => {
        this.socket.off('pong', done).off('close', done);
        resolve();
      };
      this.socket.on('pong', done).on('close', done);
    });
  }

  command(number: number, channels: Coils, changes: object = {}): void {
    this.send({
      type: 'command',
      number,
      lease: 30,
      boot: this.boot(),
      seen: this.seen(),
      channels,
      ...changes,
    });
  }

  acknowledge(seq: number): void {
    this.send({ type: 'ack', seq, stored: 1, duplicate: 0, refused: [] });
  }
}

export class FakeServer {
  readonly connections: Connection[] = [];
  readonly tokens: Array<string | undefined> = [];
  private readonly sockets: WebSocketServer;

  private constructor(sockets: WebSocketServer) {
    this.sockets = sockets;
    sockets.on('connection', (socket, request) => {
      this.tokens.push(request.headers.authorization);
      this.connections.push(new Connection(socket));
    });
  }

  static async open(autoPong = true): Promise<FakeServer> {
    const sockets = new WebSocketServer({ host: '127.0.0.1', port: 0, autoPong });
    await once(sockets, 'listening');
    return new FakeServer(sockets);
  }

  get url(): string {
    return `ws://127.0.0.1:${(this.sockets.address() as AddressInfo).port}`;
  }

  /** The connection of that index, once the node has said hello on it. */
  async connection(index = 0): Promise<Connection> {
    await until(() => (this.connections[index]?.of('hello').length ?? 0) > 0);
    const found = this.connections[index];
    if (found === undefined) throw new Error(`there is no connection ${index}`);
    return found;
  }

  /** A connection that has been welcomed. */
  async welcomed(clock: Clock, index = 0, report = 30): Promise<Connection> {
    const connection = await this.connection(index);
    connection.send({ type: 'welcome', now: clock.wallMs() / 1000, rate: 1, lease: 30, report });
    await connection.settled();
    return connection;
  }

  close(): void {
    for (const socket of this.sockets.clients) socket.terminate();
    this.sockets.close();
  }
}

/** Waits for a condition, 30 s at most; there is no time in it for the node, whose clock stands. */
export async function until(condition: () => boolean): Promise<void> {
  for (const end = Date.now() + 30_000; !condition();) {
    if (Date.now() > end) throw new Error('waited 30 s for what did not come');
    await new Promise((resolve) => setImmediate(resolve));
  }
}

/** Lets the node's clock go on in steps of a second, with all traffic settled between. */
export async function pass(clock: FakeClock, connection: Connection, seconds: number): Promise<void> {
  for (let passed = 0; passed < seconds; passed += 1) {
    clock.advance(Math.min(1, seconds - passed) * 1000);
    await connection.settled();
  }
}

export interface TestNode {
  node: FieldNode;
  clock: FakeClock;
  log: Array<{ event: string } & Record<string, unknown>>;
  /** monotonic times at which coils were about to change */
  changes: number[];
}

/** Flash that outlives a node, as long as it is handed to the next one. */
export function flash(): NodeParts['flash'] {
  let kept: KeptNode = { fallback: null, logs: [] };
  return { read: () => kept, write: (now) => (kept = now) };
}

export function testNode(server: FakeServer, parts: Partial<NodeParts> = {}): TestNode {
  const clock = new FakeClock();
  const log: TestNode['log'] = [];
  const changes: number[] = [];
  const node = new FieldNode({
    key: 'LH-1',
    token: 'mw-test',
    server: server.url,
    relays: 4,
    rate: 1,
    reportS: 30,
    clock,
    time: new AppTime(clock, 1),
    sample: (appMs) => [{ n: 'bench-1', u: 'Cel', v: (appMs / 1000) % 97 }],
    beforeCoilsChange: (ms) => changes.push(ms),
    log: (event, fields) => log.push({ event, ...fields }),
    flash: flash(),
    ...parts,
  });
  node.start();
  return { node, clock, log, changes };
}
