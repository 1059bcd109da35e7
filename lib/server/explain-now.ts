import 'server-only';
import type { Holding } from '@/db/client';
import { loadHouse } from '@/db/queries/plan';
import { correct, latestReadings } from '@/db/queries/reading';
import type { KeptMemory } from '@/db/queries/running';
import { compile } from '@/lib/control/compile';
import { explain } from '@/lib/control/explain';
import { migrateMemory } from '@/lib/control/memory-versions';
import type { Explanation } from '@/lib/control/events';
import type { Observed } from '@/lib/control/types';

/**
 * Asks the core about a channel from what the worker keeps in the database: its memory of the last event, and the newest
 * readings. The memory lies some seconds back, so this is asked for the ladder only; what is decided the worker says.
 * @returns null for a channel that the plan does not have, or before the first step
 */
export async function explainNow(
  holding: Holding,
  houseId: string,
  channelId: string,
  kept: KeptMemory,
  now: number,
): Promise<Explanation | null> {
  const record = await loadHouse(holding, houseId);
  if (record === null || kept.memory === null) return null;
  const calibrations = new Map(record.points.map((point) => [point.id, point.calibrations]));
  const readings = await latestReadings(holding, houseId);
  const at = kept.stateAt ?? now;
  const points: Observed['points'] = Object.fromEntries(
    readings
      .filter((one) => one.at <= at)
      .map((one) => [
        one.pointId,
        { at: one.at, value: correct(calibrations.get(one.pointId) ?? [], one.at, one.value) },
      ]),
  );
  const relays: Observed['relays'] = {};
  for (const channel of record.channels) {
    const told = kept.state?.channels.find((one) => one.number === channel.number);
    if (told === undefined || told.reported === null) continue;
    const acknowledges = told.reported === told.state;
    relays[channel.id] = { reported: told.reported, reportedAt: at, acknowledges, leaseEndsAt: null };
  }
  const observed = { workerStartedAt: 0, points, relays, commands: [] };
  return explain(compile(record.config), migrateMemory(kept.memory), observed, at, channelId);
}
