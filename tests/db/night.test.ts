import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { eq } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import { closePools, everyHolding, everyPool, inHolding, type Holding } from '@/db/client';
import { listNights, nightSoFar, nightsKept } from '@/db/queries/night';
import { refreshNights, remakeNights } from '@/db/queries/night-making';
import { storeReadings, type ReadingRow } from '@/db/queries/reading-write';
import { writeRunning, type DecisionRow } from '@/db/queries/running';
import { night as nightTable } from '@/db/schema/study';
import { calibration, point } from '@/db/schema/node';
import { longHouse } from '@/db/seed/long-house';
import { writeHolding } from '@/db/seed/people';
import { writeHouse, type SeededHouse } from '@/db/seed/write-house';
import { nightNamed, nightsBetween } from '@/lib/analysis/night';

const hour = 3_600_000;
const first = nightNamed('2026-11-20', 'Europe/London');
/** Five in the morning of the third night. */
const now = first.from + 2 * 24 * hour + 17 * hour;
const nights = nightsBetween(first.from, now, 'Europe/London');

let holding: Holding;
let stranger: Holding;
let house: SeededHouse;

/** A reading a minute; the return is 10 K over the intake while the fan runs, from 02:00 to 02:40 of each night. */
async function writeHistory() {
  const points = await holding.db.select().from(point).where(eq(point.houseId, house.houseId));
  const level: Record<string, number> = {
    'bench-1': 4.5,
    'house-air': 5.5,
    outdoors: -4,
    'loop-intake': 5,
    'loop-return': 15,
    'gate-core': 52,
  };
  const rows: ReadingRow[] = [];
  for (let at = first.from; at < now; at += 60_000)
    for (const { key, number } of points) {
      const value = level[key];
      if (value !== undefined) rows.push({ point: number, at, value, quality: 0 });
    }
  await storeReadings(everyPool(), rows);
  const channelId = house.channelIds.get('gate-heap-fan') ?? '';
  const decided = (at: number, state: 'on' | 'off', claim: string): DecisionRow => {
    const of = { holdingId: holding.id, houseId: house.houseId, channelId };
    return { ...of, id: uuid(), at: new Date(at), state, claim };
  };
  const decisions = nights.flatMap((night) => {
    const two = night.from + 14 * hour;
    return [
      decided(two, 'on', 'band'),
      decided(two + (40 * hour) / 60, 'off', 'rest'),
      decided(two + (80 * hour) / 60, 'off', 'idle'),
    ];
  });
  await writeRunning(everyHolding(), { switchings: [], decisions, reports: [], memories: [] });
}

beforeAll(async () => {
  const people = [{ email: 'owner@larkmoor.example', name: 'Owner', role: 'owner' }];
  holding = await writeHolding(
    'Larkmoor Growers',
    'larkmoor',
    people,
    'fifteen letters!',
    new Date(first.from),
  );
  stranger = await writeHolding(
    'Stonebeck Nursery',
    'stonebeck',
    [],
    'fifteen letters!',
    new Date(first.from),
  );
  house = await writeHouse(holding, longHouse, 'owner@larkmoor.example', new Date(first.from));
  await writeHistory();
});

afterAll(closePools);

const gate = (of: Holding = holding, at = now) =>
  listNights(of, house.houseId, { sources: ['gate-heap'], limit: 500 }, at);
const rowsKept = async () => {
  const rows = await holding.db.select().from(nightTable).where(eq(nightTable.holdingId, holding.id));
  return rows.map(({ night, sourceId, body }) => ({ night, sourceId, body })).sort(byName);
};
const byName = (a: { night: string; sourceId: string }, b: { night: string; sourceId: string }) =>
  `${a.night} ${a.sourceId}`.localeCompare(`${b.night} ${b.sourceId}`);

