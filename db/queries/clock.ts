import { eq } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { clockAnchor } from '@/db/schema/running';

/** App time = `appAt` + (real − `realAt`) × `rate`, all in epoch milliseconds. */
export interface ClockAnchor {
  realAt: number;
  appAt: number;
  rate: number;
}

/** The rate that was asked for is not the one that this database has always run at. */
export class ClockRateError extends Error {
  override readonly name = 'ClockRateError';
}

const ONLY = 1;

export async function readClockAnchor(db: Db): Promise<ClockAnchor | null> {
  const [row] = await db.select().from(clockAnchor).where(eq(clockAnchor.id, ONLY));
  if (row === undefined) return null;
  return { realAt: row.anchorReal.getTime(), appAt: row.anchorApp.getTime(), rate: row.rate };
}

/**
 * The anchor that is kept; made once, at the first start. Two rates in one database would give two meanings to its stamps.
 * @param appAt app time at the anchor, where it is to begin elsewhere than at real time
 * @throws ClockRateError where another rate is kept
 */
export async function keepClockAnchor(
  db: Db,
  rate: number,
  realAt: number,
  appAt: number = realAt,
): Promise<ClockAnchor> {
  const made = { id: ONLY, anchorReal: new Date(realAt), anchorApp: new Date(appAt), rate };
  await db.insert(clockAnchor).values(made).onConflictDoNothing();
  const kept = await readClockAnchor(db);
  if (kept === null) throw new Error('the clock anchor was written and is not there');
  if (kept.rate === rate) return kept;
  throw new ClockRateError(
    `CLOCK_RATE is ${rate}, but this database runs at ${kept.rate}: set it so, or give the other rate a DATA_DIR of its own.`,
  );
}

/** App time at a real time, both in whole epoch ms. */
export function appTime(anchor: ClockAnchor, realAt: number): number {
  return Math.round(anchor.appAt + (realAt - anchor.realAt) * anchor.rate);
}
