/** Sums over nights are sums over readings: what falls at a noon falls into one night, and into one only. */
import { eq } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closePools, everyHolding, everyPool, type Holding } from '@/db/client';
import { listHouseNights, listNights } from '@/db/queries/night';
import { refreshNights } from '@/db/queries/night-making';
import { storeReadings, type ReadingRow } from '@/db/queries/reading-write';
import { writeRunning } from '@/db/queries/running';
import { point } from '@/db/schema/node';
import { longHouse } from '@/db/seed/long-house';
import { writeHolding } from '@/db/seed/people';
import { writeHouse, type SeededHouse } from '@/db/seed/write-house';
import { nightNamed } from '@/lib/analysis/night';
import { heatCapacityFlow, pressureAtAltitude } from '@/lib/physics/air';

const minute = 60_000;
/** The clock is put back in the second of these nights: it has 25 h. */
const nights = ['2026-10-23', '2026-10-24', '2026-10-25', '2026-10-26'].map((name) =>
  nightNamed(name, 'Europe/London'),
);
const begin = nights[0]?.from ?? 0;
const noons = nights.slice(1).map((night) => night.from);
/** Long before the last of them ends. */
const now = (noons.at(-1) ?? 0) + 200 * minute;
/** Three reports of the node: beyond, a point is silent. */
const HELD = 90_000;
const QUIET = [(noons[1] ?? 0) - 4 * minute, (noons[1] ?? 0) + 3 * minute] as const;

let holding: Holding;
let house: SeededHouse;
let rows: { key: string; at: number; value: number }[];

/** Never at noon itself, and the probes silent about one of the noons. */
function readings(): typeof rows {
  const wave = (at: number, minutes: number) => Math.sin((2 * Math.PI * (at - begin)) / (minutes * minute));
  const found: typeof rows = [];
  for (let at = begin + 20_000; at < now; at += minute) {
    if (at > QUIET[0] && at < QUIET[1]) continue;
    const values: Record<string, number> = {
      'house-air': 5 + wave(at, 400),
      'bench-1': 3 + wave(at, 300),
      outdoors: -3 + 2 * wave(at, 1440),
      humidity: 90 + 4 * wave(at, 500),
      'loop-intake': 5 + wave(at, 400),
      'loop-return': 16 + 3 * wave(at, 170),
    };
    for (const [key, value] of Object.entries(values)) found.push({ key, at, value });
  }
  return found;
}

const of = (key: string) => rows.filter((row) => row.key === key);
/** Between neighbouring readings that are no silence apart. */
function pairs(key: string) {
  const all = of(key);
  return all.slice(1).flatMap((next, i) => {
    const one = all[i];
    return one === undefined || next.at - one.at > HELD
      ? []
      : [{ one, next, seconds: (next.at - one.at) / 1000 }];
  });
}

/** kWh, as anybody reckons it from the readings: the loop is read at both ends at once. */
function heatOfReadings(): number {
  const back = pairs('loop-return');
  const joule = pairs('loop-intake').reduce((sum, { one, next, seconds }, i) => {
    const [from, to] = [back[i]?.one.value ?? NaN, back[i]?.next.value ?? NaN];
    const mean = (one.value + next.value) / 2;
    const wattPerK = heatCapacityFlow(0.0425, mean, pressureAtAltitude(310));
    return sum + wattPerK * seconds * ((from + to) / 2 - mean);
  }, 0);
  return joule / 3_600_000;
}

const liftOfReadings = () => {
  const out = pairs('outdoors');
  return pairs('house-air').reduce((sum, { one, next, seconds }, i) => {
    const cold = ((out[i]?.one.value ?? NaN) + (out[i]?.next.value ?? NaN)) / 2;
    return sum + (((one.value + next.value) / 2 - cold) * seconds) / 3600;
  }, 0);
};

/** s in which a reading holds that passes. */
const heldOfReadings = (key: string, passes: (value: number) => boolean) => {
  const all = of(key);
  return all.reduce((sum, { at, value }, i) => {
    const to = Math.min(all[i + 1]?.at ?? Infinity, at + HELD, now);
    return passes(value) ? sum + (to - at) / 1000 : sum;
  }, 0);
};

