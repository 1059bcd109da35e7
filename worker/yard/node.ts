/**
 * A field node: everything that the field protocol asks of one, and nothing of what it measures or moves.
 * What it knows of the server is what comes over the wire.
 */
import { fallbackText, type FallbackEntry } from '@/lib/field/fallback-log';
import { parseServerFrame, relaysEveryS, type BootId, type CommandFrame } from '@/lib/field/frames';
import type { KeptRecord } from './backlog';
import type { AppTime, Clock } from './clock';
import { Fallback, type FallbackChange, type KeptFallback } from './fallback';
import { Line } from './line';
import { LogBox, type KeptLog } from './log-box';
import { Outbox } from './outbox';
import { RelayBoard } from './relays';
import { Sampler } from './sampler';

/** The hardware watchdog that is modelled: a node that does not run for so long is reset, coils off. */
export const watchdogMs = 10_000;
const watchdogFedEveryMs = 2_000;

/** What a node's flash holds over a restart, readings apart. */
export interface KeptNode {
  fallback: KeptFallback | null;
  logs: KeptLog[];
}

export interface NodeParts {
  key: string;
  token: string;
  server: string;
  relays: number;
  rate: number;
  /** interval of readings until a welcome says another, s of app time */
  reportS: number;
  clock: Clock;
  time: AppTime;
  /** readings of this moment, epoch ms of app time */
  sample(appMs: number): Array<Omit<KeptRecord, 't'>>;
  /** called just before coils change at this monotonic time: until then they were as they are */
  beforeCoilsChange(monotonicMs: number): void;
  log(event: string, fields: Record<string, unknown>): void;
  flash: { read(): KeptNode; write(kept: KeptNode): void };
}

type TimerName = 'lease' | 'relays' | 'sample' | 'watchdog' | 'alone';

export class FieldNode {
  private board: RelayBoard;
  private kept: KeptNode;
  private fallback: Fallback;
  private isAlone = false;
  private readonly logBox: LogBox;
  private readonly outbox: Outbox;
  private readonly sampler: Sampler;
  private readonly line: Line;
  private seq = 0;
  private isWelcome = false;
  private ranMs: number;
  private readonly timers = new Map<TimerName, () => void>();

  constructor(private readonly parts: NodeParts) {
    this.ranMs = parts.clock.monotonicMs();
    this.board = new RelayBoard(parts.relays, parts.clock.id(), parts.rate, this.ranMs);
    this.kept = parts.flash.read();
    this.fallback = this.newFallback(this.ranMs);
    this.logBox = new LogBox(
      this.kept.logs,
      (entry) => this.send({ type: 'log', ...entry }),
      (logs) => this.keep({ logs }),
    );
    this.outbox = new Outbox(
      (pack) => this.send({ type: 'readings', pack }),
      (ms, then) => parts.clock.after(ms, () => this.run(then)),
    );
    this.sampler = new Sampler(
      parts.reportS,
      parts.rate,
      parts.time,
      (t) => this.sample(t),
      (ms, then) => this.set('sample', ms, then),
    );
    this.line = new Line(parts.server, parts.token, parts.clock, {
      opened: () => this.run(() => this.opened()),
      text: (text) => this.run(() => this.received(text)),
      closed: (code, why, againInMs) => this.run(() => this.closed(code, why, againInMs)),
    });
  }

  start(): void {
    this.parts.log('boot', { boot: this.board.boot });
    this.line.dial();
    this.sampler.schedule();
    this.feedWatchdog();
    this.waitAlone();
  }

  /** Ends the node as a pulled plug does, but for the closing handshake. */
  stop(): void {
    this.parts.beforeCoilsChange(this.parts.clock.monotonicMs());
    for (const cancel of this.timers.values()) cancel();
    this.timers.clear();
    this.outbox.lineDown();
    this.line.stop();
  }

  /** What the coils really are, and how much waits to be acknowledged. */
  state(): ReturnType<RelayBoard['state']> & { boot: BootId; unacknowledged: number } {
    return { ...this.board.state(), boot: this.board.boot, unacknowledged: this.outbox.size };
  }

