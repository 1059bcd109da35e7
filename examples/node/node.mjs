#!/usr/bin/env node
// A field node of Middenward for any Linux board: node node.mjs SETTINGS.json     (--all-off: drops every coil, and ends)
// The duties it keeps are those of docs/field-node.md, which also says how to hold another node to them.
import { randomUUID } from 'node:crypto';
import { openSync, writeSync } from 'node:fs';
import { AppTime } from './app-time.mjs';
import { Fallback, fallbackLine } from './fallback.mjs';
import { dryRun, sysfs } from './hardware.mjs';
import { Line } from './line.mjs';
import { Relays } from './relays.mjs';
import { Sampler } from './sampler.mjs';
import { readSettings } from './settings.mjs';
import { Kept, Readings } from './store.mjs';

const RELAYS_EVERY_S = 10;
const LOOK_EVERY_S = 5;
/** A value that the fallback saw longer ago is no reading of now. */
const DEAD_AFTER_S = 30;
const ACK_WAIT_MS = 20_000;
const DRIVER_AGAIN_MS = 500;
const WATCHDOG_EVERY_MS = 5000;

class FieldNode {
  #seq = 0;
  #isWelcome = false;
  #isAlone = false;
  #waiting = new Map(); // packs under way, with the timer that ends the waiting for their answer
  #catchUp = null; // the one pack of old readings that is under way
  #untold = []; // what the fallback did before the time was known
  #seen = new Map(); // °C by point, as the fallback sees them, with when
  #isReading = false;
  #timers = {};

  constructor(settings, hardware) {
    const now = performance.now();
    this.hardware = hardware;
    this.settings = settings;
    this.boot = randomUUID();
    this.time = new AppTime(settings.clock === 'machine');
    this.kept = new Kept(settings.folder);
    this.readings = new Readings(settings.folder);
    this.relays = new Relays(hardware, settings.relays.length, this.boot, now);
    this.relays.setRate(this.kept.rate, now);
    this.fallback = new Fallback(this.kept.fallback, this.kept.rate, now, (fallback) =>
      this.kept.keep({ fallback }),
    );
    this.sampler = new Sampler(settings.points, hardware, this.time, (records) => this.#sampled(records));
    this.line = new Line(settings.server, settings.token, {
      opened: () => this.#greet(),
      frame: (frame) => this.#take(frame),
      closed: (code, why, againInMs) => this.#lineDown(code, why, againInMs),
    });
  }

  start() {
    console.log(`boot ${this.boot}, every coil off`);
    this.line.dial();
    this.sampler.start();
    this.#tick();
  }

  stop() {
    this.relays.allOff();
    for (const timer of Object.values(this.#timers)) clearTimeout(timer);
    this.sampler.stop();
    this.#lineDown(1000, 'the node stops', 0);
    this.line.stop();
  }

  #greet() {
    const now = this.time.nowMs();
    this.line.send({
      ...{ type: 'hello', node: this.settings.node, firmware: 'middenward example node 1' },
      ...{
        channels: this.relays.count,
        boot: this.boot,
        clock: now === null ? null : now / 1000,
        can: ['fallback'],
      },
    });
  }

  #take(frame) {
    if (frame.type === 'welcome') this.#welcomed(frame);
    else if (frame.type === 'command') this.#commanded(frame);
    else if (frame.type === 'ack') this.#acknowledged(frame);
    else if (frame.type === 'error') console.error(`the server says: ${frame.why}`);
  }

  #welcomed({ now, rate, report }) {
    this.line.welcomed();
    this.time.welcome(now * 1000, rate);
    this.relays.setRate(rate, performance.now());
    this.fallback.rate = rate;
    if (this.kept.rate !== rate) this.kept.keep({ rate });
    this.relays.connected();
    this.#isWelcome = true;
    console.log('welcome');
    this.#sendRelays(); // first of all: it is what a command answers
    for (const told of this.#untold.splice(0)) this.#tell(...told);
    this.#sendLogs();
    this.#sendReadings();
    this.sampler.every(report);
    this.#tick();
  }

  #commanded(frame) {
    const now = performance.now();
    this.#expire(now);
    const { ignored, changed } = this.relays.command(frame, now);
    if (ignored !== undefined) return console.log(`command ${frame.number} ignored: ${ignored}`);
    this.fallback.take(frame.fallback ?? {});
    this.#endAlone(now);
    if (changed) this.#sendRelays();
    this.#tick();
  }

  #acknowledged({ seq, refused }) {
    for (const { name, why } of refused ?? []) console.error(`refused: ${name}: ${why}`);
    this.kept.logAcknowledged(seq);
    this.#sendLogs();
    if (!this.#waiting.has(seq)) return;
    this.readings.acknowledged(seq);
    this.#settled(seq);
  }

  #lineDown(code, why, againInMs) {
    console.log(`line down (${code} ${why}); again in ${Math.round(againInMs / 1000)} s`);
    this.#isWelcome = false;
    for (const timer of this.#waiting.values()) clearTimeout(timer);
    this.#waiting.clear();
    this.#catchUp = null;
    this.readings.unanswered(); // it may have arrived or not: it is sent again
    this.kept.lineDown();
  }

