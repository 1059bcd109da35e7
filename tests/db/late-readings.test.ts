import { and, eq, sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closePools, everyHolding, everyPool, type Holding } from '@/db/client';
import { makeLate, noteLate } from '@/db/queries/late-readings';
import { listHouseNights } from '@/db/queries/night';
import { refreshNights } from '@/db/queries/night-making';
import { readSeries } from '@/db/queries/reading';
import { rollUp, storeReadings } from '@/db/queries/reading-write';
import { channel } from '@/db/schema/channel';
import { point } from '@/db/schema/node';
import { longHouse } from '@/db/seed/long-house';
import { writeHolding } from '@/db/seed/people';
import { writeHouse, type SeededHouse } from '@/db/seed/write-house';
import { nightNamed } from '@/lib/analysis/night';

const hour = 3_600_000;
const first = nightNamed('2026-01-10', 'Europe/London');
/** Three weeks on: long past what is counted again by itself. */
const now = first.from + 21 * 24 * hour;
const evening = first.from + 6 * hour;

let holding: Holding;
let house: SeededHouse;
let bench: number;
let outdoors: number;

const rows = (number: number, value: number, from: number, count: number) =>
  Array.from({ length: count }, (_, i) => ({
    point: number,
    at: from + i * 60_000,
    value,
    quality: 0 as const,
  }));

/** As the field's way in stores them. */
async function arrive(given: ReturnType<typeof rows>) {
  await noteLate(everyPool(), given, now - 20 * hour);
  await storeReadings(everyPool(), given);
  await noteLate(everyPool(), given, now - 20 * hour);
}

beforeAll(async () => {
  const started = new Date(first.from);
  const people = [{ email: 'owner@larkmoor.example', name: 'Owner', role: 'owner' }];
  holding = await writeHolding('Larkmoor Growers', 'larkmoor', people, 'fifteen letters!', started);
  house = await writeHouse(holding, longHouse, 'owner@larkmoor.example', started);
  const all = await holding.db.select().from(point).where(eq(point.houseId, house.houseId));
  const numberOf = (key: string) => all.find((one) => one.key === key)?.number ?? 0;
  [bench, outdoors] = [numberOf('bench-1'), numberOf('outdoors')];
  await storeReadings(everyPool(), rows(bench, 5, first.from, 120));
  await rollUp(everyPool(), [bench, outdoors], first.from, first.from + 2 * hour);
  await refreshNights(holding, house.houseId, now);
});

afterAll(closePools);

const night = async () =>
  (await listHouseNights(holding, house.houseId, { from: first.night, to: first.night }))[0]?.night;
const hours = async (number: number) =>
  (await readSeries(holding, [number], evening, evening + 2 * hour, 3600)).get(number)?.mean;

describe('readings that come three weeks late', () => {
  it('are in the roll-ups and in the night after the next turn', async () => {
    expect((await night())?.lowest?.value).toBe(5);
    await arrive(rows(bench, 1.5, evening, 60));
    expect(await makeLate(everyPool(), everyHolding())).toBe(1);
    expect(await refreshNights(holding, house.houseId, now)).toBe(1);
    expect((await night())?.lowest?.value).toBe(1.5);
    expect(await hours(bench)).toEqual([1.5]);
  });

  it('are noted once, and not looked for again', async () => {
    expect(await makeLate(everyPool(), everyHolding())).toBe(0);
    expect(await refreshNights(holding, house.houseId, now)).toBe(0);
  });

  it('are not forgotten by a worker that ends between storing and rolling up', async () => {
    await arrive(rows(outdoors, -7, evening, 90));
    // nothing of it is in memory here: another process would find the same
    expect(await makeLate(everyPool(), everyHolding())).toBe(2);
    expect(await hours(outdoors)).toEqual([-7, -7]);
    await refreshNights(holding, house.houseId, now);
    expect((await night())?.outdoorsLowest?.value).toBe(-7);
  });

  it('leave roll-ups and night again when they are taken back', async () => {
    await holding.db.execute(sql`delete from reading where point = ${bench} and at >= ${new Date(evening)}`);
    await noteLate(everyPool(), rows(bench, 0, evening, 60), Infinity);
    await makeLate(everyPool(), everyHolding());
    await refreshNights(holding, house.houseId, now);
    expect(await hours(bench)).toEqual([]);
    expect((await night())?.lowest?.value).toBe(5);
  });
});

