/** New ids for what an archive brings: what it was made of may stand in the same database, and a stranger may choose ids. */
import { createHmac } from 'node:crypto';
import type { PgColumn } from 'drizzle-orm/pg-core';
import type { ArchiveRow } from './archive-rows';

const EXACT = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/;
const WITHIN = /[0-9a-f]{8}(?:-[0-9a-f]{4}){3}-[0-9a-f]{12}/g;
/** The time, the version and the count of a UUID of version 7 stand in its first 22 digits, and lists go by them. */
const KEPT = 26;
const REMEMBERED = 20_000;
/** Texts in which an id stands among other words. */
const WITH_IDS = new Set(['alarm.key', 'finding_dismissal.mark']);

export class NewIds {
  private readonly made = new Map<string, string>();

  /** @param key of this one import, so that nobody can foretell the ids */
  constructor(private readonly key: Buffer) {}

  /** The same for the same, in the order of the old ones. */
  of(old: string): string {
    const known = this.made.get(old);
    if (known !== undefined) return known;
    const tail = createHmac('sha256', this.key)
      .update(old)
      .digest('hex')
      .slice(0, 36 - KEPT);
    const id = old.slice(0, KEPT) + tail;
    if (this.made.size >= REMEMBERED) this.made.clear();
    this.made.set(old, id);
    return id;
  }

  inRow(table: string, row: ArchiveRow, columns: readonly PgColumn[]): ArchiveRow {
    const renewed: ArchiveRow = { ...row };
    for (const { name, columnType } of columns) {
      const value = row[name];
      if (columnType === 'PgUUID' && typeof value === 'string') renewed[name] = this.of(value);
      if (columnType === 'PgJsonb') renewed[name] = this.inJson(value);
      if (WITH_IDS.has(`${table}.${name}`) && typeof value === 'string')
        renewed[name] = value.replace(WITHIN, (id) => this.of(id));
    }
    return renewed;
  }

  private inJson(value: unknown): unknown {
    if (typeof value === 'string') return EXACT.test(value) ? this.of(value) : value;
    if (Array.isArray(value)) return value.map((one) => this.inJson(one));
    if (typeof value !== 'object' || value === null) return value;
    return Object.fromEntries(Object.entries(value).map(([name, inner]) => [name, this.inJson(inner)]));
  }
}
