/** From packs to the table of readings: many packs a commit, an answer for each. */
import { noteLate } from '@/db/queries/late-readings';
import { storeReadings, type ReadingRow } from '@/db/queries/reading-write';
import type { Base } from '../base';
import { GroupWriter } from '../group-writer';

/** Some forty bytes each; a thousand houses' readings of ten minutes. Beyond it nodes keep theirs, unacknowledged. */
const HELD_ROWS = 500_000;
const GROUP_ROWS = 20_000;
/** Older readings find their roll-ups and nights made: within it the roll-ups of a start afresh reach them. */
export const LATE_MS = 20 * 3_600_000;
/** Packs of a backlog are a hundred each: some of them under way at once are not held up. */
const FULL_ROWS = 400;
/** A node's next report is seconds away, and five commits a second are little work for the disk. */
const WAIT_MS = 200;
/** A pack as long as this is one of many: the next one leaves once it is acknowledged. */
const BACKLOG_ROWS = 50;
const BACKLOG_WAIT_MS = 50;

export interface Stored {
  stored: number;
  duplicate: number;
}

export class Ingest {
  private readonly writer: GroupWriter<ReadingRow[], boolean[]>;
  /** Earliest new reading of each point since the roll-ups last looked. */
  private touched = new Map<number, number>();

  constructor(private readonly base: Base) {
    this.writer = new GroupWriter(base, {
      name: 'readings',
      groupWeight: GROUP_ROWS,
      heldWeight: HELD_ROWS,
      gather: {
        fullWeight: FULL_ROWS,
        waitMs: ({ length }) => (length < BACKLOG_ROWS ? WAIT_MS : BACKLOG_WAIT_MS),
      },
      // An empty pack weighs too: it waits for its turn, so acknowledgements keep their order.
      weigh: (rows) => Math.max(rows.length, 1),
      write: async (packs) => {
        const rows = packs.flat();
        const late = base.clock.appNow() - LATE_MS;
        // before, or a worker killed in between would forget them; after, or the job may have looked too early
        await noteLate(base.pool, rows, late);
        const flags = await storeReadings(base.pool, rows);
        await noteLate(base.pool, rows, late);
        base.metrics.add('readings_commits_total');
        let first = 0;
        return packs.map((rows) => flags.slice(first, (first += rows.length)));
      },
    });
  }

  get held(): number {
    return this.writer.held;
  }

  get isAway(): boolean {
    return this.writer.isAway;
  }

  /** Resolves once the rows are committed. */
  async store(rows: ReadingRow[]): Promise<Stored> {
    const flags = await this.writer.put(rows);
    rows.forEach((row, index) => {
      if (flags[index] === true) this.touch(row);
    });
    const stored = flags.filter(Boolean).length;
    this.base.metrics.add('readings_stored_total', stored);
    this.base.metrics.add('readings_duplicate_total', rows.length - stored);
    return { stored, duplicate: rows.length - stored };
  }

  /** What the roll-ups must be reckoned afresh for; empties the list. */
  takeTouched(): Map<number, number> {
    const touched = this.touched;
    this.touched = new Map();
    return touched;
  }

  settle(limitMs: number): Promise<void> {
    return this.writer.settle(limitMs);
  }

  stop(): void {
    this.writer.stop();
  }

  private touch(row: ReadingRow): void {
    const before = this.touched.get(row.point);
    if (before === undefined || row.at < before) this.touched.set(row.point, row.at);
  }
}
