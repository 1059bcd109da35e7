/** A field node behind a broker, written from the field protocol and docs/buses.md alone. */
import { createHash, createHmac, randomUUID } from 'node:crypto';
import { connect, type MqttClient } from 'mqtt';
import type { SenmlRecord } from './outside-node';
import { until } from './until';

type Coil = 'on' | 'off';
export interface Frame {
  type: string;
  [key: string]: unknown;
}
export interface Way {
  port: number;
  ca: string;
  user: string;
  password: string;
  /** The node's id in Middenward. */
  id: string;
  token: string;
}

export class OutsideMqttNode {
  readonly frames: Frame[] = [];
  readonly boot = randomUUID();
  coils: Record<string, Coil> = {};
  number = 0;
  trips = 0;
  /** Frames whose signature did not fit. */
  strange = 0;
  private seq = 0;
  private helloMac = '';
  private session = '';
  /** Greatest of the welcomes to the latest hello. */
  private epoch = 0;
  private rate = 1;
  private readonly relayFrames = new Map<number, number>();
  private leaseTimer: NodeJS.Timeout | undefined;
  private report: NodeJS.Timeout | undefined;
  private again: NodeJS.Timeout | undefined;
  private readonly up: string;
  private readonly down: string;
  private readonly key: string;

  private constructor(
    readonly client: MqttClient,
    way: Way,
    channels: number,
  ) {
    for (let relay = 1; relay <= channels; relay++) this.coils[String(relay)] = 'off';
    this.up = `middenward/v1/${way.id}/up`;
    this.down = `middenward/v1/${way.id}/down`;
    this.key = createHash('sha256').update(way.token).digest('hex');
    client.on('message', (_topic, payload) => this.take(payload.toString('utf8')));
    client.on('error', () => undefined);
    client.on('connect', () => client.subscribe(this.down, { qos: 1 }, () => this.hello()));
  }

  /** @param waits for the first command */
  static async start(way: Way, channels = 4, waits = true): Promise<OutsideMqttNode> {
    const client = connect({
      ...{ host: 'localhost', port: way.port, protocol: 'mqtts', ca: way.ca, clean: true },
      ...{ username: way.user, password: way.password, reconnectPeriod: 200, queueQoSZero: false },
    });
    const node = new OutsideMqttNode(client, way, channels);
    if (waits) await node.next((frame) => frame.type === 'command');
    return node;
  }

  /** Said again until somebody answers: a broker keeps it for nobody who comes later. */
  hello(): void {
    clearTimeout(this.again);
    this.again = setTimeout(() => this.hello(), 2000);
    this.session = '';
    this.epoch = 0;
    this.helloMac = this.publish(
      {
        type: 'hello',
        node: 'N-1',
        firmware: 'outside mqtt 1',
        channels: Object.keys(this.coils).length,
        boot: this.boot,
        clock: Date.now() / 1000,
      },
      '',
    );
  }

  sendRelays(): number {
    const seq = ++this.seq;
    this.relayFrames.set(seq, performance.now());
    this.send({ type: 'relays', seq, channels: this.coils, number: this.number, trips: this.trips });
    return seq;
  }

  sendReadings(pack: SenmlRecord[]): number {
    const seq = ++this.seq;
    this.send({ type: 'readings', seq, pack });
    return seq;
  }

  async readings(pack: SenmlRecord[], limitMs = 5000): Promise<Frame> {
    const seq = this.sendReadings(pack);
    return this.next((frame) => frame.type === 'ack' && frame['seq'] === seq, limitMs);
  }

  /** Waits for a frame that has come or will come. */
  async next(wanted: (frame: Frame) => boolean, limitMs = 10_000): Promise<Frame> {
    await until('a frame from the broker', () => this.frames.some(wanted), limitMs);
    return this.frames.find(wanted) as Frame;
  }

  async coil(relay: number, wanted: Coil, limitMs = 5000): Promise<void> {
    await until(`relay ${relay} is ${wanted}`, () => this.coils[String(relay)] === wanted, limitMs);
  }

  async end(): Promise<void> {
    clearInterval(this.report);
    clearTimeout(this.again);
    clearTimeout(this.leaseTimer);
    await this.client.endAsync(true);
  }

  private send(frame: object): void {
    if (this.session !== '') this.publish(frame, this.session);
  }

  private publish(frame: object, before: string): string {
    const text = JSON.stringify(frame);
    const mac = this.mac(this.up, before, text);
    if (this.client.connected)
      this.client.publish(this.up, `${text.slice(0, -1)},"mac":"${mac}"}`, { qos: 1 });
    return mac;
  }

  private mac(topic: string, before: string, text: string): string {
    return createHmac('sha256', this.key).update(`${topic}\n${before}\n${text}`).digest('hex');
  }

  private take(payload: string): void {
    const [, body = '', mac = ''] = /^(.*),"mac":"([0-9a-f]{64})"\}$/s.exec(payload) ?? [];
    const text = `${body}}`;
    const fits = (before: string) => this.mac(this.down, before, text) === mac;
    const frame = JSON.parse(text) as Frame;
    if (frame.type === 'welcome' && fits(this.helloMac)) return this.welcome(frame, mac);
    if (frame.type === 'error' && frame['hello'] === true && (fits('') || fits(this.session)))
      return this.hello();
    if (!fits(this.session)) return void (this.strange += 1);
    this.frames.push(frame);
    if (frame.type === 'command') this.command(frame);
  }

  private welcome(frame: Frame, mac: string): void {
    if (Number(frame['epoch']) < this.epoch) return;
    clearTimeout(this.again);
    this.epoch = Number(frame['epoch']);
    this.session = mac;
    this.rate = Number(frame['rate']);
    this.frames.push(frame);
    this.relayFrames.clear();
    clearInterval(this.report);
    this.report = setInterval(() => this.sendRelays(), 10_000 / this.rate);
    this.sendRelays();
  }

  private command(frame: Frame): void {
    const sentAt = this.relayFrames.get(Number(frame['seen']));
    const number = Number(frame['number']);
    if (frame['boot'] !== this.boot || sentAt === undefined || number < this.number) return;
    this.number = number;
    clearTimeout(this.leaseTimer);
    const ends = sentAt + (Number(frame['lease']) * 1000) / this.rate;
    this.leaseTimer = setTimeout(() => this.drop(), Math.max(0, ends - performance.now()));
    const before = JSON.stringify(this.coils);
    Object.assign(this.coils, frame['channels']);
    if (JSON.stringify(this.coils) !== before) this.sendRelays();
  }

  private drop(): void {
    this.trips += 1;
    for (const relay of Object.keys(this.coils)) this.coils[relay] = 'off';
    this.sendRelays();
  }
}
