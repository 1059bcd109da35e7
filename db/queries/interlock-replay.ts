/** What a drafted interlock would have prevented in the last nights, by what the loads really did. */
import { and, eq, inArray } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { channel } from '@/db/schema/channel';
import { node } from '@/db/schema/node';
import {
  byNight,
  prevented,
  type DraftedInterlock,
  type PreventedNight,
  type Stretch,
} from '@/lib/analysis/interlock-replay';
import { nightsBetween } from '@/lib/analysis/night';
import { runsOf } from '@/lib/analysis/runs';
import { channelSpans } from '@/lib/analysis/spans';
import type { House } from '@/lib/schema/yard-view';
import { recordsOf } from './channel-records';
import { houseNames, inUse } from './reference';

const NIGHTS = 7;
const DAY_MS = 86_400_000;

export interface Replay {
  nights: PreventedNight[];
  count: number;
  seconds: number;
  /** The longest of them, epoch ms; null where nothing would have been prevented. */
  longest: Stretch | null;
}

/** @throws Refusal at `channel` or `other` for a name that this house does not have */
export async function replayInterlock(
  holding: Holding,
  house: House,
  drafted: DraftedInterlock & { channel: string; other: string },
  now: number,
): Promise<Replay> {
  const { channels } = await houseNames(holding, house.id);
  const ids = [channels.find(drafted.channel, 'channel').id, channels.find(drafted.other, 'other').id];
  const nights = nightsBetween(now - (NIGHTS - 1) * DAY_MS, now, house.zone);
  const from = nights[0]?.from ?? now;
  const rows = await holding.db
    .select({ id: channel.id, key: channel.key, contact: channel.contact, nodeKey: node.key })
    .from(channel)
    .innerJoin(node, and(eq(node.holdingId, channel.holdingId), eq(node.id, channel.nodeId)))
    .where(and(inUse(holding, house.id, channel), inArray(channel.id, ids)));
  const recorded = rows.map(({ id, key, nodeKey, contact }) => ({
    ...{ id, key, nodeKey },
    safe: contact === 'NC' ? ('on' as const) : ('off' as const),
  }));
  const records = await recordsOf(holding, house.id, recorded, from, now);
  const runs = (id: string | undefined): Stretch[] => {
    const record = records.get(id ?? '');
    return record === undefined ? [] : runsOf(channelSpans(record, from, now));
  };
  const stretches = prevented(drafted, runs(ids[0]), runs(ids[1]));
  return {
    nights: byNight(
      stretches,
      nights.map((night) => ({ ...night, to: Math.min(night.to, now) })),
    ),
    count: stretches.length,
    seconds: Math.round(stretches.reduce((sum, one) => sum + (one.to - one.from), 0) / 1000),
    longest: stretches.toSorted((a, b) => b.to - b.from - (a.to - a.from))[0] ?? null,
  };
}
