/** A field node written from the field protocol alone: for tests of the whole program from outside. */
import { randomUUID } from 'node:crypto';
import { WebSocket } from 'ws';
import { until } from './until';

type Coil = 'on' | 'off';
export interface Command {
  type: 'command';
  number: number;
  lease: number;
  boot: string;
  seen: number;
  channels: Record<string, Coil>;
  fallback?: Record<string, { point: string; below: number; above: number; onFor: number; offFor: number }>;
}
/** What a node brings along that was here before, or can more than the least. */
export interface Brings {
  /** Of a node whose line was lost; else it has just started. */
  boot?: string;
  can?: string[];
  coils?: Record<string, Coil>;
  number?: number;
  trips?: number;
  /** Texts that it kept while it was away, sent right after its first `relays`. */
  logs?: string[];
}
interface Ack {
  type: 'ack';
  seq: number;
  stored: number;
  duplicate: number;
  refused: { index: number; name: string; why: string }[];
}
interface Frame {
  type: string;
  [key: string]: unknown;
}

export interface SenmlRecord {
  n: string;
  u?: string;
  t?: number;
  v?: number;
}

export class OutsideNode {
  readonly frames: { at: number; frame: Frame }[] = [];
  closed: { code: number; at: number } | undefined;
  coils: Record<string, Coil> = {};
  /** Highest command number seen. */
  number = 0;
  trips = 0;
  private seq = 0;
  private socket: WebSocket;
  private readonly relayFrames = new Set<number>();
  private report: NodeJS.Timeout | undefined;
  private leaseTimer: NodeJS.Timeout | undefined;
  private readonly sentAt = new Map<number, number>();
  private rate = 1;

  private constructor(
    url: string,
    token: string,
    channels: number,
    readonly boot: string,
  ) {
    for (let relay = 1; relay <= channels; relay++) this.coils[String(relay)] = 'off';
    this.socket = new WebSocket(`${url.replace('http', 'ws')}/field/v1`, {
      headers: { authorization: `Bearer ${token}` },
    });
    this.socket.on('message', (raw: Buffer) => this.take(JSON.parse(raw.toString('utf8')) as Frame));
    this.socket.on('close', (code) => {
      this.closed = { code, at: performance.now() };
      clearInterval(this.report);
    });
    this.socket.on('error', () => undefined);
  }

  static async connect(
    url: string,
    token: string,
    key: string,
    channels = 8,
    { boot = randomUUID(), can, coils = {}, number = 0, trips = 0, logs = [] }: Brings = {},
  ): Promise<OutsideNode> {
    const node = new OutsideNode(url, token, channels, boot);
    Object.assign(node.coils, coils);
    Object.assign(node, { number, trips });
    await new Promise<void>((resolve, reject) => {
      node.socket.once('open', resolve);
      node.socket.once('unexpected-response', (_request, response) => {
        reject(new Error(`refused with ${response.statusCode}`));
      });
      node.socket.once('error', reject);
    });
    const clock = Date.now() / 1000;
    node.send({
      type: 'hello',
      node: key,
      firmware: 'outside 1',
      channels,
      boot,
      clock,
      ...(can && { can }),
    });
    const welcome = await node.next((frame) => frame.type === 'welcome');
    node.rate = Number(welcome['rate']);
    node.sendRelays();
    for (const text of logs) node.log(text);
    node.report = setInterval(() => node.sendRelays(), 10_000 / node.rate);
    await node.next((frame) => frame.type === 'command');
    return node;
  }

  /** Sends a pack and waits for its acknowledgement. */
  async readings(pack: SenmlRecord[], limitMs = 5000): Promise<Ack> {
    const seq = this.sendReadings(pack);
    return (await this.next(
      (frame) => frame.type === 'ack' && frame['seq'] === seq,
      limitMs,
    )) as unknown as Ack;
  }

  sendReadings(pack: SenmlRecord[]): number {
    return this.send({ type: 'readings', pack });
  }

  sendRelays(): number {
    const seq = this.send({ type: 'relays', channels: this.coils, number: this.number, trips: this.trips });
    this.relayFrames.add(seq);
    this.sentAt.set(seq, performance.now());
    return seq;
  }

  /** @returns the frame's seq */
  log(text: string, level = 'info'): number {
    return this.send({ type: 'log', level, text });
  }

  /** App time as the node keeps it from its welcome, Unix seconds. */
  now(): number {
    const welcome = this.frames.find(({ frame }) => frame.type === 'welcome');
    if (welcome === undefined) throw new Error('no welcome came');
    return Number(welcome.frame['now']) + ((performance.now() - welcome.at) / 1000) * this.rate;
  }

  sendText(text: string): void {
    this.socket.send(text);
  }

  /** Waits for a frame that has come or will come. */
  async next(wanted: (frame: Frame) => boolean, limitMs = 5000): Promise<Frame> {
    const found = () => this.frames.find(({ frame }) => wanted(frame))?.frame;
    await until('a frame from the server', () => found() !== undefined, limitMs);
    return found() as Frame;
  }

  /** Real milliseconds from now until the coil is as wanted. */
  async coil(relay: number, wanted: Coil, limitMs = 5000): Promise<number> {
    const from = performance.now();
    await until(`relay ${relay} is ${wanted}`, () => this.coils[String(relay)] === wanted, limitMs);
    return performance.now() - from;
  }

  close(): void {
    clearInterval(this.report);
    clearTimeout(this.leaseTimer);
    this.socket.close();
  }

  terminate(): void {
    clearInterval(this.report);
    clearTimeout(this.leaseTimer);
    this.socket.terminate();
  }

  private send(frame: object): number {
    const seq = ++this.seq;
    const hello = 'type' in frame && frame.type === 'hello';
    this.socket.send(JSON.stringify(hello ? frame : { ...frame, seq }));
    return seq;
  }

  private take(frame: Frame): void {
    this.frames.push({ at: performance.now(), frame });
    if (frame.type !== 'command') return;
    const command = frame as unknown as Command;
    if (command.boot !== this.boot || !this.relayFrames.has(command.seen) || command.number < this.number)
      return;
    this.number = command.number;
    clearTimeout(this.leaseTimer);
    const ends = (this.sentAt.get(command.seen) ?? 0) + (command.lease * 1000) / this.rate;
    this.leaseTimer = setTimeout(() => this.drop(), Math.max(0, ends - performance.now()));
    const changed = Object.entries(command.channels).some(([relay, coil]) => this.coils[relay] !== coil);
    Object.assign(this.coils, command.channels);
    if (changed) this.sendRelays();
  }

  private drop(): void {
    this.trips += 1;
    for (const relay of Object.keys(this.coils)) this.coils[relay] = 'off';
    if (this.closed === undefined) this.sendRelays();
  }
}
