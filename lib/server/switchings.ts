import 'server-only';
import type { z } from 'zod';
import type { Holding } from '@/db/client';
import { listChannels } from '@/db/queries/channel';
import { cut } from '@/db/queries/page';
import { listSwitchings } from '@/db/queries/running';
import { channelNumbers } from '@/db/queries/channel-numbers';
import { Refusal } from '@/db/queries/refusal';
import type { SwitchingList, SwitchingsQuery } from '@/lib/schema/running';
import type { House } from '@/lib/schema/yard-view';
import { isoIn, wireLadder } from './wire';

/** @throws Refusal at `channel` when the house has no such one */
export async function switchingsAnswer(
  holding: Holding,
  house: House,
  query: z.output<typeof SwitchingsQuery>,
): Promise<z.infer<typeof SwitchingList>> {
  const { cursor, channel: ref } = query;
  const numbers = await channelNumbers(holding, house.id);
  const channels = ref === undefined ? [] : await listChannels(holding, house.id);
  const only = channels.filter((one) => [one.id, one.key, String(one.number)].includes(ref ?? ''));
  if (ref !== undefined && only.length === 0) {
    throw new Refusal('channel', `This house has no channel ${JSON.stringify(ref)}.`);
  }
  const rows = await listSwitchings(holding, house.id, {
    ...(ref === undefined ? {} : { channelIds: only.map((one) => one.id) }),
    ...(query.from === undefined ? {} : { from: Date.parse(query.from) }),
    ...(query.to === undefined ? {} : { to: Date.parse(query.to) }),
    ...(cursor?.at === undefined ? {} : { before: { at: cursor.at, id: cursor.id } }),
    limit: query.limit + 1,
  });
  const listed = cut(rows, query.limit, (row) => ({ id: row.id, at: row.at }));
  return {
    items: listed.items.map(({ id, at, channelId, from, to, claim, number, version, explanation }) => ({
      ...{ id, from, to, claim, number, version },
      at: isoIn(house.zone, at),
      channel: numbers.get(channelId) ?? 0,
      ladder: wireLadder(house.zone, explanation.ladder),
    })),
    next: listed.next,
  };
}
