import 'server-only';
import { and, asc, eq, isNull, sql } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import type { z } from 'zod';
import type { Holding } from '@/db/client';
import { house } from '@/db/schema/house';
import type { HouseCreate } from '@/lib/schema/house';
import type { House } from '@/lib/schema/yard-view';
import { refuseDayToCome } from './day-done';
import { touchPlan } from './plan';
import { isId } from './reference';
import { freeSlug, NO_HOUSE } from './slug';

type Row = typeof house.$inferSelect;

function toHouse(row: Row): House {
  const { id, revision, slug, name, zone, latitude, longitude, altitude } = row;
  const { frostLimit, frostAlarm, lastResort } = row;
  return {
    ...{ id, revision, slug, name, zone, latitude, longitude, altitude },
    ...{ frostLimit, frostAlarm, lastResort, laidUpAt: row.laidUpAt?.toISOString() ?? null },
  };
}

export async function listHouses(holding: Holding): Promise<House[]> {
  const rows = await holding.db
    .select()
    .from(house)
    .where(and(eq(house.holdingId, holding.id), isNull(house.removedAt)))
    .orderBy(asc(house.id));
  return rows.map(toHouse);
}

/** By id or slug. */
export async function findHouse(holding: Holding, ref: string): Promise<House | null> {
  const rows = await holding.db
    .select()
    .from(house)
    .where(
      and(
        eq(house.holdingId, holding.id),
        isNull(house.removedAt),
        isId(ref) ? eq(house.id, ref) : eq(house.slug, ref),
      ),
    );
  return rows[0] === undefined ? null : toHouse(rows[0]);
}

async function takenSlugs(holding: Holding): Promise<Set<string>> {
  const rows = await holding.db
    .select({ slug: house.slug })
    .from(house)
    .where(and(eq(house.holdingId, holding.id), isNull(house.removedAt)));
  return new Set([...NO_HOUSE, ...rows.map((row) => row.slug)]);
}

/** @throws Refusal where a thermostat of last resort is said to have been seen at work on a day yet to come */
function refuseUnseen({ lastResort, zone }: z.infer<typeof HouseCreate>, now: Date): void {
  const remedy = 'the day on which it was seen to come on, or leave it empty';
  refuseDayToCome(lastResort?.provedOn, 'lastResort.provedOn', remedy, { zone }, now);
}

export async function createHouse(
  holding: Holding,
  given: z.infer<typeof HouseCreate>,
  now: Date,
): Promise<House> {
  refuseUnseen(given, now);
  const slug = freeSlug(given.name, await takenSlugs(holding));
  const id = uuid();
  const rows = await holding.db
    .insert(house)
    .values({ ...given, id, holdingId: holding.id, slug })
    .returning();
  await touchPlan(holding, id);
  return one(rows);
}

/** The slug stays when the name changes: addresses that people kept go on working. */
export async function amendHouse(
  holding: Holding,
  id: string,
  given: z.infer<typeof HouseCreate>,
  now: Date,
): Promise<House> {
  refuseUnseen(given, now);
  const rows = await holding.db
    .update(house)
    .set({ ...given, revision: sql`${house.revision} + 1` })
    .where(and(eq(house.holdingId, holding.id), eq(house.id, id)))
    .returning();
  await touchPlan(holding, id);
  return one(rows);
}

/** From here on the worker takes it up: rules in force decide, and nodes with a new token are let in. */
export async function putInService(holding: Holding, id: string): Promise<House> {
  const rows = await holding.db
    .update(house)
    .set({ laidUpAt: null, revision: sql`${house.revision} + 1` })
    .where(and(eq(house.holdingId, holding.id), eq(house.id, id)))
    .returning();
  await touchPlan(holding, id);
  return one(rows);
}

/** Taken out of use: its record stays, its relays fall to their safe states when the worker sees that it is gone. */
export async function removeHouse(holding: Holding, id: string, now: Date): Promise<void> {
  await holding.db
    .update(house)
    .set({ removedAt: now, revision: sql`${house.revision} + 1` })
    .where(and(eq(house.holdingId, holding.id), eq(house.id, id)));
  await touchPlan(holding, id);
}

function one(rows: Row[]): House {
  const row = rows[0];
  if (row === undefined) throw new Error('the house was there a moment ago');
  return toHouse(row);
}
