import { randomUUID } from 'node:crypto';
import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closePools, everyPool, inHolding } from '@/db/client';
import { latestReadings, readRawSeries, readSeries } from '@/db/queries/reading';
import { rollUp, storeReadings, type ReadingRow } from '@/db/queries/reading-write';
import { makeScene, type Scene } from '../support/field-scene';

const T0 = Date.UTC(2026, 0, 10, 12);
const MIN = 60_000;
let scene: Scene;
let number: number;
let pointId: string;

beforeAll(async () => {
  scene = await makeScene();
  const { rows } = await scene.holding.db.execute<{ number: string; id: string }>(
    sql`select number, id from point where house_id = ${scene.houseId} and key = 'bench-1'`,
  );
  number = Number(rows[0]?.number);
  pointId = rows[0]?.id ?? '';
});
afterAll(closePools);

const row = (at: number, value: number, quality: ReadingRow['quality'] = 0): ReadingRow => ({
  point: number,
  at,
  value,
  quality,
});

describe('Storing readings', () => {
  it('tells for each row whether it is new, duplicates within the pack among them', async () => {
    const first = [row(T0, 1), row(T0 + 1000, 2), row(T0, 9)];
    expect(await storeReadings(everyPool(), first)).toEqual([true, true, false]);
    const again = [row(T0 + 1000, 5), row(T0 + 2000, 3)];
    expect(await storeReadings(everyPool(), again)).toEqual([false, true]);
    const kept = await readRawSeries(scene.holding, [number], T0, T0 + 3000);
    // the first that came stays
    expect(kept.get(number)).toEqual({
      at: [T0, T0 + 1000, T0 + 2000],
      value: [1, 2, 3],
      quality: [0, 0, 0],
    });
  });

  it('keeps a value to the last bit and a time to the millisecond, before 2000 and in months not made yet', async () => {
    const at = Date.UTC(1999, 11, 31, 23, 59, 59, 123);
    const far = Date.UTC(2031, 5, 1, 0, 0, 0, 1);
    await storeReadings(everyPool(), [row(at, 0.1 + 0.2), row(far, -5e-324)]);
    const early = await readRawSeries(scene.holding, [number], at, at + 1);
    const late = await readRawSeries(scene.holding, [number], far, far + 1);
    expect(early.get(number)).toMatchObject({ at: [at], value: [0.1 + 0.2] });
    expect(late.get(number)).toMatchObject({ at: [far], value: [-5e-324] });
  });

  it('finds the newest of each point by its own time, whatever came last', async () => {
    const newest = Date.UTC(2032, 0, 1);
    await storeReadings(everyPool(), [row(newest, 7)]);
    await storeReadings(everyPool(), [row(newest - 1000, 6)]);
    expect(await latestReadings(scene.holding, scene.houseId)).toEqual([
      { pointId, number, at: newest, value: 7 },
    ]);
  });
});

describe('Series', () => {
  const from = T0 + 86_400_000;
  const steps: (60 | 300 | 3600)[] = [60, 300, 3600];

  beforeAll(async () => {
    // a reading a minute for two hours: 0, 1, 2 … and a bad one between, which no step may count
    const rows = Array.from({ length: 120 }, (_, minute) => row(from + minute * MIN, minute));
    await storeReadings(everyPool(), [...rows, row(from + 30_000, 1000, 2)]);
    await rollUp(everyPool(), [number], from, from + 90 * MIN);
  });

  it.each(steps)('of %i s have least, mean and greatest, also beyond what is rolled up', async (step) => {
    const { at, least, mean, greatest } = (
      await readSeries(scene.holding, [number], from, from + 120 * MIN, step)
    ).get(number) ?? { at: [], least: [], mean: [], greatest: [] };
    const minutes = step / 60;
    const count = 120 / minutes;
    const firsts = Array.from({ length: count }, (_, index) => index * minutes);
    expect(at).toEqual(firsts.map((minute) => from + minute * MIN));
    expect(least).toEqual(firsts);
    expect(greatest).toEqual(firsts.map((minute) => minute + minutes - 1));
    mean.forEach((value, index) => expect(value).toBeCloseTo((firsts[index] ?? 0) + (minutes - 1) / 2, 9));
  });

  it('change with a late reading once its hour is rolled up anew', async () => {
    await storeReadings(everyPool(), [row(from + 15_000, -50)]);
    await rollUp(everyPool(), [number], from + 15_000, from + 15_000);
    const series = await readSeries(scene.holding, [number], from, from + 120 * MIN, 3600);
    expect(series.get(number)?.least[0]).toBe(-50);
  });

  it('are corrected by the calibration in force at their time, never in what is stored', async () => {
    await scene.holding.db.execute(sql`
      insert into calibration (holding_id, id, point_id, "from", "offset", gain, by)
      values (${scene.holding.id}, ${randomUUID()}, ${pointId}, ${new Date(from + 60 * MIN)}, 1, 2, 'test')`);
    const raw = await readRawSeries(scene.holding, [number], from + 59 * MIN, from + 61 * MIN);
    expect(raw.get(number)?.value).toEqual([59, 121]);
    const hours = await readSeries(scene.holding, [number], from, from + 120 * MIN, 3600);
    expect(hours.get(number)?.greatest).toEqual([59, 239]);
  });

  it('of another holding’s points are not there', async () => {
    const other = await makeScene();
    const seen = await inHolding(other.holding.id, (holding) =>
      readRawSeries(holding, [number], T0, T0 + 3000),
    );
    expect(seen.size).toBe(0);
  });
});
