/** What a node does by itself from when its last command has run out until the next one, and what it tells of that. */
import { fallbackText, type FallbackEntry } from '@/lib/field/fallback-log';
import type { FallbackSetting } from '@/lib/field/frames';
import { Fallback, type FallbackChange, type KeptFallback } from './fallback';
import type { NodeParts } from './node-parts';
import type { RelayBoard } from './relays';

/** What of the node it needs, beside the relay board. */
export interface AloneNode {
  keep(fallback: KeptFallback): void;
  say(text: string): void;
  sendRelays(): void;
}

export class Alone {
  private readonly fallback: Fallback;
  private isAlone = false;

  /** @param startMs monotonic; when the board started, for what ran before that rests from here */
  constructor(
    private readonly parts: Pick<NodeParts, 'rate' | 'time' | 'sample' | 'beforeCoilsChange' | 'log'>,
    private readonly board: RelayBoard,
    kept: KeptFallback | null,
    startMs: number,
    private readonly node: AloneNode,
  ) {
    this.fallback = new Fallback(kept, parts.rate, startMs, (fallback) => node.keep(fallback));
  }

  /** Drives the relays by the node's own point and its own rest, if nobody commands them. */
  drive(now: number): void {
    if (now < this.board.aloneFromMs || !this.fallback.isSet) return;
    if (!this.isAlone) {
      this.isAlone = true;
      this.parts.log('alone', {});
      this.tell({ what: 'begun' }, this.board.aloneFromMs);
    }
    const appMs = this.parts.time.atMs(now);
    const readings = appMs === null ? [] : this.parts.sample(appMs);
    const changes = this.fallback.look(now, (point) => readings.find(({ n }) => n === point)?.v ?? null);
    if (changes.length === 0) return;
    this.parts.beforeCoilsChange(now);
    for (const change of changes) {
      this.board.drive(change.relay, change.what);
      this.tell(change, now);
    }
    this.node.sendRelays();
  }

  /** When it must be looked at again at the latest, monotonic ms. */
  nextMs(now: number): number {
    return now < this.board.aloneFromMs ? this.board.aloneFromMs : this.fallback.nextMs(now);
  }

  /** Fallbacks that came with a command. */
  take(settings: Record<string, FallbackSetting>): void {
    this.fallback.take(settings);
  }

  /** A command drives: what ran by itself ends, as far as the command does not go on with it. */
  end(now: number): void {
    if (!this.isAlone) return;
    this.isAlone = false;
    this.parts.log('commanded again', {});
    const { channels } = this.board.state();
    for (const change of this.fallback.end(now))
      if (channels[String(change.relay)] === 'off') this.tell(change, now);
    this.tell({ what: 'ended' }, now);
  }

  private tell(what: FallbackChange | { what: 'begun' | 'ended' }, monotonicMs: number): void {
    if (what.what === 'on' || what.what === 'off') this.parts.log('fallback', { ...what });
    const at = this.parts.time.atMs(monotonicMs);
    // a node that was never told the time cannot say when; its relays frames still say what its coils are
    if (at === null) return;
    const entry: FallbackEntry = { ...what, at };
    this.node.say(fallbackText(entry));
  }
}
