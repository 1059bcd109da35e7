/** When an order leaves for its node: once its switchings are stored, and never before an earlier one. */
import type { CommandLink } from './command-link';
import type { ControlledHouse, HouseDeps } from './house-deps';
import type { NodeRelays } from './node-relays';

export class NodeOrders {
  /** What is still being written before orders may leave. */
  private pending = 0;
  /** Ends when all that was asked to be written so far is written. */
  private tail: Promise<unknown> = Promise.resolve();

  constructor(
    private readonly relays: NodeRelays,
    private readonly link: () => CommandLink | null,
    private readonly house: ControlledHouse,
    private readonly deps: HouseDeps,
  ) {}

  /** Orders from now on leave after this is written. */
  waitFor(written: Promise<unknown>): void {
    this.pending += 1;
    this.tail = Promise.all([this.tail, written]).then(() => {
      this.pending -= 1;
    });
  }

  /**
   * Lets the newest order out.
   * @param committed null where nothing of its own has to be stored first
   */
  release(committed: Promise<unknown> | null): void {
    const order = this.relays.current;
    if (order === null) return;
    const madeAtMs = this.deps.clock.monotonicMs();
    const letOut = () => {
      if (this.house.isFailed) return;
      this.relays.release(order);
      this.send(madeAtMs);
    };
    if (committed === null && this.pending === 0) return letOut();
    this.pending += 1;
    // Orders leave as they were made, even if the later one had nothing to wait for.
    this.tail = Promise.all([this.tail, committed]).then(() => {
      this.pending -= 1;
      letOut();
    });
  }

  /** Lets the newest order out once all that has been asked to be written is written. */
  releaseWhenWritten(): void {
    this.release(this.tail);
  }

  /** Answers a `relays` frame. An order whose switchings are being written is sent as soon as they are: it is the answer then. */
  answer(): void {
    if (this.pending === 0) this.send(this.deps.clock.monotonicMs());
  }

  private send(madeAtMs: number): void {
    const link = this.link();
    if (link === null || link.seen === null) return;
    const frame = this.relays.command(link.boot, link.seen.seq, link.seen.at, link.canFallback);
    if (frame !== null) link.sendCommand(frame, madeAtMs);
  }
}
