import 'server-only';
import type { z } from 'zod';
import type { Holding } from '@/db/client';
import { alarmEvents, listAlarms, type Alarm as AlarmRow } from '@/db/queries/alarm';
import { listHouses } from '@/db/queries/house';
import { cut, type Listed } from '@/db/queries/page';
import type { AlarmQuery } from '@/lib/schema/alarm';
import type { Alarm, AlarmWithEvents } from '@/lib/schema/alarm-view';
import type { House } from '@/lib/schema/yard-view';
import { isoIn, isoOrNull } from './wire';

const NO_HOUSE = 'utc';

function answer(row: AlarmRow, houses: readonly House[]): Alarm {
  const house = houses.find((one) => one.id === row.houseId);
  const zone = house?.zone ?? NO_HOUSE;
  const { id, key, kind, about, data, acknowledgedBy } = row;
  return {
    ...{ id, key, kind, about, data, acknowledgedBy },
    house: house?.slug ?? null,
    raisedAt: isoIn(zone, row.raisedAt),
    clearedAt: isoOrNull(zone, row.clearedAt),
    acknowledgedAt: isoOrNull(zone, row.acknowledgedAt),
  };
}

/** Alarms with times in their houses' zones; of one house where it is given. */
export async function alarmList(
  holding: Holding,
  query: z.output<typeof AlarmQuery>,
  houseId?: string,
): Promise<Listed<Alarm>> {
  const { cursor } = query;
  const rows = await listAlarms(holding, {
    state: query.state,
    ...(houseId === undefined ? {} : { houseId }),
    ...(cursor?.at === undefined ? {} : { before: { at: cursor.at, id: cursor.id } }),
    limit: query.limit + 1,
  });
  const houses = await listHouses(holding);
  const listed = cut(rows, query.limit, (row) => ({ id: row.id, at: row.raisedAt }));
  return { items: listed.items.map((row) => answer(row, houses)), next: listed.next };
}

export async function alarmWithEvents(
  holding: Holding,
  row: AlarmRow,
): Promise<z.infer<typeof AlarmWithEvents>> {
  const houses = await listHouses(holding);
  const zone = houses.find((one) => one.id === row.houseId)?.zone ?? NO_HOUSE;
  const events = (await alarmEvents(holding, [row.id])).get(row.id) ?? [];
  return {
    ...answer(row, houses),
    events: events.map((event) => ({ ...event, at: isoIn(zone, event.at) })),
  };
}
