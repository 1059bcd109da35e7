/** Who drives: a lease in the database, renewed each 2 s of real time. A lease alone excludes nobody; nodes fence by epoch. */
import { leadDb } from '@/db/client';
import {
  LEASE_S,
  raiseEpoch,
  releaseLead,
  renewLead,
  takeLead,
  type Lead as TakenLead,
} from '@/db/queries/leader';
import type { Base } from '../base';

const EVERY_MS = 2000;
/**
 * A question in vain speaks for so long: for less than what a lease is good for after its last renewal, and for more than
 * passes until the next question is known to be in vain (two tries of 2 s, 2 s apart from the next).
 */
const AWAY_S = 10;

export interface LeadEvents {
  onLead: (taken: TakenLead) => Promise<void>;
  onLost: () => void;
  /** App time of the newest step. */
  lastStepAt: () => number | null;
}

export class Lead {
  private leading: number | null = null;
  private lastBeatMs: number | null = null;
  private lastAskedMs = 0;
  /**
   * When the database was last asked in vain. Not when that was known: a worker that was paused with a question under way
   * finds it unanswered for too long as it wakes, and that tells of the pause.
   */
  private lastFailedMs: number | null = null;
  private stopped = false;
  private looking: Promise<void> | null = null;
  private readonly db = leadDb();

  constructor(
    private readonly base: Base,
    private readonly instance: string,
    private readonly events: LeadEvents,
  ) {}

  /** Epoch of this worker's lead; null while another leads. */
  get epoch(): number | null {
    return this.leading;
  }

  /** Seconds since the lease was last renewed; null before the first time. */
  get heartbeatAgeS(): number | null {
    return this.lastBeatMs === null ? null : (this.base.clock.monotonicMs() - this.lastBeatMs) / 1000;
  }

  /**
   * Whether it may drive what keeps no numbers: its lead was renewed in time, or it has just asked and the database does
   * not answer. One that was paused knows neither when it wakes, and must look first: another may lead by now.
   */
  get mayDrive(): boolean {
    return this.isSure || (this.leading !== null && this.isWithin(this.lastFailedMs, AWAY_S));
  }

  /** Nobody else can lead by now. */
  get isSure(): boolean {
    return this.leading !== null && this.isWithin(this.lastBeatMs, LEASE_S);
  }

  private isWithin(ms: number | null, seconds: number): boolean {
    return ms !== null && this.base.clock.monotonicMs() - ms < seconds * 1000;
  }

  /** Begins to try; goes on until stopped. */
  start(): void {
    const look = () => {
      if (this.stopped) return;
      this.looking = this.look().finally(() => {
        this.looking = null;
        if (!this.stopped) this.base.clock.after(EVERY_MS, look);
      });
    };
    look();
  }

  /** For whoever is about to do a last thing as leader: one that does not know whether it leads looks first. */
  async know(): Promise<void> {
    await this.looking;
    if (this.leading !== null && !this.mayDrive) await this.look();
  }

  async look(): Promise<void> {
    try {
      // a connection that broke while nobody asked tells nothing of the database: the second try has a fresh one
      await this.ask().catch(() => this.ask());
    } catch (error) {
      // A leader that is cut off from the database drives on until another leads; the nodes tell by number.
      this.base.log.warn({ err: error, leading: this.leading !== null }, 'the lead cannot be looked at');
      this.lastFailedMs = this.lastAskedMs;
    }
  }

  private async ask(): Promise<void> {
    this.lastAskedMs = this.base.clock.monotonicMs();
    await (this.leading === null
      ? this.tryToLead(this.lastAskedMs)
      : this.renew(this.leading, this.lastAskedMs));
  }

  /**
   * A node knows a later epoch than ours: after a restored backup the database began too low.
   * @returns whether this worker leads at an epoch above `seen` now
   */
  async raiseAbove(seen: number): Promise<boolean> {
    const from = this.leading;
    if (from === null) return false;
    if (from > seen) return true;
    if (!(await raiseEpoch(this.db, this.instance, from, seen + 1))) return false;
    this.leading = seen + 1;
    this.base.log.warn({ from, to: seen + 1 }, 'a node had seen a later epoch; ours is lifted above it');
    return true;
  }

  /** Gives the lead back. */
  async stop(): Promise<void> {
    this.stopped = true;
    await this.looking;
    if (this.leading === null) return;
    const epoch = this.leading;
    this.leading = null;
    await releaseLead(this.db, this.instance, epoch).catch((error: unknown) => {
      this.base.log.warn({ err: error }, 'the lead could not be given back; it runs out by itself');
    });
  }

  private async tryToLead(begunMs: number): Promise<void> {
    const lead = await takeLead(this.db, this.instance);
    if (lead === null || this.stopped) return;
    this.leading = lead.epoch;
    this.lastBeatMs = begunMs;
    this.base.log.info({ epoch: lead.epoch }, 'this worker leads');
    await this.events.onLead(lead);
  }

  private async renew(epoch: number, begunMs: number): Promise<void> {
    const kept = await renewLead(this.db, this.instance, epoch, this.events.lastStepAt());
    if (kept) {
      this.lastBeatMs = begunMs;
      return;
    }
    // raiseAbove may have lifted the epoch while the renewal was on its way.
    if (this.leading !== epoch) return;
    this.leading = null;
    this.base.log.warn({ epoch }, 'another worker leads now');
    this.events.onLost();
  }
}
