/** What is known of what channels did: the making of strips, of Watch as of Duty. */
import { and, asc, desc, eq, gte, inArray, isNull, lt, or } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { switching } from '@/db/schema/running';
import { alarm } from '@/db/schema/watch';
import type { ChannelRecord } from '@/lib/analysis/spans';
import { CLAIMS, type Claim } from '@/lib/control/types';
import { listDecisions } from './decision';
import { listRelayReports } from './running';

interface RecordedChannel {
  id: string;
  key: string;
  nodeKey: string;
  /** What its load falls to without a coil. */
  safe: 'on' | 'off';
}

function isClaim(value: string): value is Claim {
  return (CLAIMS as readonly string[]).includes(value);
}

/** Decisions, relays' reports, what nodes did by themselves, when they were lost and loads stood, by the channel's id; `from` to before `to`, epoch ms. */
export async function recordsOf(
  holding: Holding,
  houseId: string,
  channels: readonly RecordedChannel[],
  from: number,
  to: number,
): Promise<Map<string, ChannelRecord>> {
  const ids = channels.map((one) => one.id);
  const decisions = await listDecisions(holding, ids, from, to);
  const reports = await listRelayReports(holding, ids, from, to);
  const trips = await tripsOf(holding, ids, from, to);
  const away = await alarmTimes(holding, houseId, from, to);
  const mine = <T extends { channelId: string }>(rows: readonly T[], id: string) =>
    rows.filter((row) => row.channelId === id);
  return new Map(
    channels.map((one) => [
      one.id,
      {
        decisions: mine(decisions, one.id).flatMap((row) =>
          isClaim(row.claim) ? [{ at: row.at, state: row.state, claim: row.claim }] : [],
        ),
        reports: mine(reports, one.id),
        trips: mine(trips, one.id),
        silences: away.filter(({ kind, about }) => kind === 'node-lost' && about.node === one.nodeKey),
        stood: away.filter(({ kind, about }) => kind === 'fan-standing' && about.channel === one.key),
        safe: one.safe,
      },
    ]),
  );
}

/** Lease trips from `from` to before `to`, ascending, led by each channel's last one before. */
async function tripsOf(holding: Holding, ids: string[], from: number, to: number) {
  if (ids.length === 0) return [];
  const mine = and(
    eq(switching.holdingId, holding.id),
    inArray(switching.channelId, ids),
    isNull(switching.number),
  );
  const before = await holding.db
    .selectDistinctOn([switching.channelId], {
      channelId: switching.channelId,
      at: switching.at,
      state: switching.to,
    })
    .from(switching)
    .where(and(mine, lt(switching.at, new Date(from))))
    .orderBy(switching.channelId, desc(switching.at));
  const during = await holding.db
    .select({ channelId: switching.channelId, at: switching.at, state: switching.to })
    .from(switching)
    .where(and(mine, gte(switching.at, new Date(from)), lt(switching.at, new Date(to))))
    .orderBy(asc(switching.at));
  return [...before, ...during].map((row) => ({ ...row, at: row.at.getTime() }));
}

/** When nodes of a house were lost, and loads stood though they were ordered on: what the alarms of it say. */
async function alarmTimes(holding: Holding, houseId: string, from: number, to: number) {
  const rows = await holding.db
    .select({ kind: alarm.kind, about: alarm.about, raisedAt: alarm.raisedAt, clearedAt: alarm.clearedAt })
    .from(alarm)
    .where(
      and(
        eq(alarm.holdingId, holding.id),
        eq(alarm.houseId, houseId),
        inArray(alarm.kind, ['node-lost', 'fan-standing']),
        lt(alarm.raisedAt, new Date(to)),
        or(isNull(alarm.clearedAt), gte(alarm.clearedAt, new Date(from))),
      ),
    )
    .orderBy(asc(alarm.raisedAt));
  return rows.map((row) => ({
    kind: row.kind,
    about: row.about,
    from: row.raisedAt.getTime(),
    to: row.clearedAt?.getTime() ?? null,
  }));
}