describe('a file of readings from before everything else', () => {
  const old = nightNamed('2025-12-20', 'Europe/London');
  const kept = async (table: 'night' | 'house_night') => {
    const found = await holding.db.execute<{ night: string }>(
      sql.raw(
        `select distinct night::text as night from ${table} where house_id = '${house.houseId}' order by 1`,
      ),
    );
    return found.rows.map((row) => row.night);
  };
  const core = async () => {
    const all = await holding.db.select().from(point).where(eq(point.houseId, house.houseId));
    return all.find(({ key }) => key === 'gate-core')?.number ?? 0;
  };

  it('leaves no night behind when it is taken back, of the house or of a source', async () => {
    const before = { night: await kept('night'), house: await kept('house_night') };
    const brought = [...rows(await core(), 50, old.from + hour, 60), ...rows(bench, 4, old.from + hour, 60)];
    await arrive(brought);
    await makeLate(everyPool(), everyHolding());
    await refreshNights(holding, house.houseId, now);
    expect((await kept('night'))[0]).toBe(old.night);
    expect((await kept('house_night'))[0]).toBe(old.night);

    await holding.db.execute(sql`delete from reading where at < ${new Date(old.to)}`);
    await noteLate(everyPool(), brought, Infinity);
    await makeLate(everyPool(), everyHolding());
    await refreshNights(holding, house.houseId, now);
    expect({ night: await kept('night'), house: await kept('house_night') }).toEqual(before);
  });

  it('of which nothing is left leaves no night at all', async () => {
    const { rows: gone } = await holding.db.execute<{
      point: string;
      at: Date;
      value: number;
      quality: number;
    }>(sql`delete from reading returning point, at, value, quality`);
    await refreshNights(holding, house.houseId, now);
    expect([await kept('night'), await kept('house_night')]).toEqual([[], []]);
    await storeReadings(
      everyPool(),
      gone.map((row) => ({
        point: Number(row.point),
        at: +new Date(row.at),
        value: row.value,
        quality: 0 as const,
      })),
    );
    await refreshNights(holding, house.houseId, now);
    expect((await kept('house_night'))[0]).toBe(first.night);
  });
});

it('a flow that is corrected makes the nights anew by which it was reckoned', async () => {
  const [fan] = await holding.db
    .select()
    .from(channel)
    .where(and(eq(channel.houseId, house.houseId), eq(channel.number, 1)));
  await holding.db
    .update(channel)
    .set({ flow: { litresPerSecond: 30, from: 'measured', sd: 2 } })
    .where(and(eq(channel.holdingId, holding.id), eq(channel.id, fan?.id ?? '')));
  // newest first, twenty a turn: a year of nights must not keep the worker from its relays
  expect(await refreshNights(holding, house.houseId, now)).toBe(20);
  expect(await refreshNights(holding, house.houseId, now)).toBeGreaterThan(0);
  expect(await refreshNights(holding, house.houseId, now)).toBe(0);
});

it('deleted nights come back as the same bytes', async () => {
  const bytes = async () => {
    const { rows: kept } = await holding.db.execute<{ body: string }>(
      sql`select body::text as body from (select night, body from night union all select night, body from house_night) kept
        order by night, body::text`,
    );
    return kept.map((row) => row.body);
  };
  const before = await bytes();
  await holding.db.execute(sql`delete from night where house_id = ${house.houseId}`);
  await holding.db.execute(sql`delete from house_night where house_id = ${house.houseId}`);
  await refreshNights(holding, house.houseId, now);
  expect(await bytes()).toEqual(before);
  expect(before.length).toBeGreaterThan(20);
});
