/** A heap that was built anew is not judged by the one that stood there before. */
import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { closePools, everyPool, type Holding } from '@/db/client';
import { createHeapEntry } from '@/db/queries/heap-entry';
import { heapRows, readHeapRecord } from '@/db/queries/heap-record';
import { readHouses } from '@/db/queries/houses-page';
import { refreshNights } from '@/db/queries/night-making';
import { createProbeSet } from '@/db/queries/probe-set';
import { rollUp, storeReadings } from '@/db/queries/reading-write';
import { point } from '@/db/schema/node';
import { longHouse } from '@/db/seed/long-house';
import { writeHolding } from '@/db/seed/people';
import { writeHouse, type SeededHouse } from '@/db/seed/write-house';
import { HeapEntryCreate } from '@/lib/schema/heap';
import { ProbeSetCreate } from '@/lib/schema/probe-set';
import { USUAL } from '@/lib/units/preferences';
import { heapSentence } from '@/lib/wording/heap';
import { plainText } from '@/lib/wording/phrase';

const DAY = 86_400_000;
const by = 'owner@larkmoor.example';
const now = Date.parse('2026-12-01T12:30:00Z');
const begin = now - 12 * DAY;

let holding: Holding;
let house: SeededHouse;

const write = (daysAgo: number, given: Record<string, unknown>) =>
  createHeapEntry(
    holding,
    house.houseId,
    HeapEntryCreate.parse({
      source: 'gate-heap',
      at: new Date(now - daysAgo * DAY).toISOString(),
      ...given,
    }),
    { by, now: new Date(now) },
  );
const record = async () => {
  const [heap] = await heapRows(holding, house.houseId);
  if (heap === undefined) throw new Error('the long house has a heap');
  return readHeapRecord(holding, house.houseId, heap, now);
};
const kinds = async () => (await record()).findings.open.map(({ kind }) => kind);
const trendOfHouses = async () =>
  (await readHouses(holding, now)).houses[0]?.sources.find(({ slug }) => slug === 'gate-heap')?.core?.trend;

beforeAll(async () => {
  const people = [{ email: by, name: 'Owner', role: 'owner' }];
  holding = await writeHolding('Larkmoor Growers', 'larkmoor', people, 'fifteen letters!', new Date(begin));
  house = await writeHouse(holding, longHouse, by, new Date(begin));
  const all = await holding.db.select().from(point).where(eq(point.houseId, house.houseId));
  const number = all.find(({ key }) => key === 'gate-core')?.number ?? 0;
  const readings = [];
  // it falls by a kelvin a day, before and after: the two heaps are alike, so that what is found is found by days alone
  for (let at = begin; at < now; at += 300_000)
    readings.push({ point: number, at, value: 58 - (at - begin) / DAY, quality: 0 as const });
  await storeReadings(everyPool(), readings);
  await rollUp(everyPool(), [number], begin, now);
  await refreshNights(holding, house.houseId, now);
  await write(11.9, { kind: 'built', volume: 12 });
  await write(6, { kind: 'turned' });
  await write(2.5, { kind: 'note', squeeze: 'crumbles', volume: 9 });
  await createProbeSet(
    holding,
    house.houseId,
    ProbeSetCreate.parse({
      source: 'gate-heap',
      at: new Date(now - 2.4 * DAY).toISOString(),
      section: { widthM: 2.4, heightM: 1.4, sunkM: 0, columns: 4, rows: 3, left: 'west', right: 'east' },
      places: [
        { column: 0, row: 0, celsius: 20 },
        { column: 2, row: 1, celsius: 84 },
      ],
    }),
    { by, now: new Date(now) },
  );
}, 120_000);
afterAll(closePools);

it('a heap that stands is judged by its dawns, its book and its probes', async () => {
  expect((await kinds()).sort()).toEqual(['core-falls', 'dry', 'too-hot', 'uneven']);
  expect((await record()).findings.open.find(({ kind }) => kind === 'core-falls')).toMatchObject({
    hasTurned: true,
  });
  expect(await trendOfHouses()).toMatchObject({ isLastingFall: true });
});

it('built anew, it is judged by nothing of the old one, and the book keeps all', async () => {
  await write(2.2, { kind: 'built' });
  const { trend, entries, rounds, core } = await record();
  expect(await kinds()).toEqual([]);
  expect(trend).toBeNull();
  expect([entries.length, rounds.length]).toEqual([4, 1]);
  expect(await trendOfHouses()).toBeNull();
  const standing = { name: 'Gate heap', zone: 'Europe/London', now, core, coreFloor: 38, trend, entries };
  const said = plainText(heapSentence(standing, USUAL)).replaceAll('\u00a0', ' ');
  expect(said).toMatch(/^The gate heap is \d days old\./);
  expect(said).toContain('It has not been turned since.');
  expect(said).not.toContain('m³');
});