  /** Lets the node see what the time has brought, such as the end of a lease. */
  wake(): void {
    this.run(() => undefined);
  }

  /** Everything that the node does goes through here, so that a gap in its running is always seen first. */
  private run(work: () => void): void {
    const now = this.parts.clock.monotonicMs();
    const resetMs = this.ranMs + watchdogMs;
    const frozen = now > resetMs;
    this.ranMs = now;
    this.expireLease(frozen ? Math.min(now, resetMs) : now);
    if (frozen) this.reset(resetMs);
    else {
      this.driveAlone(now);
      work();
    }
  }

  private expireLease(untilMs: number): void {
    const endsMs = this.board.leaseEndsMs();
    if (endsMs === null || endsMs > untilMs) return;
    this.parts.beforeCoilsChange(endsMs);
    this.board.expire(endsMs);
    this.parts.log('trip', { trips: this.board.state().trips, number: this.board.state().number });
    this.sendRelays();
    this.logBox.add({ level: 'warning', text: 'the lease ended: every coil dropped' });
  }

  /** From when the last command has run out until the next one, by the node's own point and its own rest. */
  private driveAlone(now: number): void {
    if (now < this.board.aloneFromMs || !this.fallback.isSet) return;
    if (!this.isAlone) {
      this.isAlone = true;
      this.parts.log('alone', {});
      this.tell({ what: 'begun' }, this.board.aloneFromMs);
    }
    const appMs = this.parts.time.atMs(now);
    const readings = appMs === null ? [] : this.parts.sample(appMs);
    const changes = this.fallback.look(now, (point) => readings.find(({ n }) => n === point)?.v ?? null);
    if (changes.length === 0) return;
    this.parts.beforeCoilsChange(now);
    for (const change of changes) {
      this.board.drive(change.relay, change.what);
      this.tell(change, now);
    }
    this.sendRelays();
  }

  /** Looks again when the next command can be missing, and then as often as the fallback asks. */
  private waitAlone(): void {
    const now = this.parts.clock.monotonicMs();
    const atMs = now < this.board.aloneFromMs ? this.board.aloneFromMs : this.fallback.nextMs(now);
    this.set('alone', atMs - now, () => this.waitAlone());
  }

  /** A command drives: what ran by itself ends, as far as the command does not go on with it. */
  private endAlone(now: number): void {
    if (!this.isAlone) return;
    this.isAlone = false;
    this.parts.log('commanded again', {});
    const { channels } = this.board.state();
    for (const change of this.fallback.end(now))
      if (channels[String(change.relay)] === 'off') this.tell(change, now);
    this.tell({ what: 'ended' }, now);
  }

  private tell(what: FallbackChange | { what: 'begun' | 'ended' }, monotonicMs: number): void {
    if (what.what === 'on' || what.what === 'off') this.parts.log('fallback', { ...what });
    const at = this.parts.time.atMs(monotonicMs);
    // a node that was never told the time cannot say when; its relays frames still say what its coils are
    if (at === null) return;
    const entry: FallbackEntry = { ...what, at };
    this.logBox.add({ level: 'info', text: fallbackText(entry) });
  }

  private keep(part: Partial<KeptNode>): void {
    this.kept = { ...this.kept, ...part };
    this.parts.flash.write(this.kept);
  }

  private newFallback(startMs: number): Fallback {
    return new Fallback(this.kept.fallback, this.parts.rate, startMs, (fallback) => this.keep({ fallback }));
  }

  /** The watchdog has pulled the reset line: a new boot with every coil off. Kept readings are in flash. */
  private reset(atMs: number): void {
    this.parts.beforeCoilsChange(atMs);
    this.board = new RelayBoard(this.parts.relays, this.parts.clock.id(), this.parts.rate, atMs);
    this.fallback = this.newFallback(atMs);
    this.isAlone = false;
    this.seq = 0;
    this.isWelcome = false;
    this.parts.log('watchdog', { boot: this.board.boot });
    this.line.drop();
    this.sampler.schedule();
    this.feedWatchdog();
    this.waitAlone();
  }

