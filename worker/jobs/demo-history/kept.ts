/** What a played history leaves behind, on its way through the worker's own queries: many rows to a commit. */
import type { Holding } from '@/db/client';
import { acknowledgeAlarm, clearAlarm, listAlarms, raiseAlarm, type AlarmRaise } from '@/db/queries/alarm';
import { storeReadings, type ReadingRow } from '@/db/queries/reading-write';
import { writeRunning, type RunningBatch } from '@/db/queries/running';
import type pg from 'pg';

type OfHouse = { holdingId: string; houseId: string };
export type AlarmDeed =
  | (OfHouse & { does: 'raise' } & Omit<AlarmRaise, 'houseId'>)
  | (OfHouse & { does: 'clear'; key: string; at: number })
  | (OfHouse & { does: 'acknowledge'; at: number; by: string; note: string });

/** A switching with its ladder is some 3 kB. */
const ROWS_A_COMMIT = 500;

export class Kept {
  readings: ReadingRow[] = [];
  running: RunningBatch = { switchings: [], decisions: [], reports: [], memories: [] };
  alarms: AlarmDeed[] = [];
  readonly counts = { readings: 0, switchings: 0, decisions: 0, reports: 0, alarms: 0 };

  constructor(
    private readonly db: Holding['db'],
    private readonly pool: pg.Pool,
  ) {}

  /** Writes everything so far, in order of its coming to be. */
  async write(): Promise<void> {
    const { readings, running, alarms } = this;
    this.readings = [];
    this.running = { switchings: [], decisions: [], reports: [], memories: [] };
    this.alarms = [];
    const stored = await storeReadings(this.pool, readings);
    this.counts.readings += stored.filter(Boolean).length;
    const { switchings, decisions, reports } = running;
    const rows = Math.max(switchings.length, decisions.length, reports.length);
    for (let first = 0; first < rows; first += ROWS_A_COMMIT) {
      const end = first + ROWS_A_COMMIT;
      await writeRunning(this.db, {
        switchings: switchings.slice(first, end),
        decisions: decisions.slice(first, end),
        reports: reports.slice(first, end),
        memories: [],
      });
    }
    this.counts.switchings += switchings.length;
    this.counts.decisions += decisions.length;
    this.counts.reports += reports.length;
    for (const deed of alarms) await this.writeAlarm(deed);
  }

  private async writeAlarm(deed: AlarmDeed): Promise<void> {
    const holding = { id: deed.holdingId, db: this.db };
    if (deed.does === 'clear') {
      await clearAlarm(holding, deed.key, deed.at);
    } else if (deed.does === 'raise') {
      const { houseId, key, kind, about, data, at } = deed;
      if (await raiseAlarm(holding, { houseId, key, kind, about, data, at })) this.counts.alarms += 1;
    } else {
      const standing = await listAlarms(holding, { state: 'active', houseId: deed.houseId, limit: 50 });
      for (const alarm of standing.filter((one) => one.acknowledgedAt === null && one.raisedAt <= deed.at))
        await acknowledgeAlarm(holding, alarm.id, deed.by, deed.at, deed.note);
    }
  }
}
