// From stored readings and switchings to what the check says: a house that follows a formula, so its answers are known.
import { afterAll, beforeAll, expect, it } from 'vitest';
import { eq } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import { closePools, everyHolding, everyPool, type Holding } from '@/db/client';
import { listChannels } from '@/db/queries/channel';
import { loadHouseConfig } from '@/db/queries/plan';
import { storeReadings, type ReadingRow } from '@/db/queries/reading-write';
import { findRule } from '@/db/queries/rule';
import { writeRunning, type DecisionRow } from '@/db/queries/running';
import { point } from '@/db/schema/node';
import { longHouse } from '@/db/seed/long-house';
import { writeHolding } from '@/db/seed/people';
import { writeHouse, type SeededHouse } from '@/db/seed/write-house';
import { answersOf } from '@/lib/server/house-answers';
import { findingsOf } from '@/lib/server/rule-check';

const MINUTE = 60_000;
const HOUR = 60 * MINUTE;
/** Nine in the morning after three nights. */
const now = Date.UTC(2026, 10, 24, 9);
const from = now - 3 * 24 * HOUR;
const TAU_S = 3600;
const [ON_K, OFF_K, OUTDOORS] = [12, 4, -6];
const [DRAW, REST] = [45, 40];

let holding: Holding;
let house: SeededHouse;

beforeAll(async () => {
  const people = [{ email: 'owner@larkmoor.example', name: 'Owner', role: 'owner' }];
  holding = await writeHolding('Larkmoor Growers', 'larkmoor', people, 'fifteen letters!', new Date(from));
  house = await writeHouse(holding, longHouse, 'owner@larkmoor.example', new Date(from));
  const points = await holding.db.select().from(point).where(eq(point.houseId, house.houseId));
  const numberOf = (key: string) => points.find((one) => one.key === key)?.number ?? 0;
  const rows: ReadingRow[] = [];
  const decisions: DecisionRow[] = [];
  const channelId = house.channelIds.get('gate-heap-fan') ?? '';
  const of = { holdingId: holding.id, houseId: house.houseId, channelId };
  let excess = OFF_K;
  for (let minute = 0; from + minute * MINUTE < now; minute += 1) {
    const at = from + minute * MINUTE;
    const inCycle = minute % (DRAW + REST);
    const target = inCycle >= REST ? ON_K : OFF_K;
    if (inCycle === REST) decisions.push({ ...of, id: uuid(), at: new Date(at), state: 'on', claim: 'band' });
    if (inCycle === 0) decisions.push({ ...of, id: uuid(), at: new Date(at), state: 'off', claim: 'rest' });
    rows.push({ point: numberOf('bench-1'), at, value: OUTDOORS + excess, quality: 0 });
    rows.push({ point: numberOf('outdoors'), at, value: OUTDOORS, quality: 0 });
    excess = target + (excess - target) * Math.exp(-60 / TAU_S);
  }
  await storeReadings(everyPool(), rows);
  await writeRunning(everyHolding(), { switchings: [], decisions, reports: [], memories: [] });
});
afterAll(closePools);

async function answers(pointKey: string) {
  const config = await loadHouseConfig(holding, house.houseId);
  const fan = (await listChannels(holding, house.houseId)).find((one) => one.key === 'gate-heap-fan');
  if (config === null || fan === undefined) throw new Error('the seed has no such house');
  return answersOf(holding, config, fan, pointKey, now);
}

it('lift and answer to a start are read off what was stored', async () => {
  const { liftK, response, coldestOutdoors } = await answers('bench-1');
  const [a, b] = [Math.exp((-DRAW * 60) / TAU_S), Math.exp((-REST * 60) / TAU_S)];
  const top = (ON_K * (1 - a) + OFF_K * (1 - b) * a) / (1 - a * b);
  expect(Math.abs((liftK ?? NaN) - top)).toBeLessThan(0.3);
  const perS = (response?.riseK ?? NaN) / (response?.tauS ?? NaN);
  expect(perS / ((ON_K - OFF_K) / TAU_S)).toBeCloseTo(1, 1);
  expect(coldestOutdoors).toBeNull();
});

it('of a point without readings nothing is known', async () => {
  expect(await answers('house-air')).toMatchObject({ liftK: null, response: null });
});

it('the check speaks of both, or says what it does not know', async () => {
  const rule = await findRule(holding, 'gate-heap-fan-by-the-bench');
  if (rule === null) throw new Error('the seed has no such rule');
  const asked = { caller: { userId: null }, now: new Date(now) };
  const band = [{ from: '00:00', low: 4, high: 4.5 }];
  const told = await findingsOf(holding, rule, { ...rule.body, band }, asked);
  const kinds = told.findings.map((one) => one.kind);
  expect(kinds).toContain('lift-too-small');
  // 8 K an hour over a band of half a kelvin: 4 starts an hour at most; the fan is rated for 6
  expect(kinds).not.toContain('starts-too-often');
  expect(told.notKnown.join(' ')).not.toMatch(/How much warmer|How often/);
  const elsewhere = await findingsOf(holding, rule, { ...rule.body, point: 'house-air' }, asked);
  expect(elsewhere.notKnown.join(' ')).toMatch(/How much warmer.*How often/);
});
