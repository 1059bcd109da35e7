import type { WebSocket } from 'ws';
import type { Cancel, Clock } from '../clock';
import type { Metrics } from '../metrics';

/** More than this unread, and a reader gets nothing until it has caught up: then one fresh state. */
const BUFFERED_MAX = 1024 * 1024;
const CATCH_UP_MS = 250;
const PING_MS = 10_000;
const SILENCE_MS = 25_000;

export interface ReaderDeps {
  metrics: Metrics;
  clock: Clock;
  /** The house's newest state as a frame. */
  freshState: () => string | null;
}

/** One browser's socket. */
export class Reader {
  /** Key of the node of which this reader wants to see what comes. */
  tail: string | null = null;
  private isBehind = false;
  private heardAtMs: number;
  private readonly cancels: Cancel[];

  constructor(
    private readonly socket: WebSocket,
    /** Of its upgrade: the cookie by which its session is looked at again. */
    readonly headers: Headers,
    private readonly deps: ReaderDeps,
  ) {
    this.heardAtMs = deps.clock.monotonicMs();
    const heard = () => (this.heardAtMs = deps.clock.monotonicMs());
    socket.on('pong', heard);
    socket.on('message', heard);
    this.cancels = [
      deps.clock.every(PING_MS, () => this.ping()),
      deps.clock.every(CATCH_UP_MS, () => this.catchUp()),
    ];
    socket.on('close', () => {
      for (const cancel of this.cancels) cancel();
    });
  }

  close(code: number, why: string): void {
    this.socket.close(code, why);
    this.deps.clock.after(1000, () => this.socket.terminate());
  }

  /** A reader that fell behind learns from its next state whatever it missed. */
  send(text: string): void {
    if (this.socket.readyState !== this.socket.OPEN) return;
    if (this.isBehind || this.socket.bufferedAmount > BUFFERED_MAX) {
      this.isBehind = true;
      this.deps.metrics.add('live_dropped_total');
      return;
    }
    this.socket.send(text);
  }

  private catchUp(): void {
    if (!this.isBehind || this.socket.bufferedAmount > 0) return;
    this.isBehind = false;
    const text = this.deps.freshState();
    if (text !== null) this.send(text);
  }

  private ping(): void {
    if (this.deps.clock.monotonicMs() - this.heardAtMs > SILENCE_MS) return this.socket.terminate();
    if (this.socket.readyState === this.socket.OPEN) this.socket.ping();
  }
}
