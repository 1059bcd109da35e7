/** Who drives: a lease in the database, renewed each 2 s of real time. A lease alone excludes nobody; nodes fence by epoch. */
import { raiseEpoch, releaseLead, renewLead, takeLead, type Lead as TakenLead } from '@/db/queries/leader';
import type { Base } from '../base';

const EVERY_MS = 2000;

export interface LeadEvents {
  onLead: (taken: TakenLead) => Promise<void>;
  onLost: () => void;
  /** App time of the newest step. */
  lastStepAt: () => number | null;
}

export class Lead {
  private leading: number | null = null;
  private lastBeatMs: number | null = null;
  private stopped = false;
  private looking: Promise<void> | null = null;

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

  async look(): Promise<void> {
    try {
      await (this.leading === null ? this.tryToLead() : this.renew(this.leading));
    } catch (error) {
      // A leader that is cut off from the database drives on until another leads; the nodes tell by number.
      this.base.log.warn({ err: error, leading: this.leading !== null }, 'the lead cannot be looked at');
    }
  }

  /**
   * A node knows a later epoch than ours: after a restored backup the database began too low.
   * @returns whether this worker leads at an epoch above `seen` now
   */
  async raiseAbove(seen: number): Promise<boolean> {
    const from = this.leading;
    if (from === null) return false;
    if (from > seen) return true;
    if (!(await raiseEpoch(this.base.db, this.instance, from, seen + 1))) return false;
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
    await releaseLead(this.base.db, this.instance, epoch).catch((error: unknown) => {
      this.base.log.warn({ err: error }, 'the lead could not be given back; it runs out by itself');
    });
  }

  private async tryToLead(): Promise<void> {
    const lead = await takeLead(this.base.db, this.instance);
    if (lead === null || this.stopped) return;
    this.leading = lead.epoch;
    this.lastBeatMs = this.base.clock.monotonicMs();
    this.base.log.info({ epoch: lead.epoch }, 'this worker leads');
    await this.events.onLead(lead);
  }

  private async renew(epoch: number): Promise<void> {
    const kept = await renewLead(this.base.db, this.instance, epoch, this.events.lastStepAt());
    if (kept) {
      this.lastBeatMs = this.base.clock.monotonicMs();
      return;
    }
    // raiseAbove may have lifted the epoch while the renewal was on its way.
    if (this.leading !== epoch) return;
    this.leading = null;
    this.base.log.warn({ epoch }, 'another worker leads now');
    this.events.onLost();
  }
}
