/** What a node says in `log` frames, as it is kept. */
import { v7 } from 'uuid';
import type { HouseHead } from '@/db/queries/plan';
import { storableText, type NodeLogRow } from '@/db/queries/running';
import { readFallbackText, type FallbackEntry } from '@/lib/field/fallback-log';
import type { LogFrame } from '@/lib/field/frames';

/** A line or two; what is longer belongs into the node's own store. */
const TEXT_MAX = 1000;
/** Texts of an hour of one node that are kept: a node that raves must not fill the disk. */
const HOURLY_MAX = 120;
const HOUR_MS = 3_600_000;
/** A fallback's own time is believed between these: a node may have been away for days, and clocks differ a little. */
const BACK_MS = 7 * 24 * HOUR_MS;
const AHEAD_MS = 120_000;

export class NodeLogs {
  private keptAt: number[] = [];

  /** @returns what is kept, and what it tells of a fallback; null where more has come than is kept */
  take(
    house: HouseHead,
    nodeId: string,
    { level, text }: LogFrame,
    now: number,
  ): { row: NodeLogRow; fallback: FallbackEntry | null } | null {
    this.keptAt = this.keptAt.filter((at) => now - at < HOUR_MS);
    const told = readFallbackText(text);
    const isOfNow = told !== null && told.at >= now - BACK_MS && told.at <= now + AHEAD_MS;
    const fallback = isOfNow ? { ...told, at: Math.min(told.at, now) } : null;
    // those of a fallback come in a heap after an outage, and once each
    if (fallback === null && this.keptAt.length >= HOURLY_MAX) return null;
    if (fallback === null) this.keptAt.push(now);
    const head = { holdingId: house.holdingId, id: v7(), houseId: house.id, nodeId };
    const at = new Date(fallback?.at ?? now);
    return {
      row: {
        ...head,
        at,
        heardAt: new Date(now),
        level,
        text: storableText(text.slice(0, TEXT_MAX)),
        fallback: kept(fallback),
      },
      fallback,
    };
  }
}

function kept(fallback: FallbackEntry | null): NodeLogRow['fallback'] {
  if (fallback === null) return null;
  const { at: _at, ...told } = fallback;
  return told;
}
