/** Hours at temperature come from the readings, though a season of them is counted by its roll-ups. */
import { eq } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { closePools, everyPool, type Holding } from '@/db/client';
import { createHeapEntry } from '@/db/queries/heap-entry';
import { heapRows, readHeapRecord } from '@/db/queries/heap-record';
import { rollUp, storeReadings } from '@/db/queries/reading-write';
import { calibration, point } from '@/db/schema/node';
import { longHouse } from '@/db/seed/long-house';
import { writeHolding } from '@/db/seed/people';
import { writeHouse, type SeededHouse } from '@/db/seed/write-house';
import { HeapEntryCreate } from '@/lib/schema/heap';

const minute = 60_000;
const by = 'owner@larkmoor.example';
const built = Date.parse('2026-11-20T00:00:00Z');
const now = built + 6 * 24 * 60 * minute;

let holding: Holding;
let house: SeededHouse;
let core: typeof point.$inferSelect;

const store = async (readings: readonly { at: number; value: number }[]) => {
  await storeReadings(
    everyPool(),
    readings.map((one) => ({ ...one, point: core.number, quality: 0 as const })),
  );
  await rollUp(everyPool(), [core.number], built, now);
};
const heat = async () => {
  const [heap] = await heapRows(holding, house.houseId);
  if (heap === undefined) throw new Error('the long house has a heap');
  return (await readHeapRecord(holding, house.houseId, heap, now)).heat;
};
const still = async () => (await heat())?.rules.find(({ rule }) => rule === 'still');

beforeAll(async () => {
  const people = [{ email: by, name: 'Owner', role: 'owner' }];
  holding = await writeHolding('Larkmoor Growers', 'larkmoor', people, 'fifteen letters!', new Date(built));
  house = await writeHouse(holding, longHouse, by, new Date(built));
  const all = await holding.db.select().from(point).where(eq(point.houseId, house.houseId));
  const found = all.find(({ key }) => key === 'gate-core');
  if (found === undefined) throw new Error('the heap has a core');
  core = found;
  const entry = { source: 'gate-heap', kind: 'built', at: new Date(built).toISOString() };
  await createHeapEntry(holding, house.houseId, HeapEntryCreate.parse(entry), { by, now: new Date(now) });
  // every ten minutes: hot from 00:04 to 71:54, and cold after 72:10
  const hot = Array.from({ length: 432 }, (_, i) => ({ at: built + (4 + 10 * i) * minute, value: 60 }));
  const cold = Array.from({ length: 12 }, (_, i) => ({ at: built + (4330 + 10 * i) * minute, value: 50 }));
  await store([...hot, ...cold]);
}, 60_000);
afterAll(closePools);

it('a probe that reads every ten minutes shows the hours that passed, not half of them', async () => {
  expect((await heat())?.hoursFromHot).toBeCloseTo(71 + 50 / 60, 9);
  expect((await heat())?.measuredHours).toBeGreaterThan(73);
});

it('a spell of less than 72 h between its readings is not lifted to 72 h by the steps that hold them', async () => {
  expect(await still()).toMatchObject({ isReached: false });
  await store([{ at: built + (71 * 60 + 59) * minute, value: 60 }]);
  expect((await still())?.hours).toBeCloseTo(71 + 55 / 60, 9);
  expect(await still()).toMatchObject({ isReached: false });
  await store([{ at: built + (72 * 60 + 4) * minute, value: 60 }]);
  expect(await still()).toMatchObject({ isReached: true, hours: 72 });
});

it('the readings at the edges are corrected as the rest is', async () => {
  await holding.db.insert(calibration).values({
    ...{ holdingId: holding.id, id: uuid(), pointId: core.id, from: new Date(built + minute) },
    ...{ offset: -5.01, gain: 1, by },
  });
  expect(await still()).toMatchObject({ isReached: false, hours: 0 });
});
