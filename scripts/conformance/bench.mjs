// The test bench: a server that one node connects to, the node's own process where we run it, and ways to wait for both.
import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { performance } from 'node:perf_hooks';
import { createInterface } from 'node:readline/promises';
import { setTimeout as pause } from 'node:timers/promises';
import { WebSocketServer } from 'ws';
import { Connection } from './connection.mjs';

export const LEASE_S = 30;
export const RELAYS_EVERY_S = 10;
/** What a busy board and the way may take beside what the protocol says, real ms. */
export const SLACK_MS = 1000;
/** The longest back-off is 30 s, a take-over's wait 60. */
const COMES_WITHIN_MS = 75_000;

/** A promise that is not kept; its message is what was seen. */
export class Broken extends Error {}
/** A promise that cannot be looked at here; its message says why. */
export class LeftOut extends Error {}

export class Bench {
  /** All connections so far, the newest last. */
  connections = [];
  /** Why upgrades were refused, in words. */
  refused = [];
  /** Whether connections are taken; else they are closed at once, and the node waits and comes again. */
  isOpen = true;
  #child;
  #sockets;
  #number = 2 ** 32;
  #startedMs = performance.now();
  #startedAt = Date.now();

  constructor(settings) {
    Object.assign(this, { settings, rate: settings.rate, reportS: 10 });
  }

  async open() {
    const { url, token } = this.settings;
    this.#sockets = new WebSocketServer({
      ...{ host: url.hostname, port: Number(url.port), maxPayload: 64 * 1024, autoPong: false },
      verifyClient: ({ req }, done) => {
        const why = this.#refusal(req);
        if (why !== null) this.refused.push(why);
        done(why === null, why?.includes('token') ? 401 : 404);
      },
    });
    this.#sockets.on('connection', (socket) => this.#take(socket, token));
    await once(this.#sockets, 'listening');
    if (this.canStart) this.#spawn();
  }

  async close() {
    this.#sockets?.close();
    for (const { socket } of this.connections) socket.terminate();
    await this.#kill();
  }

  get canStart() {
    return this.settings.run !== undefined;
  }

  /** App time, Unix seconds. */
  now() {
    return this.#startedAt / 1000 + ((performance.now() - this.#startedMs) / 1000) * this.rate;
  }

  /** App time goes on from where it is, at another pace: a node is told so by its next welcome, and not before. */
  #setRate(rate) {
    [this.#startedAt, this.#startedMs] = [this.now() * 1000, performance.now()];
    this.rate = rate;
  }

  /** Real ms of seconds of app time. */
  ms(seconds) {
    return (seconds * 1000) / this.rate;
  }

  /** The connection that is open now. */
  get line() {
    const line = this.connections.at(-1);
    if (line === undefined || line.closed !== null) throw new Broken('the node is not connected');
    return line;
  }

  /** A new number for a command: above all before. */
  nextNumber(least = 0) {
    this.#number = Math.max(this.#number + 1, least);
    return this.#number;
  }

  /** Waits until `look` gives something that is neither undefined, null nor false. */
  async until(what, look, limitMs) {
    for (const end = performance.now() + limitMs; ;) {
      const found = look();
      if (found !== undefined && found !== null && found !== false) return found;
      if (performance.now() > end) throw new Broken(`not within ${seconds(limitMs)}: ${what}`);
      await pause(10);
    }
  }

  pause = pause;

  /** A connection on which hello was said, that came after this many; not yet welcomed. */
  async greeted(after = 0) {
    const said = () =>
      this.connections.slice(after).find(({ hello, closed }) => hello !== undefined && closed === null);
    return this.until(`a connection with a hello${this.#told()}`, said, COMES_WITHIN_MS);
  }

  welcome(line, report = this.reportS) {
    line.welcomedAt = this.now();
    line.send({ type: 'welcome', now: this.now(), rate: this.rate, lease: LEASE_S, report });
  }

  /** A line that is open and welcomed: the one there is, or the next that comes. */
  async welcomed() {
    const open = this.connections.at(-1);
    if (open !== undefined && open.closed === null && open.lastRelays !== undefined) return open;
    return this.#welcome(await this.greeted(this.connections.length - (open?.closed === null ? 1 : 0)));
  }

  /** Cuts the line, and gives the next one once it is welcomed, at another rate if one is given. */
  async again({ closedForMs = 0, isAcking = true, rate = this.rate } = {}) {
    const before = this.connections.length;
    this.isOpen = closedForMs === 0;
    this.connections.at(-1)?.cut();
    await pause(closedForMs);
    const from = this.isOpen ? before : this.connections.length;
    this.isOpen = true;
    const line = await this.greeted(from);
    line.isAcking = isAcking;
    if (rate !== this.rate) this.#setRate(rate);
    return this.#welcome(line);
  }

  /** Orders coils, answers each report with them from then on, and waits until the node says that it has them. */
  async order(channels, fallback) {
    const { line } = this;
    const order = { number: this.nextNumber(), channels, ...(fallback && { fallback }) };
    line.order = order;
    line.command(order);
    await this.until(
      `relays with number ${order.number} and ${JSON.stringify(channels)}`,
      () => line.lastRelays.frame.number === order.number && this.has(line, channels),
      2000 + SLACK_MS,
    );
    return order;
  }

  /** Whether the last report has these coils, and every other relay off. */
  has(line, channels) {
    const told = line.lastRelays?.frame.channels ?? {};
    return Object.entries(told).every(([relay, coil]) => coil === (channels[relay] ?? 'off'));
  }

  /** The next report that comes from now on: what the coils are then. */
  async report(line = this.line) {
    const before = line.of('relays').length;
    const next = () => line.of('relays')[before];
    return this.until('the next relays frame', next, this.ms(RELAYS_EVERY_S) * 1.5 + SLACK_MS);
  }

  /** Ends the node as a power cut does, and starts it again. @returns its line, greeted and not welcomed */
  async powerCut() {
    const from = this.connections.length;
    if (this.canStart) {
      await this.#kill();
      this.#spawn();
    } else if (this.settings.ask) await ask('Cut the power of the node, give it again, and press Enter.');
    else throw new LeftOut('needs --run COMMAND, or --ask');
    return this.greeted(from);
  }

  async #welcome(line) {
    this.welcome(line);
    const { frame } = await this.until('relays after the welcome', () => line.lastRelays, 5000);
    // a node that was commanded before knows greater numbers than we begin with
    this.nextNumber((frame.number ?? 0) + 1);
    return line;
  }

  #refusal({ url, headers }) {
    if (new URL(url, 'ws://x').pathname !== '/field/v1') return `it asked for ${url}`;
    return headers.authorization === `Bearer ${this.settings.token}`
      ? null
      : 'it brought no token, or another';
  }

  #take(socket, token) {
    if (!this.isOpen) return socket.terminate();
    this.connections.push(new Connection(socket, { token, clock: () => this.now() }));
  }

  #told() {
    return this.refused.length === 0 ? '' : `; refused: ${this.refused.at(-1)}`;
  }

  #spawn() {
    const child = spawn('sh', ['-c', `exec ${this.settings.run}`], {
      stdio: ['ignore', 'ignore', 'inherit'],
    });
    this.#child = child;
  }

  async #kill() {
    const child = this.#child;
    if (child === undefined || child.exitCode !== null || child.signalCode !== null) return;
    child.kill('SIGKILL');
    await once(child, 'exit');
  }
}

export const seconds = (ms) => `${Math.round(ms / 100) / 10} s`;

async function ask(what) {
  const io = createInterface({ input: process.stdin, output: process.stdout });
  await io.question(`${what} `);
  io.close();
}
