/** What is done by the clock: roll-ups, night summaries, months of readings made ahead. The leader alone does them. */
import cron, { type ScheduledTask } from 'node-cron';
import { makeLate } from '@/db/queries/late-readings';
import { forgetNodeLogs } from '@/db/queries/node-log';
import { makeReadingMonth, rollUp } from '@/db/queries/reading-write';
import { env } from '@/lib/server/env';
import { sendLetter } from '@/lib/server/mail';
import type { Base } from '../base';
import type { Cancel } from '../clock';
import type { Houses } from '../control/houses';
import type { Ingest } from '../field/ingest';
import { runArchives } from './archive-run';
import { runImports } from './import-run';
import { refreshNights } from './nights';
import { sendReports } from './reports';

/** At the start the last day is reckoned afresh: what came just before the end may not have been rolled up. */
const AFRESH_MS = 24 * 3_600_000;
/** Somebody sits before the page and waits for the file that was sent. */
const IMPORTS_MS = 2000;
const MONTH_MS = 31 * 86_400_000;
/** What nodes said is asked for while a fault is looked for; what their fallbacks did is kept with the switchings. */
const NODE_LOGS_MS = 90 * 86_400_000;

export interface JobDeps extends Base {
  houses: Houses;
  ingest: Ingest;
  isLeading: () => boolean;
}

export class Jobs {
  private tasks: ScheduledTask[] = [];
  private cancels: Cancel[] = [];
  private readonly running = new Set<string>();

  constructor(private readonly deps: JobDeps) {}

  start(): void {
    void this.run('roll-ups', () => this.rollUpAfresh());
    void this.run('months', () => this.makeMonths());
    void this.run('nights', () => this.keepNights());
    this.cancels = [
      this.deps.clock.every(IMPORTS_MS, () => void this.run('imports', () => this.bringIn())),
      this.deps.clock.every(IMPORTS_MS, () => void this.run('archives', () => this.readArchives())),
    ];
    const each = (expression: string, name: string, work: () => Promise<void>) =>
      cron.schedule(expression, () => void this.run(name, work), { timezone: 'UTC' });
    this.tasks = [
      each('*/1 * * * *', 'roll-ups', () => this.rollUpTouched()),
      each('*/1 * * * *', 'late readings', () => this.makeLate()),
      each('*/5 * * * *', 'nights', () => this.keepNights()),
      each('*/5 * * * *', 'reports', () => this.sendReports()),
      each('17 3 * * *', 'months', () => this.makeMonths()),
      each('27 3 * * *', 'node logs', () => this.forgetNodeLogs()),
    ];
  }

  stop(): void {
    for (const task of this.tasks) void task.stop();
    this.tasks = [];
    for (const cancel of this.cancels) cancel();
    this.cancels = [];
  }

  /** One at a time of a kind; a failure is logged, and the next turn tries again. */
  private async run(name: string, work: () => Promise<void>): Promise<void> {
    if (this.running.has(name) || !this.deps.isLeading()) return;
    this.running.add(name);
    try {
      await work();
    } catch (error) {
      this.deps.log.warn({ err: error, job: name }, 'a job failed; its next turn tries again');
    } finally {
      this.running.delete(name);
    }
  }

  private async rollUpTouched(): Promise<void> {
    const touched = this.deps.ingest.takeTouched();
    const to = this.deps.clock.appNow();
    // Points of which the same hour was touched go together: most packs are of now.
    const hours = new Map<number, number[]>();
    for (const [point, from] of touched) {
      // what is older is noted as late, hour by hour
      const hour = Math.floor(Math.max(from, to - AFRESH_MS) / 3_600_000);
      const others = hours.get(hour);
      if (others === undefined) hours.set(hour, [point]);
      else others.push(point);
    }
    for (const [hour, points] of hours) await rollUp(this.deps.pool, points, hour * 3_600_000, to);
  }

  private async bringIn(): Promise<void> {
    await runImports(this.deps);
  }

  private async readArchives(): Promise<void> {
    await runArchives(this.deps);
  }

  private async makeLate(): Promise<void> {
    await makeLate(this.deps.pool, this.deps.db);
  }

  private async rollUpAfresh(): Promise<void> {
    const now = this.deps.clock.appNow();
    for (const house of this.deps.houses.all()) {
      const points = house.record.points.map((point) => point.number);
      await rollUp(this.deps.pool, points, now - AFRESH_MS, now);
    }
  }

  private async keepNights(): Promise<void> {
    const { clock, db, houses } = this.deps;
    for (const { id, holdingId } of houses.all()) {
      await refreshNights({ id: holdingId, db }, id, clock.appNow());
    }
  }

  private async sendReports(): Promise<void> {
    const { clock, db } = this.deps;
    await sendReports({ db, now: clock.appNow(), url: env().PUBLIC_URL, send: sendLetter });
  }

  private async forgetNodeLogs(): Promise<void> {
    const gone = await forgetNodeLogs(this.deps.db, new Date(this.deps.clock.appNow() - NODE_LOGS_MS));
    if (gone > 0) this.deps.log.info({ gone }, 'old logs of nodes are forgotten');
  }

  private async makeMonths(): Promise<void> {
    const now = this.deps.clock.appNow();
    await makeReadingMonth(this.deps.pool, now);
    await makeReadingMonth(this.deps.pool, now + MONTH_MS);
  }
}
