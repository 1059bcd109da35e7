/** What a node sends of its readings, and in which order: the newest never queue behind the old. */
import { Backlog, type KeptRecord } from './backlog';

/** Real time without an answer after which a pack is sent again. */
export const ackWaitMs = 20_000;

export class Outbox {
  private readonly backlog = new Backlog();
  /** packs under way: how to call off waiting for their answer */
  private readonly waiting = new Map<number, () => void>();
  private catchUpSeq: number | null = null;

  /**
   * @param sendPack sends a pack; its seq, or null where the line is not open
   * @param after runs something once after some real time; the answer calls it off
   */
  constructor(
    private readonly sendPack: (pack: KeptRecord[]) => number | null,
    private readonly after: (ms: number, then: () => void) => () => void,
  ) {}

  get size(): number {
    return this.backlog.size;
  }

  add(records: readonly KeptRecord[]): void {
    this.backlog.add(records);
  }

  /** Sends the newest reading of each point, then goes on with the oldest. */
  send(): void {
    this.sent(this.backlog.newest());
    this.catchUp();
  }

  acknowledged(seq: number): void {
    this.backlog.acknowledged(seq);
    this.settled(seq);
  }

  /** Whatever was under way may or may not have arrived: it waits to be sent again. */
  lineDown(): void {
    for (const cancel of this.waiting.values()) cancel();
    this.waiting.clear();
    this.catchUpSeq = null;
    this.backlog.lineDown();
  }

  /** One pack of old readings at a time: the server stores in its own pace. */
  private catchUp(): void {
    if (this.catchUpSeq === null) this.catchUpSeq = this.sent(this.backlog.oldest());
  }

  private sent(pack: KeptRecord[]): number | null {
    if (pack.length === 0) return null;
    const seq = this.sendPack(pack);
    if (seq === null) return null;
    this.backlog.underWay(pack, seq);
    this.waiting.set(
      seq,
      this.after(ackWaitMs, () => {
        this.backlog.unanswered(seq);
        this.settled(seq);
      }),
    );
    return seq;
  }

  private settled(seq: number): void {
    this.waiting.get(seq)?.();
    this.waiting.delete(seq);
    if (this.catchUpSeq === seq) this.catchUpSeq = null;
    this.catchUp();
  }
}