  /** `seq` counts over all frames of this boot, whatever connection they go by. @returns it, or null without a line */
  #send(frame) {
    if (!this.#isWelcome) return null;
    this.#seq += 1;
    return this.line.send({ ...frame, seq: this.#seq }) ? this.#seq : null;
  }

  #sendRelays() {
    const sentMs = performance.now(); // before it leaves, never after: the lease counts from here
    const seq = this.#send({ type: 'relays', ...this.relays.state() });
    if (seq !== null) this.relays.sent(seq, sentMs);
    this.#set('relays', this.time.realMs(RELAYS_EVERY_S), () => this.#sendRelays());
  }

  #sampled(records) {
    this.readings.add(records);
    this.#sendReadings();
  }

  /** The newest of each point first, so that what is now never waits behind what was; then the rest, the oldest first. */
  #sendReadings() {
    this.#sendPack(this.readings.newest());
    this.#catchUp ??= this.#sendPack(this.readings.oldest());
  }

  #sendPack(entries) {
    if (entries.length === 0) return null;
    const seq = this.#send({ type: 'readings', pack: entries.map(({ record }) => record) });
    if (seq === null) return null;
    for (const entry of entries) entry.seq = seq;
    const again = () => {
      this.readings.unanswered(seq);
      this.#settled(seq);
    };
    this.#waiting.set(seq, setTimeout(again, ACK_WAIT_MS));
    return seq;
  }

  #settled(seq) {
    clearTimeout(this.#waiting.get(seq));
    this.#waiting.delete(seq);
    if (this.#catchUp === seq) this.#catchUp = null;
    this.#catchUp ??= this.#sendPack(this.readings.oldest());
  }

  #log(level, text) {
    console.log(text);
    this.kept.addLog({ level, text });
    this.#sendLogs();
  }

  #sendLogs() {
    for (const entry of this.kept.waitingLogs()) entry.seq = this.#send({ type: 'log', ...entry.log });
  }

  /** Looks at all that ends by itself, and comes back when the next of it does. */
  #tick() {
    const now = performance.now();
    this.#expire(now);
    const isSet = this.relays.tryAgain();
    if (this.relays.isAlone(now)) this.#alone(now);
    const ends = [
      this.relays.leaseEndsMs ?? Infinity,
      this.fallback.nextEndMs(),
      now + this.time.realMs(LOOK_EVERY_S),
    ];
    if (!this.relays.isAlone(now)) ends.push(this.relays.aloneFromMs);
    if (!isSet) ends.push(now + DRIVER_AGAIN_MS);
    this.#set('tick', Math.min(...ends) - now, () => this.#tick());
  }

  #expire(now) {
    if (!this.relays.expire(now)) return;
    this.#sendRelays();
    this.#log('warning', 'the lease ended: every coil dropped');
  }

  #alone(now) {
    if (this.fallback.points.length === 0) return;
    if (!this.#isAlone) this.#tell('begun', this.relays.aloneFromMs);
    this.#isAlone = true;
    void this.#readFallbackPoints();
    const isFresh = ([, { atMs }]) => now - atMs <= Math.max(10_000, this.time.realMs(DEAD_AFTER_S));
    const values = new Map([...this.#seen].filter(isFresh).map(([point, { value }]) => [point, value]));
    const changes = this.fallback.look(now, values);
    for (const change of changes) {
      this.relays.drive(change.relay, change.coil);
      this.#tell(change.coil, now, change);
    }
    if (changes.length > 0) this.#sendRelays();
  }

  /** Beside the deciding and never in it: a probe that hangs must not keep a run from ending. */
  async #readFallbackPoints() {
    if (this.#isReading) return;
    this.#isReading = true;
    for (const point of this.fallback.points) {
      const value = await this.hardware.read(point);
      this.#seen.set(point, { value, atMs: performance.now() });
    }
    this.#isReading = false;
  }

  #endAlone(now) {
    if (!this.#isAlone) return;
    this.#isAlone = false;
    const { channels } = this.relays.state();
    for (const change of this.fallback.end(now))
      if (channels[change.relay] === 'off') this.#tell('off', now, change);
    this.#tell('ended', now);
  }

  #tell(what, monotonicMs, change) {
    const at = this.time.atMs(monotonicMs);
    if (at === null) this.#untold.push([what, monotonicMs, change]);
    else this.#log('info', fallbackLine(what, at / 1000, change));
  }

  #set(name, ms, then) {
    clearTimeout(this.#timers[name]);
    this.#timers[name] = setTimeout(then, Math.max(0, ms));
  }
}

/** The board's own watchdog resets it when this program stands still; a coil may else stay as a dead program left it. */
function feedWatchdog(device) {
  if (device === undefined) return () => undefined;
  const open = openSync(device, 'w');
  const timer = setInterval(() => writeSync(open, '\0'), WATCHDOG_EVERY_MS);
  return () => {
    clearInterval(timer);
    writeSync(open, 'V'); // "I end on purpose"
  };
}

async function main([file, option]) {
  const settings = readSettings(file);
  const hardware = settings.backend === 'sysfs' ? sysfs(settings) : dryRun(settings);
  await hardware.open(); // every coil off
  if (option === '--all-off') return settings.relays.forEach((_relay, at) => hardware.set(at + 1, 'off'));
  const node = new FieldNode(settings, hardware);
  const release = feedWatchdog(settings.watchdog);
  const end = (code) => {
    node.stop();
    release();
    process.exit(code);
  };
  process.once('SIGTERM', () => end(0));
  process.once('SIGINT', () => end(0));
  process.once('uncaughtException', (error) => {
    console.error(error);
    node.relays.allOff();
    process.exit(1); // whoever supervises this starts it again; the watchdog is not released
  });
  node.start();
}

main(process.argv.slice(2)).catch((error) => {
  console.error(error.message);
  process.exit(78);
});
