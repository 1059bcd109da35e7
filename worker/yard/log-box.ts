/** What a node has to say of itself, kept until the server has said that it knows: the oldest first. */

export interface KeptLog {
  level: 'info' | 'warning';
  text: string;
}

interface Entry extends KeptLog {
  /** the frame it is under way in */
  seq: number | null;
}

/** A fallback of three relays that runs for four days fills it; then the oldest is let go. */
const entriesMost = 500;
/** One frame an entry: not so many at once that readings wait behind them. */
const underWayMost = 20;

export class LogBox {
  private entries: Entry[];

  /**
   * @param send sends a log frame; its seq, or null where the line is not open
   * @param keep told of the whole box after each change: it outlives a restart
   */
  constructor(
    kept: readonly KeptLog[],
    private readonly send: (entry: KeptLog) => number | null,
    private readonly keep: (entries: KeptLog[]) => void,
  ) {
    this.entries = kept.map((entry) => ({ ...entry, seq: null }));
  }

  add(entry: KeptLog): void {
    this.entries = [...this.entries, { ...entry, seq: null }].slice(-entriesMost);
    this.keepNow();
    this.sendWaiting();
  }

  sendWaiting(): void {
    let underWay = this.entries.filter(({ seq }) => seq !== null).length;
    for (const entry of this.entries) {
      if (entry.seq !== null) continue;
      if (underWay >= underWayMost) return;
      entry.seq = this.send({ level: entry.level, text: entry.text });
      if (entry.seq === null) return;
      underWay += 1;
    }
  }

  acknowledged(seq: number): void {
    const left = this.entries.filter((entry) => entry.seq !== seq);
    if (left.length === this.entries.length) return;
    this.entries = left;
    this.keepNow();
    this.sendWaiting();
  }

  /** Whatever was under way may or may not have arrived, and waits again. */
  lineDown(): void {
    for (const entry of this.entries) entry.seq = null;
  }

  private keepNow(): void {
    this.keep(this.entries.map(({ level, text }) => ({ level, text })));
  }
}
