/**
 * What a node's relays did by themselves while nobody commanded it: by its log, with its own times; where it logs
 * nothing, by its `relays` frames. Pure.
 */
import type { ChannelWiring } from '@/db/queries/plan';
import type { FallbackCoil, FallbackEntry } from '@/lib/field/fallback-log';
import type { Coils } from '@/lib/field/frames';
import { loadState } from './node-relays';

/** A coil that a fallback moved. */
export interface AloneChange {
  channel: ChannelWiring;
  at: number;
  coil: 'on' | 'off';
  /** What the node's log said of it; null: only its `relays` frames told. */
  told: FallbackCoil | null;
}

/** A time in which a load ran so, over when it is told. Epoch ms. */
export interface AloneRun {
  channelId: string;
  from: number;
  to: number;
}

/** Since when coils have been on by themselves, by relay number: kept over a restart of the worker. */
export type AloneSince = Record<string, number>;

const NEARLY_MS = 60_000;
/** A node that logs says at once that it is commanded again; one that does not, never. */
const SAYS_WITHIN_MS = 15_000;

export class NodeFallback {
  private readonly since: Map<number, number>;
  /** Coils that a report showed on by themselves, and of which no log has told. */
  private readonly seen = new Map<number, number>();
  private ran: AloneRun[] = [];
  /** Since when its reports show that it is commanded, while a coil is still on that was on by itself. */
  private commandedAt: number | null = null;
  /** When its coils last dropped with a lease, as near as we know. */
  private droppedAt = -Infinity;

  constructor(
    private readonly channels: () => readonly ChannelWiring[],
    kept: AloneSince = {},
  ) {
    this.since = new Map(Object.entries(kept).map(([relay, at]) => [Number(relay), at]));
  }

  /** A lease ran out. */
  dropped(at: number): void {
    this.droppedAt = at;
  }

  /** Takes what a log says; the same again changes nothing. */
  takeLog(entry: FallbackEntry): AloneChange[] {
    switch (entry.what) {
      case 'on':
        return this.begin(entry.relay, this.afterDrop(entry.at), entry);
      case 'off':
        return this.end(entry.relay, entry.at, entry);
      case 'ended':
        // a coil that the command went on with is told by no log: from here on it is ours
        for (const [relay, from] of this.since) this.close(relay, from, entry.at);
        return [];
      case 'begun':
        // it began anew, so it was down: what ran then ended unseen, after its longest run at the latest
        return [...this.since.keys()].flatMap((relay) => this.end(relay, entry.at, null));
    }
  }

  /**
   * Takes a `relays` frame. It may have waited on the way, so when it came says little of when it was sent.
   * @param isAlone nobody commanded the node when it sent this, as far as can be told
   * @param turned relays whose coil is another than before, or dropped in between: only these can have begun by themselves
   */
  takeReport(coils: Coils, isAlone: boolean, at: number, turned: ReadonlySet<number>): AloneChange[] {
    const changes = this.tellSeen(coils, at);
    this.commandedAt = isAlone ? null : (this.commandedAt ?? at);
    for (const [relay, from] of this.since) {
      if (coils[String(relay)] === 'off') changes.push(...this.end(relay, at, null));
      else if (this.commandedAt !== null && at - this.commandedAt > SAYS_WITHIN_MS)
        this.close(relay, from, this.commandedAt);
    }
    if (!isAlone) return changes;
    for (const { relay, fallback } of this.channels()) {
      const isOn = fallback !== null && coils[String(relay)] === 'on';
      if (isOn && turned.has(relay) && !this.since.has(relay)) this.seen.set(relay, at);
    }
    return changes;
  }

  /** Logs that a node kept arrive after its first report and before its next: by then they have told, or there are none. */
  private tellSeen(coils: Coils, at: number): AloneChange[] {
    return [...this.seen].flatMap(([relay, from]) => {
      this.seen.delete(relay);
      const hasTold =
        this.since.has(relay) || this.ran.some((run) => this.isOf(relay, run) && run.to >= from);
      if (hasTold) return [];
      return [
        ...this.begin(relay, from, null),
        ...(coils[String(relay)] === 'on' ? [] : this.end(relay, at, null)),
      ];
    });
  }

  /** Runs that no step has been told of yet. */
  runsOf(channelId: string): AloneRun[] {
    return this.ran.filter((run) => run.channelId === channelId);
  }

  /** A step has taken the runs up to now in. */
  told(): void {
    this.ran = [];
  }

  status(): { aloneSince: AloneSince } {
    return { aloneSince: Object.fromEntries(this.since) };
  }

  private begin(relay: number, at: number, told: FallbackCoil | null): AloneChange[] {
    const channel = this.channelOf(relay);
    const from = this.since.get(relay);
    if (channel === undefined || (from !== undefined && from <= at)) return [];
    this.since.set(relay, at);
    return [{ channel, at, coil: 'on', told }];
  }

  private end(relay: number, at: number, told: FallbackCoil | null): AloneChange[] {
    const channel = this.channelOf(relay);
    const from = this.since.get(relay);
    if (channel === undefined || from === undefined || at < from) return [];
    const ended = this.close(relay, from, at);
    return [{ channel, at: ended, coil: 'off', told }];
  }

  /** @returns when it ended: a fallback never runs longer than it may, whatever was not seen of its end */
  private close(relay: number, from: number, at: number): number {
    this.since.delete(relay);
    const channel = this.channelOf(relay);
    if (channel === undefined) return at;
    const to = channel.fallback === null ? at : Math.min(at, from + channel.fallback.onFor * 1000);
    // what runs with its coil off stands while the fallback has it on
    if (loadState(channel, 'on') === 'on' && to > from) this.ran.push({ channelId: channel.id, from, to });
    return to;
  }

  /** A node knows its lease's end to the millisecond, and we later by what frames need: it cannot have begun before the drop. */
  private afterDrop(at: number): number {
    return at <= this.droppedAt && this.droppedAt - at < NEARLY_MS ? this.droppedAt + 1 : at;
  }

  private isOf(relay: number, run: AloneRun): boolean {
    return this.channelOf(relay)?.id === run.channelId;
  }

  private channelOf(relay: number): ChannelWiring | undefined {
    return this.channels().find((one) => one.relay === relay);
  }
}

/** As a node's row kept it; an older worker kept none. */
export function keptAlone(status: Record<string, unknown>): AloneSince {
  const kept = status['aloneSince'];
  if (typeof kept !== 'object' || kept === null) return {};
  return Object.fromEntries(
    Object.entries(kept).filter((one): one is [string, number] => typeof one[1] === 'number'),
  );
}
