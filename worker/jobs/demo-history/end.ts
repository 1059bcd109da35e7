/** What a played history leaves to whoever drives on: memories, node status, and what is reckoned from its readings. */
import { everyHolding, everyPool } from '@/db/client';
import { rollUp } from '@/db/queries/reading-write';
import { writeNodeStatus, writeRunning } from '@/db/queries/running';
import { refreshNights } from '../nights';
import type { Place } from './place';

/** Roll-ups are made of no more readings at once. */
const ROLL_UP_MS = 7 * 86_400_000;

/**
 * @param from begin of the history, epoch ms
 * @param to its end: how the houses stood at their last step
 */
export async function keepEnd(places: readonly Place[], from: number, to: number): Promise<void> {
  const db = everyHolding();
  const memories = places.map(({ run }) => run.memoryRow(to));
  await writeRunning(db, { switchings: [], decisions: [], reports: [], memories });
  await writeNodeStatus(
    db,
    places.map(({ run }) => run.nodeStatus(to)),
  );
  for (const { record } of places) {
    const numbers = record.points.map((point) => point.number);
    for (let weekAt = from; weekAt <= to; weekAt += ROLL_UP_MS)
      await rollUp(everyPool(), numbers, weekAt, Math.min(weekAt + ROLL_UP_MS, to));
  }
  for (const { holding, record } of places) await refreshNights(holding, record.id, to);
}