let numbers: Map<string, number>;
const store = (some: typeof rows) =>
  storeReadings(
    everyPool(),
    some.map(({ key, at, value }): ReadingRow => ({ point: numbers.get(key) ?? 0, at, value, quality: 0 })),
  );

beforeAll(async () => {
  const started = new Date(begin);
  const people = [{ email: 'owner@larkmoor.example', name: 'Owner', role: 'owner' }];
  holding = await writeHolding('Larkmoor Growers', 'larkmoor', people, 'fifteen letters!', started);
  house = await writeHouse(holding, longHouse, 'owner@larkmoor.example', started);
  const all = await holding.db.select().from(point).where(eq(point.houseId, house.houseId));
  numbers = new Map(all.map((one) => [one.key, one.number]));
  rows = readings();
  const channelId = house.channelIds.get('gate-heap-fan') ?? '';
  const decision = { holdingId: holding.id, houseId: house.houseId, channelId, id: uuid(), at: started };
  await writeRunning(everyHolding(), {
    ...{ switchings: [], reports: [], memories: [] },
    decisions: [{ ...decision, state: 'on', claim: 'band' }],
  });
});
afterAll(closePools);

const kept = async (at: number) =>
  (await listNights(holding, house.houseId, { sources: ['gate-heap'], limit: 9 }, at)).reverse();
const total = (all: readonly (number | null | undefined)[]) =>
  all.reduce<number>((sum, one) => sum + (one ?? NaN), 0);

describe('sums over nights', () => {
  it('hold the interval about noon as soon as its second reading is in', async () => {
    const noon = noons[0] ?? 0;
    await store(rows.filter(({ at }) => at < noon));
    await refreshNights(holding, house.houseId, noon + 5_000);
    const before = (await kept(noon + 5_000))[0];
    expect(before?.complete).toBe(true);
    await store(rows.filter(({ at }) => at === noon + 20_000));
    expect(await refreshNights(holding, house.houseId, noon + 30_000)).toBeGreaterThan(0);
    const after = (await kept(noon + 30_000))[0];
    expect(before?.heatMeasured).toBeLessThan(1);
    expect(after?.heat?.kWh).toBeGreaterThan(before?.heat?.kWh ?? Infinity);
    expect(after?.liftDegreeHours).toBeGreaterThan(before?.liftDegreeHours ?? Infinity);
  });

  it('are sums over readings, over three noons and a change of the clock', async () => {
    await store(rows.filter(({ at }) => at > (noons[0] ?? 0) + 20_000));
    await refreshNights(holding, house.houseId, now);
    const list = await kept(now);
    expect(list.map(({ night, hours }) => [night, hours])).toEqual([
      ['2026-10-23', 24],
      ['2026-10-24', 25],
      ['2026-10-25', 24],
      ['2026-10-26', 3.3333],
    ]);
    // a night is kept to 1 Wh and 0.01 K h: four of them are within four halves of that
    expect(Math.abs(total(list.map(({ heat }) => heat?.kWh)) - heatOfReadings())).toBeLessThan(0.002);
    expect(Math.abs(total(list.map((one) => one.liftDegreeHours)) - liftOfReadings())).toBeLessThan(0.02);
    expect(total(list.map((one) => one.onSeconds))).toBe((now - begin) / 1000);
    const over90 = heldOfReadings('humidity', (value) => value > 90) / 3600;
    expect(Math.abs(total(list.map((one) => one.over90Hours)) - over90)).toBeLessThan(0.002);
    // the bench is always under the house's air where either is under 3 °C
    const under = heldOfReadings('bench-1', (value) => value < 3);
    expect(Math.abs(total(list.map((one) => one.belowFrostLimitSeconds)) - under)).toBeLessThanOrEqual(2);
    expect(total(list.map((one) => one.readings))).toBe(rows.length);
  });

  it('of the house are those of its readings too', async () => {
    const list = (
      await listHouseNights(holding, house.houseId, { from: '2026-10-23', to: '2026-10-26' })
    ).map(({ night }) => night);
    expect(Math.abs(total(list.map((one) => one.liftDegreeHours)) - liftOfReadings())).toBeLessThan(0.02);
  });
});
