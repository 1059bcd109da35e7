/**
 * A node's line to its server: one WebSocket that is dialled again for as long as the node runs. Pings,
 * silence and back-off are in real time, whatever the rate: they guard the line and not the load.
 */
import WebSocket from 'ws';
import {
  closeCode,
  fieldPath,
  frameBytesMax,
  pingEveryMs,
  silenceMs,
  takenOverWaitMs,
} from '@/lib/field/frames';
import type { Clock } from './clock';
import { Timers } from './timers';

const backOffLeastMs = 1_000;
const backOffMostMs = 30_000;
const handshakeMs = 10_000;

export interface LineEvents {
  opened(): void;
  text(text: string): void;
  /** the line is down; `code` is the WebSocket close code, 1006 where there was none */
  closed(code: number, why: string, againInMs: number): void;
}

export class Line {
  private socket: WebSocket | undefined;
  private attempts = 0;
  private heardMs = 0;
  private stopped = false;
  private unplugged = false;
  private readonly timers: Timers<'dial' | 'ping' | 'silence'>;

  /** @param server `ws://` or `wss://` origin, without the path */
  constructor(
    private readonly server: string,
    private readonly token: string,
    private readonly clock: Clock,
    private readonly events: LineEvents,
  ) {
    this.timers = new Timers((ms, then) => clock.after(ms, then));
  }

  dial(): void {
    if (this.stopped || this.unplugged || this.socket !== undefined) return;
    const socket = new WebSocket(new URL(fieldPath, this.server), {
      headers: { authorization: `Bearer ${this.token}` },
      maxPayload: frameBytesMax,
      handshakeTimeout: handshakeMs,
      perMessageDeflate: false,
    });
    this.socket = socket;
    let trouble = '';
    const heard = (): void => {
      this.heardMs = this.clock.monotonicMs();
    };
    socket.on('open', () => {
      heard();
      this.keepAlive(socket);
      this.watchSilence(socket);
      this.events.opened();
    });
    socket.on('message', (data, isBinary) => {
      heard();
      // One buffer a message is what ws gives unless asked for parts.
      if (!isBinary && Buffer.isBuffer(data)) this.events.text(data.toString('utf8'));
    });
    socket.on('ping', heard);
    socket.on('pong', heard);
    socket.on('error', (error) => (trouble = error.message));
    socket.on('close', (code, reason) => this.down(socket, code, trouble || String(reason)));
  }

  /** The server has welcomed the node: the next failure is a first one again. */
  welcomed(): void {
    this.attempts = 0;
  }

  /** @returns false where there is no open line: the frame is not sent, and not kept */
  send(frame: object): boolean {
    if (this.socket?.readyState !== WebSocket.OPEN) return false;
    this.socket.send(JSON.stringify(frame));
    return true;
  }

  /** Drops the line at once; it is dialled again unless `stop` was called. */
  drop(): void {
    this.socket?.terminate();
  }

  /** The cable is out: the line goes down without a word, and is not dialled. */
  unplug(): void {
    this.unplugged = true;
    this.timers.cancel('dial');
    this.socket?.terminate();
  }

  plugIn(): void {
    if (!this.unplugged) return;
    this.unplugged = false;
    this.attempts = 0;
    // one that is still going down dials again by itself
    this.dial();
  }

  stop(): void {
    this.stopped = true;
    this.timers.cancelAll();
    this.socket?.close(1000);
  }

  private down(socket: WebSocket, code: number, why: string): void {
    if (this.socket !== socket) return;
    this.socket = undefined;
    this.timers.cancel('ping');
    this.timers.cancel('silence');
    const waitMs = code === closeCode.takenOver ? takenOverWaitMs : this.backOffMs();
    if (!this.stopped && !this.unplugged) this.timers.set('dial', waitMs, () => this.dial());
    this.events.closed(code, why, waitMs);
  }

  /** 1 to 30 s, drawn at random under a bound that doubles, so that a thousand nodes do not come at once. */
  private backOffMs(): number {
    const bound = Math.min(backOffMostMs, 2 * backOffLeastMs * 2 ** this.attempts);
    this.attempts += 1;
    return backOffLeastMs + this.clock.random() * (bound - backOffLeastMs);
  }

  private keepAlive(socket: WebSocket): void {
    this.timers.set('ping', pingEveryMs, () => {
      if (socket.readyState === WebSocket.OPEN) socket.ping();
      this.keepAlive(socket);
    });
  }

  private watchSilence(socket: WebSocket): void {
    const leftMs = this.heardMs + silenceMs - this.clock.monotonicMs();
    if (leftMs <= 0) socket.terminate();
    else this.timers.set('silence', leftMs, () => this.watchSilence(socket));
  }
}
