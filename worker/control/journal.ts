/**
 * What control did, on its way into the database: switchings with their ladders, decisions, reports, memories and states of
 * all houses, in order, many to a commit.
 */
import {
  writeRunning,
  type DecisionRow,
  type MemoryRow,
  type NodeLogRow,
  type RelayReportRow,
  type RunningBatch,
  type SwitchingRow,
} from '@/db/queries/running';
import type { Base } from '../base';
import { GroupWriter, Overflow } from '../group-writer';

export interface Entry {
  switchings?: SwitchingRow[];
  decisions?: DecisionRow[];
  reports?: RelayReportRow[];
  /** What nodes said. */
  logs?: NodeLogRow[];
  /** Columns of the house's row that change. */
  memory?: MemoryRow;
  /** Nothing happened: it is kept only since it was last kept long ago, and nothing waits for it. */
  mayWait?: true;
}

/** A switching with its ladder is some 3 kB: a hundred megabytes at most. */
const HELD_ROWS = 30_000;
const GROUP_ROWS = 500;
/** A state is only for those who open a page: the next one follows at the next report anyway. */
const STATE_WAIT_MS = 250;
/** A command waits this long for its switching to be committed; then control goes on and the row follows. */
const COMMIT_LIMIT_MS = 400;

export class Journal {
  private readonly writer: GroupWriter<Entry, null>;

  constructor(private readonly base: Base) {
    this.writer = new GroupWriter(base, {
      name: 'running',
      groupWeight: GROUP_ROWS,
      heldWeight: HELD_ROWS,
      weigh: (entry) => rowsOf(entry) + 1,
      gather: { fullWeight: GROUP_ROWS, waitMs: (entry) => (isUrgent(entry) ? 0 : STATE_WAIT_MS) },
      write: async (entries) => {
        await writeRunning(base.db, batchOf(entries));
        return entries.map(() => null);
      },
    });
  }

  get held(): number {
    return this.writer.held;
  }

  get isAway(): boolean {
    return this.writer.isAway;
  }

  /**
   * Resolves when the entry is committed, at once while the database is known to be away, and after 400 ms in any case:
   * a relay must not wait for a disk that does not answer.
   * @returns whether it is durable
   */
  async append(entry: Entry): Promise<boolean> {
    const written = this.keep(entry);
    if (this.writer.isAway) return false;
    return Promise.race([
      written,
      new Promise<boolean>((resolve) => {
        const cancel = this.base.clock.after(COMMIT_LIMIT_MS, () => resolve(false));
        void written.then(cancel);
      }),
    ]);
  }

  /** Resolves once the entry is committed, however long that takes. @returns false where it cannot be kept */
  keep(entry: Entry): Promise<boolean> {
    return this.writer.put(entry).then(
      () => true,
      (error: unknown) => {
        const what = error instanceof Overflow ? 'dropped, the journal is full' : 'refused by the database';
        this.base.log.error({ err: error, rows: rowsOf(entry) }, `what control did is ${what}`);
        return false;
      },
    );
  }

  settle(limitMs: number): Promise<void> {
    return this.writer.settle(limitMs);
  }

  stop(): void {
    this.writer.stop();
  }
}

function isUrgent(entry: Entry): boolean {
  return rowsOf(entry) > 0 || (entry.memory?.memory !== undefined && entry.mayWait !== true);
}

function rowsOf({ switchings, decisions, reports, logs }: Entry): number {
  return [switchings, decisions, reports, logs].reduce((sum, rows) => sum + (rows?.length ?? 0), 0);
}

/** Of several memories of a house only the newest columns are written. */
function batchOf(entries: Entry[]): RunningBatch {
  const memories = new Map<string, MemoryRow>();
  for (const { memory } of entries) {
    if (memory !== undefined) memories.set(memory.houseId, { ...memories.get(memory.houseId), ...memory });
  }
  return {
    switchings: entries.flatMap((entry) => entry.switchings ?? []),
    decisions: entries.flatMap((entry) => entry.decisions ?? []),
    reports: entries.flatMap((entry) => entry.reports ?? []),
    logs: entries.flatMap((entry) => entry.logs ?? []),
    memories: [...memories.values()],
  };
}
