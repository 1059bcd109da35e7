/** A node behind a broker: one connection to the broker a node, made again for as long as the node is wired. */
import { randomBytes } from 'node:crypto';
import { connect, type IClientOptions, type MqttClient } from 'mqtt';
import type { MqttBus } from '@/lib/schema/bus';
import { frameBytesMax } from '@/lib/field/frames';
import { splitMac, topicsOf, withMac } from '@/lib/field/signed';
import { brokerTrouble } from '@/lib/wording/bus';
import type { Cancel } from '../clock';
import { BackOff } from './back-off';
import { wiringOf, type Bus, type BusDeps, type BusNode } from './bus';
import { isMac, macOf, MqttLine, type Broker } from './mqtt-line';

const CONNECT_LIMIT_MS = 10_000;
const KEEP_ALIVE_S = 10;
/** Who cannot be understood is asked for a hello no more often than this. */
const ASK_EVERY_MS = 5000;
const END_LIMIT_MS = 500;

export class MqttNode implements Bus, Broker {
  private client: MqttClient | null = null;
  private line: MqttLine | null = null;
  private boot: unknown = null;
  private stopped = false;
  private askedAtMs = -Infinity;
  private cancelDial: Cancel = () => undefined;
  private readonly backOff = new BackOff();
  private readonly topics: { up: string; down: string };

  constructor(
    private readonly node: BusNode,
    private readonly settings: MqttBus & { password: string | null },
    private readonly deps: BusDeps,
  ) {
    this.topics = topicsOf(node.nodeId);
    this.dial();
  }

  get isUp(): boolean {
    return this.client?.connected === true;
  }

  async stop(): Promise<void> {
    this.stopped = true;
    this.cancelDial();
    this.line?.close(1012, 'this worker stops');
    const { client } = this;
    this.client = null;
    if (client === null) return;
    // what was just said may leave; a broker that does not answer is not waited for
    await Promise.race([
      client.endAsync().catch(() => undefined),
      new Promise<void>((resolve) => void this.deps.clock.after(END_LIMIT_MS, resolve)),
    ]);
    client.end(true);
  }

  publish(topic: string, text: string): void {
    // an unsent message would be kept by the client and leave with the next connection, when it is stale
    if (this.client?.connected !== true) return;
    this.client.publish(topic, text, { qos: 1, retain: false }, (error) => {
      if (error)
        this.deps.log.debug({ err: error, node: this.node.nodeId }, 'a frame did not reach the broker');
    });
  }

  ping(answered: () => void): void {
    const { client } = this;
    if (client?.connected !== true) return;
    const look = (packet: { cmd?: string }) => {
      if (packet.cmd !== 'pingresp') return;
      client.removeListener('packetreceive', look);
      answered();
    };
    client.on('packetreceive', look);
    client.sendPing();
  }

  /** A client of its own for each connection: one that connects again by itself sends again what it could not, however old. */
  private dial(): void {
    if (this.stopped) return;
    const client = connect(this.options());
    this.client = client;
    let why = 'it closed the connection';
    client.on('error', (error) => (why = brokerTrouble(error)));
    client.on('connect', () => this.subscribe(client));
    client.on('message', (_topic, payload, { retain }) => {
      // what is retained was said at some other time
      if (retain) return this.deps.metrics.add('frames_retained_total');
      this.guard(() => this.take(payload));
    });
    client.on('close', () => this.lost(client, why));
  }

  private options(): IClientOptions {
    const { host, port, tls, ca, user, password } = this.settings;
    return {
      ...{ host, port, protocol: tls ? 'mqtts' : 'mqtt', protocolVersion: 4, clean: true },
      ...{ reconnectPeriod: 0, connectTimeout: CONNECT_LIMIT_MS, keepalive: KEEP_ALIVE_S },
      ...{ rejectUnauthorized: true, resubscribe: false, queueQoSZero: false, timerVariant: 'native' },
      // its own each time: two workers must not put one another out; 23 characters are what every broker takes
      clientId: `mw${randomBytes(10).toString('hex')}`,
      ...(ca === null ? {} : { ca }),
      ...(user === null ? {} : { username: user }),
      ...(password === null ? {} : { password }),
    };
  }

