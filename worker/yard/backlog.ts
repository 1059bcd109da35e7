/**
 * Readings that the server has not acknowledged. Each keeps the stamp that it was taken with, so sending
 * it twice is harmless; it leaves only when a pack that held it is acknowledged, or after a day and more.
 */
import { packRecordsMax } from '@/lib/field/frames';

/** One SenML record, with an absolute time in Unix seconds. */
export interface KeptRecord {
  n: string;
  u: string;
  v: number;
  t: number;
}

interface Entry {
  record: KeptRecord;
  /** the pack it is under way in */
  seq: number | null;
}

/** The protocol asks for 24 h at least. */
export const keptForS = 26 * 3600;

export class Backlog {
  /** in order of time, as taken */
  private entries: Entry[] = [];

  get size(): number {
    return this.entries.length;
  }

  add(records: readonly KeptRecord[]): void {
    this.entries.push(...records.map((record) => ({ record, seq: null })));
    const latest = records.at(-1)?.t ?? 0;
    const oldest = this.entries[0]?.record.t ?? latest;
    if (oldest < latest - keptForS) {
      this.entries = this.entries.filter(({ record }) => record.t >= latest - keptForS);
    }
  }

  /** The newest reading of each point, where that is not under way: at most a pack. */
  newest(): KeptRecord[] {
    const byPoint = new Map<string, Entry>();
    for (const entry of this.entries) byPoint.set(entry.record.n, entry);
    return [...byPoint.values()]
      .filter(({ seq }) => seq === null)
      .slice(0, packRecordsMax)
      .map(({ record }) => record);
  }

  /** The oldest that are not under way: at most a pack. */
  oldest(): KeptRecord[] {
    const found: KeptRecord[] = [];
    for (const { record, seq } of this.entries) {
      if (found.length === packRecordsMax) break;
      if (seq === null) found.push(record);
    }
    return found;
  }

  underWay(records: readonly KeptRecord[], seq: number): void {
    const sent = new Set(records);
    for (const entry of this.entries) if (sent.has(entry.record)) entry.seq = seq;
  }

  acknowledged(seq: number): void {
    this.entries = this.entries.filter((entry) => entry.seq !== seq);
  }

  /** No answer came: the records of this pack wait again. */
  unanswered(seq: number): void {
    for (const entry of this.entries) if (entry.seq === seq) entry.seq = null;
  }

  /** The line is down: whatever was under way may or may not have arrived, and waits again. */
  lineDown(): void {
    for (const entry of this.entries) entry.seq = null;
  }
}