  private feedWatchdog(): void {
    this.set('watchdog', watchdogFedEveryMs, () => this.feedWatchdog());
  }

  private opened(): void {
    const appMs = this.parts.time.nowMs();
    this.line.send({
      type: 'hello',
      node: this.parts.key,
      firmware: 'yard 1',
      channels: this.parts.relays,
      boot: this.board.boot,
      clock: appMs === null ? null : appMs / 1000,
      can: ['fallback'],
    });
  }

  private closed(code: number, why: string, againInMs: number): void {
    this.parts.log('line down', { code, why, againInMs: Math.round(againInMs) });
    this.isWelcome = false;
    this.cancel('relays');
    this.outbox.lineDown();
    this.logBox.lineDown();
  }

  private received(text: string): void {
    const parsed = parseServerFrame(text);
    if (!parsed.ok) return this.parts.log('frame not understood', { why: parsed.why });
    const { frame } = parsed;
    switch (frame.type) {
      case 'welcome':
        this.parts.time.set(frame.now * 1000);
        this.sampler.setInterval(frame.report);
        return this.welcomed(frame.report);
      case 'command':
        return this.command(frame);
      case 'ack':
        if (!('stored' in frame)) return this.logBox.acknowledged(frame.seq);
        if (frame.refused.length > 0) this.parts.log('readings refused', { refused: frame.refused });
        return this.outbox.acknowledged(frame.seq);
      case 'error':
        return this.parts.log('error from the server', { why: frame.why, seq: frame.seq ?? null });
    }
  }

  private welcomed(report: number): void {
    this.parts.log('welcome', { report });
    this.line.welcomed();
    this.isWelcome = true;
    this.board.connected();
    this.sendRelays();
    this.logBox.sendWaiting();
    if (this.sampler.isFresh) this.sampler.now();
    else this.outbox.send();
    this.sampler.schedule();
  }

  private command(frame: CommandFrame): void {
    const now = this.parts.clock.monotonicMs();
    this.parts.beforeCoilsChange(now);
    const answer = this.board.command(frame, now);
    if (!answer.taken) {
      return this.parts.log('command ignored', { number: frame.number, why: answer.why });
    }
    this.scheduleLease();
    this.fallback.take(frame.fallback ?? {});
    this.endAlone(now);
    this.waitAlone();
    if (answer.isRenewal && !answer.changed) return;
    this.parts.log('command', { number: frame.number, channels: this.board.state().channels });
    this.sendRelays();
  }

  private scheduleLease(): void {
    const endsMs = this.board.leaseEndsMs();
    if (endsMs === null) this.cancel('lease');
    else this.set('lease', endsMs - this.parts.clock.monotonicMs(), () => this.scheduleLease());
  }

  private sendRelays(): void {
    if (!this.isWelcome) return;
    const seq = this.send({ type: 'relays', ...this.board.state() });
    if (seq !== null) this.board.sent(seq, this.parts.clock.monotonicMs());
    this.set('relays', this.parts.time.realMs(relaysEveryS), () => this.sendRelays());
  }

  /** @returns the frame's seq, or null where the line is not open */
  private send(frame: { type: 'relays' | 'readings' | 'log' } & Record<string, unknown>): number | null {
    if (!this.isWelcome) return null;
    this.seq += 1;
    return this.line.send({ ...frame, seq: this.seq }) ? this.seq : null;
  }

  private sample(t: number): void {
    this.outbox.add(this.parts.sample(t * 1000).map((record) => ({ ...record, t })));
    this.outbox.send();
  }

  private set(name: TimerName, ms: number, then: () => void): void {
    this.cancel(name);
    this.timers.set(
      name,
      this.parts.clock.after(Math.max(0, ms), () => this.run(then)),
    );
  }

  private cancel(name: TimerName): void {
    this.timers.get(name)?.();
    this.timers.delete(name);
  }
}