  private subscribe(client: MqttClient): void {
    client.subscribe(this.topics.up, { qos: 1 }, (error, granted) => {
      if (this.client !== client) return;
      const isGranted = error === null && (granted ?? []).every(({ qos }) => qos < 128);
      if (!isGranted) {
        this.tell('it does not let us listen to the topic of this node');
        return void client.end(true);
      }
      this.backOff.reset();
      this.tell(null);
      // a node that came first said its hello to nobody
      this.askForHello();
    });
  }

  private lost(client: MqttClient, why: string): void {
    if (this.client !== client) return;
    this.client = null;
    this.line?.cut();
    client.end(true);
    if (this.stopped) return;
    const waitMs = this.backOff.next();
    this.tell(why);
    this.deps.log.info({ node: this.node.nodeId, why, waitMs: Math.round(waitMs) }, 'a broker is not there');
    this.cancelDial = this.deps.clock.after(waitMs, () => this.dial());
  }

  private take(payload: Buffer): void {
    const signed = payload.length > frameBytesMax ? null : splitMac(payload.toString('utf8'));
    if (signed === null) return this.unsigned();
    const { frame, mac } = signed;
    if (this.line?.take(frame, mac) === true) return;
    const tokens = wiringOf(this.node)?.tokens ?? [];
    const token = tokens.find(
      ({ hash, until }) =>
        (until === null || until > this.deps.clock.realNow()) &&
        isMac(mac, macOf(hash, this.topics.up, '', frame)),
    );
    if (token === undefined) return this.unsigned();
    this.greet(frame, mac, token.hash);
  }

  /** A hello, signed with the node's token, begins a conversation; whatever else is so signed does not. */
  private greet(frame: string, mac: string, tokenHash: string): void {
    const hello: unknown = JSON.parse(frame);
    if (typeof hello !== 'object' || hello === null || !('type' in hello) || hello.type !== 'hello')
      return this.unsigned();
    const boot = 'boot' in hello ? hello.boot : null;
    // the same node that says hello again takes nothing over from anybody
    if (boot === this.boot) this.line?.cut();
    this.boot = boot;
    const line = new MqttLine(
      this,
      this.topics,
      tokenHash,
      mac,
      this.deps.clock.rate,
      this.deps.epoch,
      (one) => {
        if (this.line === one) this.line = null;
      },
    );
    this.deps.gate.carry(line, this.node.house, this.node.nodeId, tokenHash);
    this.line = line;
    line.begin(frame);
  }

  /** Somebody else's, or of a conversation that this worker does not know: the node, if it was the node, begins anew. */
  private unsigned(): void {
    this.deps.metrics.add('frames_unsigned_total');
    this.askForHello();
  }

  private askForHello(): void {
    const { clock } = this.deps;
    const now = clock.monotonicMs();
    const hash = wiringOf(this.node)?.tokens[0]?.hash;
    if (hash === undefined || now - this.askedAtMs < ASK_EVERY_MS) return;
    this.askedAtMs = now;
    const text = JSON.stringify({
      type: 'error',
      why: 'say hello: this conversation is not known',
      hello: true,
    });
    this.publish(this.topics.down, withMac(text, macOf(hash, this.topics.down, '', text)));
  }

  private tell(why: string | null): void {
    this.node.house.nodes.tellLink(this.node.nodeId, why);
  }

  private guard(work: () => void): void {
    try {
      work();
    } catch (error) {
      this.deps.log.warn(
        { err: error, node: this.node.nodeId },
        'a message of a broker could not be dealt with',
      );
    }
  }
}
