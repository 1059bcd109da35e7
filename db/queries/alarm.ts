import { and, asc, desc, eq, inArray, isNotNull, isNull, lt, or, sql } from 'drizzle-orm';
import { v7 } from 'uuid';
import type { Db, Holding } from '@/db/client';
import { alarm, alarmEvent } from '@/db/schema/watch';

export interface AlarmAbout {
  point?: string;
  channel?: string;
  source?: string;
  node?: string;
}

export interface AlarmRaise {
  houseId: string | null;
  /** Stable while its cause stands: kind, house and what it is about. */
  key: string;
  kind: string;
  /** Keys and slugs of what it is about. */
  about: AlarmAbout;
  data: Record<string, unknown>;
  at: number;
}

export interface Alarm {
  id: string;
  houseId: string | null;
  key: string;
  kind: string;
  about: AlarmAbout;
  data: Record<string, unknown>;
  raisedAt: number;
  clearedAt: number | null;
  acknowledgedAt: number | null;
  acknowledgedBy: string | null;
}

export interface AlarmEvent {
  at: number;
  kind: 'raised' | 'acknowledged' | 'cleared';
  by: string | null;
  note: string | null;
}

/** Raises an alarm unless one of its key stands already. @returns whether it is new */
export async function raiseAlarm(holding: Holding, raise: AlarmRaise): Promise<boolean> {
  return holding.db.transaction(async (tx) => {
    const { at, ...rest } = raise;
    const [made] = await tx
      .insert(alarm)
      .values({ ...rest, holdingId: holding.id, id: v7(), raisedAt: new Date(at) })
      .onConflictDoNothing({ target: [alarm.holdingId, alarm.key], where: isNull(alarm.clearedAt) })
      .returning({ id: alarm.id });
    if (made === undefined) return false;
    await addEvent(tx, holding.id, made.id, { at, kind: 'raised', by: null, note: null });
    return true;
  });
}

/** Clears what stands under a key. @returns whether anything did */
export async function clearAlarm(holding: Holding, key: string, at: number): Promise<boolean> {
  return holding.db.transaction(async (tx) => {
    const [cleared] = await tx
      .update(alarm)
      .set({ clearedAt: new Date(at) })
      .where(and(eq(alarm.holdingId, holding.id), eq(alarm.key, key), isNull(alarm.clearedAt)))
      .returning({ id: alarm.id });
    if (cleared === undefined) return false;
    await addEvent(tx, holding.id, cleared.id, { at, kind: 'cleared', by: null, note: null });
    return true;
  });
}

/** The first who says "I've got it" has it; a second changes nothing. @returns null where there is no such alarm */
export async function acknowledgeAlarm(
  holding: Holding,
  id: string,
  by: string,
  at: number,
  note: string | null,
): Promise<Alarm | null> {
  await holding.db.transaction(async (tx) => {
    const [taken] = await tx
      .update(alarm)
      .set({ acknowledgedAt: new Date(at), acknowledgedBy: by })
      .where(and(eq(alarm.holdingId, holding.id), eq(alarm.id, id), isNull(alarm.acknowledgedAt)))
      .returning({ id: alarm.id });
    if (taken !== undefined) await addEvent(tx, holding.id, id, { at, kind: 'acknowledged', by, note });
  });
  return findAlarm(holding, id);
}

export async function findAlarm(holding: Holding, id: string): Promise<Alarm | null> {
  const [row] = await holding.db
    .select()
    .from(alarm)
    .where(and(eq(alarm.holdingId, holding.id), eq(alarm.id, id)));
  return row === undefined ? null : asAlarm(row);
}

export interface AlarmAsk {
  state: 'active' | 'history' | 'all';
  /** Alarms of the whole holding, such as control that does not run, are every house's. */
  houseId?: string;
  before?: { at: number; id: string };
  limit: number;
}

/** Newest first. */
export async function listAlarms(holding: Holding, ask: AlarmAsk): Promise<Alarm[]> {
  const standing = { active: isNull(alarm.clearedAt), history: isNotNull(alarm.clearedAt), all: undefined };
  const rows = await holding.db
    .select()
    .from(alarm)
    .where(
      and(
        eq(alarm.holdingId, holding.id),
        standing[ask.state],
        ask.houseId === undefined ? undefined : or(eq(alarm.houseId, ask.houseId), isNull(alarm.houseId)),
        ask.before === undefined
          ? undefined
          : or(
              lt(alarm.raisedAt, new Date(ask.before.at)),
              and(eq(alarm.raisedAt, new Date(ask.before.at)), lt(alarm.id, ask.before.id)),
            ),
      ),
    )
    .orderBy(desc(alarm.raisedAt), desc(alarm.id))
    .limit(ask.limit);
  return rows.map(asAlarm);
}

/** What happened to some alarms, ascending, by the alarm's id. */
export async function alarmEvents(
  holding: Holding,
  ids: readonly string[],
): Promise<Map<string, AlarmEvent[]>> {
  const events = new Map<string, AlarmEvent[]>(ids.map((id) => [id, []]));
  if (ids.length === 0) return events;
  const rows = await holding.db
    .select()
    .from(alarmEvent)
    .where(and(eq(alarmEvent.holdingId, holding.id), inArray(alarmEvent.alarmId, [...ids])))
    .orderBy(asc(alarmEvent.at), asc(alarmEvent.id));
  for (const row of rows) {
    events.get(row.alarmId)?.push({ at: row.at.getTime(), kind: row.kind, by: row.by, note: row.note });
  }
  return events;
}

/** Keys of a house's standing alarms, for the worker's start. */
export async function standingAlarmKeys(holding: Holding, houseId: string): Promise<string[]> {
  const rows = await holding.db
    .select({ key: alarm.key })
    .from(alarm)
    .where(and(eq(alarm.holdingId, holding.id), eq(alarm.houseId, houseId), isNull(alarm.clearedAt)));
  return rows.map((row) => row.key);
}

async function addEvent(
  db: Pick<Db, 'insert' | 'execute'>,
  holdingId: string,
  alarmId: string,
  event: AlarmEvent,
) {
  await db.insert(alarmEvent).values({ ...event, holdingId, id: v7(), alarmId, at: new Date(event.at) });
  await db.execute(sql`select pg_notify('alarm', ${holdingId})`);
}

function asAlarm(row: typeof alarm.$inferSelect): Alarm {
  const { id, houseId, key, kind, about, data, acknowledgedBy } = row;
  return {
    ...{ id, houseId, key, kind, about, data, acknowledgedBy },
    raisedAt: row.raisedAt.getTime(),
    clearedAt: row.clearedAt?.getTime() ?? null,
    acknowledgedAt: row.acknowledgedAt?.getTime() ?? null,
  };
}
