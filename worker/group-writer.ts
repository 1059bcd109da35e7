/**
 * Writes to the database in groups: while one group is being committed the next gathers, so latency stays one commit and
 * the rate is the database's. While the database is away everything is held, in order, up to a limit.
 */
import type { Base } from './base';

export class Overflow extends Error {
  override readonly name = 'Overflow';
}

export interface GroupOptions<Item, Result> {
  name: string;
  /** Items written in one transaction at most, by weight. */
  groupWeight: number;
  /** Beyond this weight what comes is refused with Overflow. */
  heldWeight: number;
  weigh: (item: Item) => number;
  write: (items: Item[]) => Promise<Result[]>;
  /**
   * What need not be durable at once waits until so long (ms) after the write before it, so that many houses share a
   * commit; what is more urgent takes all that waits along with it, and so does a weight that fills a commit well by itself.
   */
  gather: { fullWeight: number; waitMs: (item: Item) => number };
}

interface Waiting<Item, Result> {
  item: Item;
  done: (result: Result) => void;
  failed: (error: unknown) => void;
}

const RETRY_MS = 1000;

export class GroupWriter<Item, Result> {
  private waiting: Waiting<Item, Result>[] = [];
  private weight = 0;
  private running = false;
  private stopped = false;
  private awaySince: number | null = null;
  private wroteAtMs = -Infinity;
  private gathering: { ms: number; end: () => void } | null = null;

  constructor(
    private readonly base: Pick<Base, 'clock' | 'log' | 'metrics'>,
    private readonly options: GroupOptions<Item, Result>,
  ) {}

  /** Weight of what is not yet durable. */
  get held(): number {
    return this.weight;
  }

  /** Whether the last try found no database. */
  get isAway(): boolean {
    return this.awaySince !== null;
  }

  /** Resolves once the item is committed; rejects with Overflow, or where the database refuses this very item. */
  put(item: Item): Promise<Result> {
    const weight = this.options.weigh(item);
    if (this.weight + weight > this.options.heldWeight) {
      return Promise.reject(new Overflow(`${this.options.name} holds all that it can`));
    }
    this.weight += weight;
    const result = new Promise<Result>((done, failed) => {
      this.waiting.push({ item, done, failed });
    });
    const { gathering } = this;
    if (gathering !== null && (this.isFull() || this.options.gather.waitMs(item) < gathering.ms))
      gathering.end();
    void this.run();
    return result;
  }

  /** Resolves when nothing waits any more, or after `limitMs` of real time. */
  async settle(limitMs: number): Promise<void> {
    const end = this.base.clock.monotonicMs() + limitMs;
    while (this.weight > 0 && this.base.clock.monotonicMs() < end) await this.pause(20);
  }

  stop(): void {
    this.stopped = true;
  }

  private async run(): Promise<void> {
    if (this.running) return;
    this.running = true;
    // What comes in the same turn of the event loop goes in one group.
    await Promise.resolve();
    while (this.waiting.length > 0 && !this.stopped) {
      await this.gather();
      this.wroteAtMs = this.base.clock.monotonicMs();
      const group = this.nextGroup();
      await this.writeGroup(group);
    }
    this.running = false;
  }

  private isFull(): boolean {
    return this.weight >= this.options.gather.fullWeight;
  }

  private async gather(): Promise<void> {
    const { clock } = this.base;
    while (!this.isFull()) {
      const ms = Math.min(...this.waiting.map(({ item }) => this.options.gather.waitMs(item)));
      const leftMs = this.wroteAtMs + ms - clock.monotonicMs();
      if (leftMs <= 0) return;
      await new Promise<void>((resolve) => {
        const cancel = clock.after(leftMs, resolve);
        const end = () => {
          cancel();
          resolve();
        };
        this.gathering = { ms, end };
      });
      this.gathering = null;
    }
  }

  private nextGroup(): Waiting<Item, Result>[] {
    let weight = 0;
    let count = 0;
    for (const { item } of this.waiting) {
      weight += this.options.weigh(item);
      if (count > 0 && weight > this.options.groupWeight) break;
      count += 1;
    }
    return this.waiting.splice(0, count);
  }

  private async writeGroup(group: Waiting<Item, Result>[]): Promise<void> {
    while (!this.stopped) {
      try {
        const results = await this.options.write(group.map((one) => one.item));
        this.back();
        group.forEach((one, index) => {
          this.weight -= this.options.weigh(one.item);
          one.done(results[index] as Result); // write answers one result an item
        });
        return;
      } catch (error) {
        this.base.metrics.add('writes_failed_total');
        if (isOfTheData(error)) return this.writeSingly(group, error);
        this.gone(error);
        await this.pause(RETRY_MS);
      }
    }
  }

  /** One bad item must not keep its neighbours from being stored. */
  private async writeSingly(group: Waiting<Item, Result>[], error: unknown): Promise<void> {
    const [only] = group;
    if (group.length > 1) {
      for (const one of group) await this.writeGroup([one]);
    } else if (only !== undefined) {
      this.weight -= this.options.weigh(only.item);
      this.base.log.error({ err: error, writer: this.options.name }, 'the database refuses this item');
      only.failed(error);
    }
  }

  private gone(error: unknown): void {
    if (this.awaySince !== null) return;
    this.awaySince = this.base.clock.monotonicMs();
    this.base.log.error({ err: error, writer: this.options.name }, 'the database is away; held in memory');
  }

  private back(): void {
    if (this.awaySince === null) return;
    const awayS = Math.round((this.base.clock.monotonicMs() - this.awaySince) / 1000);
    this.awaySince = null;
    this.base.log.info({ writer: this.options.name, awayS, held: this.weight }, 'the database is back');
  }

  private pause(ms: number): Promise<void> {
    return new Promise((resolve) => {
      this.base.clock.after(ms, resolve);
    });
  }
}

/** SQLSTATE classes that the same data would meet again: data exceptions, constraints, names and rights. */
const OF_THE_DATA = ['22', '23', '42'];

export function isOfTheData(error: unknown): boolean {
  for (let cause = error; cause instanceof Error; cause = cause.cause) {
    if ('code' in cause && typeof cause.code === 'string' && cause.code.length === 5) {
      return OF_THE_DATA.includes(cause.code.slice(0, 2));
    }
  }
  return false;
}
