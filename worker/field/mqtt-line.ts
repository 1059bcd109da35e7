/** One conversation with a node by way of a broker, from its hello on: signed both ways, and bound to that hello. */
import { createHmac, timingSafeEqual } from 'node:crypto';
import { closeCode, relaysEveryS, silenceMs } from '@/lib/field/frames';
import { signedText, withMac } from '@/lib/field/signed';
import type { Line, LineEvents } from './line';

/** Key of a signature: the token's SHA-256 in hex, which is all that is kept of a token. */
export function macOf(tokenHash: string, topic: string, before: string, frame: string): string {
  return createHmac('sha256', tokenHash)
    .update(signedText(topic, before, frame))
    .digest('hex');
}

export function isMac(given: string, expected: string): boolean {
  const [one, other] = [Buffer.from(given), Buffer.from(expected)];
  return one.length === other.length && timingSafeEqual(one, other);
}

export interface Broker {
  publish(topic: string, text: string): void;
  /** Asks the broker whether it is there; `answered` runs after all that it had sent before. */
  ping(answered: () => void): void;
}

export class MqttLine implements Line {
  readonly silenceMs: number;
  private events: LineEvents | null = null;
  private isOver = false;
  private before: string;

  constructor(
    private readonly broker: Broker,
    private readonly topics: { up: string; down: string },
    readonly tokenHash: string,
    helloMac: string,
    rate: number,
    /** Of this worker's lead: a node follows no welcome of an earlier one. */
    private readonly epoch: () => number,
    private readonly ended: (line: MqttLine) => void,
  ) {
    this.before = helloMac;
    // a node reports each ten seconds of its own time, which may be slower than ours
    this.silenceMs = Math.max(silenceMs, (2.5 * relaysEveryS * 1000) / rate);
  }

  listen(events: LineEvents): void {
    this.events = events;
  }

  /** @returns whether it is this conversation's */
  take(frame: string, mac: string): boolean {
    if (this.isOver || !isMac(mac, macOf(this.tokenHash, this.topics.up, this.before, frame))) return false;
    this.events?.text(frame, false);
    return true;
  }

  /** The hello that began it has no conversation to be bound to yet. */
  begin(hello: string): void {
    this.events?.text(hello, false);
  }

  send(text: string): void {
    if (this.isOver) return;
    const isWelcome = text.startsWith('{"type":"welcome"');
    const frame = isWelcome ? `${text.slice(0, -1)},"epoch":${this.epoch()}}` : text;
    const mac = macOf(this.tokenHash, this.topics.down, this.before, frame);
    this.broker.publish(this.topics.down, withMac(frame, mac));
    if (isWelcome) this.before = mac;
  }

  ping(mark: string): void {
    if (mark === '') return; // the broker's own keep-alive stands for these
    this.broker.ping(() => this.events?.pong(Buffer.from(mark)));
  }

  close(code: number, why: string): void {
    // one that another took over from waits; it would only take over in its turn
    this.send(
      JSON.stringify({ type: 'error', why, ...(code === closeCode.takenOver ? {} : { hello: true }) }),
    );
    this.cut();
  }

  cut(): void {
    if (this.isOver) return;
    this.isOver = true;
    this.events?.closed();
    this.ended(this);
  }
}