describe('nights in the database', () => {
  it('are each made once from the first reading on, and agree with what was recorded', async () => {
    expect(await refreshNights(holding, house.houseId, now)).toBe(3);
    const list = await gate();
    expect(list.map((night) => [night.night, night.onSeconds, night.restSeconds, night.starts])).toEqual([
      ['2026-11-22', 2400, 2400, 1],
      ['2026-11-21', 2400, 2400, 1],
      ['2026-11-20', 2400, 2400, 1],
    ]);
    expect(list[0]?.complete).toBe(false);
    expect(list[1]?.heat?.kWh).toBeGreaterThan(0.3);
    expect(list[1]?.electricity?.kWh).toBe(0.008);
    expect(list[1]?.lowest?.value).toBe(4.5);
  });

  it('are not made again while nothing can have changed', async () => {
    await refreshNights(holding, house.houseId, now);
    expect(await refreshNights(holding, house.houseId, now)).toBe(0);
  });

  it('come out the same when they are made anew, one by one or together', async () => {
    await refreshNights(holding, house.houseId, now);
    const before = await rowsKept();
    await remakeNights(holding, house.houseId, nights.slice(0, 1), now);
    await remakeNights(holding, house.houseId, nights, now);
    expect(await rowsKept()).toEqual(before);
  });

  it('are brought up to the present by whoever asks, if half a minute has passed', async () => {
    await refreshNights(holding, house.houseId, now);
    const hours = async (at: number) => (await gate(holding, at))[0]?.hours;
    expect(await hours(now + 20_000)).toBe(17);
    expect(await hours(now + 36_000)).toBe(17.01);
  });

  it('tell this night so far for every source that anything is known of', async () => {
    const soFar = await nightSoFar(holding, house.houseId, now);
    expect(soFar.map((night) => [night.source, night.night])).toEqual([['gate-heap', '2026-11-22']]);
  });

  it('are read page by page without a gap or a repetition', async () => {
    const ask = { sources: ['gate-heap'], limit: 2 };
    const one = await listNights(holding, house.houseId, ask, now);
    const after = { night: one[1]?.night ?? '', source: 'gate-heap' };
    const two = await listNights(holding, house.houseId, { ...ask, after }, now);
    expect([...one, ...two].map((night) => night.night)).toEqual(['2026-11-22', '2026-11-21', '2026-11-20']);
  });

  it('know their first and last', async () => {
    const kept = await nightsKept(holding, house.sourceIds.get('gate-heap') ?? '');
    expect(kept).toEqual({ first: '2026-11-20', last: '2026-11-22', count: 3 });
  });

  it('are corrected by the calibration that was in force', async () => {
    const [bench] = await holding.db.select().from(point).where(eq(point.key, 'bench-1'));
    await holding.db.insert(calibration).values({
      holdingId: holding.id,
      id: uuid(),
      pointId: bench?.id ?? '',
      from: new Date(nights[1]?.from ?? 0),
      offset: -1,
      gain: 1,
      by: 'installer@larkmoor.example',
    });
    await remakeNights(holding, house.houseId, nights, now + 60_000);
    expect((await gate()).map((night) => night.lowest?.value)).toEqual([3.5, 3.5, 4.5]);
  });

  it('are made anew when a node sends later what it had kept', async () => {
    await refreshNights(holding, house.houseId, now);
    const [edge] = await holding.db.select().from(point).where(eq(point.key, 'gate-base'));
    const at = (nights[1]?.from ?? 0) + 3 * hour;
    await storeReadings(everyPool(), [{ point: edge?.number ?? 0, at, value: 44, quality: 0 }]);
    expect(await refreshNights(holding, house.houseId, now)).toBe(1);
    expect(await refreshNights(holding, house.houseId, now)).toBe(0);
  });

  it('of one holding are none of another', async () => {
    await refreshNights(holding, house.houseId, now);
    expect(await inHolding(stranger.id, gate)).toEqual([]);
    expect(await inHolding(holding.id, gate)).toHaveLength(3);
  });
});
