/** Makes the alarms that stand in the database those that ought to stand; what fails is tried again, since it is a level. */
import { clearAlarm, raiseAlarm, standingAlarmKeys } from '@/db/queries/alarm';
import type { Base } from '../base';
import type { WantedAlarm, WantedAlarms } from './wanted';

interface Kept {
  holdingId: string;
  houseId: string;
  wanted: Map<string, WantedAlarm>;
  /** Keys of which nothing can be said yet: they stay as they are. */
  undecided: WantedAlarms['undecided'];
  /** Keys that stand in the database; null until they were read. */
  standing: Set<string> | null;
}

const RETRY_MS = 2000;

export class AlarmKeeper {
  private readonly houses = new Map<string, Kept>();
  private readonly due = new Set<string>();
  private running: Promise<void> | null = null;
  private stopped = false;

  constructor(
    private readonly base: Base,
    /** Told when the alarms of a house have changed. */
    private readonly onChange: (houseId: string) => void,
  ) {}

  /** The whole list of alarms that ought to stand in a house. */
  want(holdingId: string, houseId: string, { alarms, undecided }: WantedAlarms): void {
    const wanted = new Map(alarms.map((alarm) => [alarm.key, alarm]));
    const kept: Kept = this.houses.get(houseId) ?? { holdingId, houseId, wanted, undecided, standing: null };
    this.houses.set(houseId, kept);
    kept.wanted = wanted;
    kept.undecided = undecided;
    if (kept.standing !== null && toRaise(kept).length === 0 && toClear(kept).length === 0) return;
    this.due.add(houseId);
    this.run();
  }

  forget(houseId: string): void {
    this.houses.delete(houseId);
  }

  async settle(): Promise<void> {
    await this.running;
  }

  stop(): void {
    this.stopped = true;
  }

  private run(): void {
    this.running ??= this.work().finally(() => {
      this.running = null;
    });
  }

  private async work(): Promise<void> {
    for (const houseId of this.due) {
      if (this.stopped) return;
      const kept = this.houses.get(houseId);
      // Taken off first: what is wanted meanwhile puts it on again.
      this.due.delete(houseId);
      try {
        if (kept !== undefined) await this.reconcile(kept);
      } catch (error) {
        this.due.add(houseId);
        this.base.log.warn({ err: error, house: houseId }, 'alarms cannot be written; tried again');
        this.base.clock.after(RETRY_MS, () => this.run());
        return;
      }
    }
  }

  private async reconcile(kept: Kept): Promise<void> {
    const holding = { id: kept.holdingId, db: this.base.db };
    kept.standing ??= new Set(await standingAlarmKeys(holding, kept.houseId));
    const raise = toRaise(kept);
    const clear = toClear(kept);
    for (const { key, kind, about, data, since } of raise) {
      await raiseAlarm(holding, { houseId: kept.houseId, key, kind, about, data, at: since });
      kept.standing.add(key);
      this.base.log.info({ house: kept.houseId, kind, about }, 'alarm raised');
    }
    for (const key of clear) {
      await clearAlarm(holding, key, this.base.clock.appNow());
      kept.standing.delete(key);
      this.base.log.info({ house: kept.houseId, alarm: key }, 'alarm cleared');
    }
    if (raise.length + clear.length > 0) this.onChange(kept.houseId);
  }
}

function toRaise({ wanted, standing }: Kept): WantedAlarm[] {
  return [...wanted.values()].filter((one) => standing?.has(one.key) !== true);
}

function toClear({ wanted, undecided, standing }: Kept): string[] {
  if (undecided === 'others') return [];
  return [...(standing ?? [])].filter((key) => !wanted.has(key) && !undecided.has(key));
}
