import 'server-only';
import { and, eq } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { channel } from '@/db/schema/channel';

/** Numbers of a house's channels by id, those taken out of use too: what they did is still told. */
export async function channelNumbers(holding: Holding, houseId: string): Promise<Map<string, number>> {
  const rows = await holding.db
    .select({ id: channel.id, number: channel.number })
    .from(channel)
    .where(and(eq(channel.holdingId, holding.id), eq(channel.houseId, houseId)));
  return new Map(rows.map((row) => [row.id, row.number]));
}
