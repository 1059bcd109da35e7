/** What carries a node's frames, whatever it is made of: a web socket, or two topics of a broker. */
import type { WebSocket } from 'ws';
import { silenceMs } from '@/lib/field/frames';
import { rawText } from '../raw-text';

export interface LineEvents {
  text(text: string, isBinary: boolean): void;
  /** Something came that is no frame: the line lives. */
  heard(): void;
  /** The answer to a ping, with the ping's mark. */
  pong(mark: Buffer): void;
  closed(): void;
}

export interface Line {
  /** Silence of so long, real ms, ends it. */
  readonly silenceMs: number;
  listen(events: LineEvents): void;
  /** What cannot be sent now is not kept: it would be stale later. */
  send(text: string): void;
  ping(mark: string): void;
  close(code: number, why: string): void;
  /** Ends it without a word: whoever is behind it may be gone. */
  cut(): void;
}

export class SocketLine implements Line {
  readonly silenceMs = silenceMs;

  constructor(
    private readonly socket: WebSocket,
    private readonly failed: (error: Error) => void,
  ) {}

  listen(events: LineEvents): void {
    this.socket.on('message', (data, isBinary) => events.text(rawText(data), isBinary));
    this.socket.on('pong', (mark) => events.pong(mark));
    this.socket.on('ping', () => events.heard());
    this.socket.on('error', this.failed);
    this.socket.on('close', () => events.closed());
  }

  send(text: string): void {
    if (this.isOpen) this.socket.send(text);
  }

  ping(mark: string): void {
    if (this.isOpen) this.socket.ping(mark);
  }

  close(code: number, why: string): void {
    this.socket.close(code, why);
  }

  cut(): void {
    this.socket.terminate();
  }

  private get isOpen(): boolean {
    return this.socket.readyState === this.socket.OPEN;
  }
}
