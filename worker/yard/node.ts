/**
 * A field node: everything that the field protocol asks of one, and nothing of what it measures or moves.
 * Its parts are put together here, behind the watchdog that all it does has to pass.
 */
import { relaysEveryS, type BootId, type CommandFrame } from '@/lib/field/frames';
import { Alone } from './alone';
import { Conversation } from './conversation';
import { LogBox } from './log-box';
import type { KeptNode, NodeParts } from './node-parts';
import { Outbox } from './outbox';
import { RelayBoard } from './relays';
import { Sampler } from './sampler';
import { Timers } from './timers';

/** The hardware watchdog that is modelled: a node that does not run for so long is reset, coils off. */
export const watchdogMs = 10_000;
const watchdogFedEveryMs = 2_000;

type TimerName = 'lease' | 'relays' | 'sample' | 'watchdog' | 'alone';

export class FieldNode {
  private board: RelayBoard;
  private kept: KeptNode;
  private alone: Alone;
  private readonly logBox: LogBox;
  private readonly outbox: Outbox;
  private readonly sampler: Sampler;
  private readonly conversation: Conversation;
  private ranMs: number;
  private isPowered = true;
  private readonly timers: Timers<TimerName>;

  constructor(private readonly parts: NodeParts) {
    this.ranMs = parts.clock.monotonicMs();
    this.board = new RelayBoard(parts.relays, parts.clock.id(), parts.rate, this.ranMs);
    this.timers = new Timers((ms, then) => parts.clock.after(ms, then));
    this.kept = parts.flash.read();
    this.alone = this.newAlone(this.ranMs);
    this.logBox = new LogBox(
      this.kept.logs,
      (entry) => this.conversation.send({ type: 'log', ...entry }),
      (logs) => this.keep({ logs }),
    );
    this.outbox = new Outbox(
      (pack) => this.conversation.send({ type: 'readings', pack }),
      (ms, then) => parts.clock.after(ms, () => this.run(then)),
    );
    this.sampler = new Sampler(
      parts.reportS,
      parts.rate,
      parts.time,
      (t) => this.sample(t),
      (ms, then) => this.set('sample', ms, then),
    );
    this.conversation = new Conversation(parts, (work) => this.run(work), {
      boot: () => this.board.boot,
      welcomed: (report) => this.welcomed(report),
      commanded: (frame) => this.command(frame),
      logKept: (seq) => this.logBox.acknowledged(seq),
      readingsKept: (seq) => this.outbox.acknowledged(seq),
      lineDown: () => this.lineDown(),
    });
  }

  start(): void {
    this.parts.log('boot', { boot: this.board.boot });
    this.conversation.start();
    this.sampler.schedule();
    this.feedWatchdog();
    this.waitAlone();
  }

  /** Ends the node as a pulled plug does, but for the closing handshake. */
  stop(): void {
    this.parts.beforeCoilsChange(this.parts.clock.monotonicMs());
    this.timers.cancelAll();
    this.outbox.lineDown();
    this.conversation.stop();
  }

  /** Whether the node has power, and its line is plugged in. What is so already changes nothing. */
  supply({ power, line }: { power: boolean; line: boolean }): void {
    if (power !== this.isPowered) {
      if (power) this.powerOn();
      else this.powerOff();
    }
    if (power && line) this.conversation.plugIn();
    else this.conversation.unplug();
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
    if (!this.isPowered) return;
    const now = this.parts.clock.monotonicMs();
    const resetMs = this.ranMs + watchdogMs;
    const frozen = now > resetMs;
    this.ranMs = now;
    this.expireLease(frozen ? Math.min(now, resetMs) : now);
    if (frozen) this.reset(resetMs);
    else {
      this.alone.drive(now);
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

  /** Looks again when the next command can be missing, and then as often as the fallback asks. */
  private waitAlone(): void {
    const now = this.parts.clock.monotonicMs();
    this.set('alone', this.alone.nextMs(now) - now, () => this.waitAlone());
  }

  private keep(part: Partial<KeptNode>): void {
    this.kept = { ...this.kept, ...part };
    this.parts.flash.write(this.kept);
  }

  private newAlone(startMs: number): Alone {
    return new Alone(this.parts, this.board, this.kept.fallback, startMs, {
      keep: (fallback) => this.keep({ fallback }),
      say: (text) => this.logBox.add({ level: 'info', text }),
      sendRelays: () => this.sendRelays(),
    });
  }

  /** The watchdog has pulled the reset line: a new boot with every coil off. Kept readings are in flash. */
  private reset(atMs: number): void {
    this.parts.beforeCoilsChange(atMs);
    this.board = new RelayBoard(this.parts.relays, this.parts.clock.id(), this.parts.rate, atMs);
    this.alone = this.newAlone(atMs);
    this.parts.log('watchdog', { boot: this.board.boot });
    this.conversation.restart();
    this.sampler.schedule();
    this.feedWatchdog();
    this.waitAlone();
  }

  private powerOff(): void {
    const now = this.parts.clock.monotonicMs();
    this.expireLease(now);
    this.parts.beforeCoilsChange(now);
    this.board = new RelayBoard(this.parts.relays, this.board.boot, this.parts.rate, now);
    this.timers.cancelAll();
    this.isPowered = false;
    this.parts.log('power off', {});
  }

  private powerOn(): void {
    this.isPowered = true;
    this.ranMs = this.parts.clock.monotonicMs();
    this.reset(this.ranMs);
  }

  private feedWatchdog(): void {
    this.set('watchdog', watchdogFedEveryMs, () => this.feedWatchdog());
  }

  private lineDown(): void {
    this.timers.cancel('relays');
    this.outbox.lineDown();
    this.logBox.lineDown();
  }

  private welcomed(report: number): void {
    this.sampler.setInterval(report);
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
    this.alone.take(frame.fallback ?? {});
    this.alone.end(now);
    this.waitAlone();
    if (answer.isRenewal && !answer.changed) return;
    this.parts.log('command', { number: frame.number, channels: this.board.state().channels });
    this.sendRelays();
  }

  private scheduleLease(): void {
    const endsMs = this.board.leaseEndsMs();
    if (endsMs === null) this.timers.cancel('lease');
    else this.set('lease', endsMs - this.parts.clock.monotonicMs(), () => this.scheduleLease());
  }

  private sendRelays(): void {
    if (!this.conversation.isWelcome) return;
    const seq = this.conversation.send({ type: 'relays', ...this.board.state() });
    if (seq !== null) this.board.sent(seq, this.parts.clock.monotonicMs());
    this.set('relays', this.parts.time.realMs(relaysEveryS), () => this.sendRelays());
  }

  private sample(t: number): void {
    this.outbox.add(this.parts.sample(t * 1000).map((record) => ({ ...record, t })));
    this.outbox.send();
  }

  private set(name: TimerName, ms: number, then: () => void): void {
    this.timers.set(name, ms, () => this.run(then));
  }
}
