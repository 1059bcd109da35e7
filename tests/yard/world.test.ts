import { describe, expect, test, vi } from 'vitest';
import { yardHouses } from '@/worker/yard/catalogue';
import { sensorReadings } from '@/worker/yard/sensors';
import { flowNames } from '@/worker/yard/house-world';
import * as yard from '@/worker/yard/world';

// Weeks are played here; a busy machine may need its time for them.
vi.setConfig({ testTimeout: 60_000 });

const start = Date.UTC(2026, 10, 20, 12);
const dayS = 86_400;
const allOn = (): yard.YardRelays =>
  Object.fromEntries(
    yardHouses.map(({ node, relays }) => [
      node,
      Object.fromEntries(Array.from({ length: relays }, (_, i) => [String(i + 1), 'on' as const])),
    ]),
  );
/** Coils that change with the time of day only, so that steps of any length see the same ones. */
const byTheHour = (world: yard.World): yard.YardRelays =>
  Math.floor(world.ms / 1_800_000) % 2 === 0 ? allOn() : {};

function run(from: yard.World, seconds: number, dtS: number, relays = byTheHour): yard.World {
  let world = from;
  for (let t = 0; t < seconds; t += dtS) world = yard.stepWorld(world, relays(world), dtS);
  return world;
}

describe('energy', () => {
  test.each(yardHouses.map(({ key }) => key))('of %s balances: flows add up to what is stored', (key) => {
    const before = yard.createWorld(7, start);
    const after = run(before, 3 * dayS, 30);
    const flows = flowNames.map((name) => yard.houseWorld(after, key).flowsJ[name]);
    const moved = flows.reduce((sum, flow) => sum + Math.abs(flow), 0);
    const change = yard.storedJ(after, key) - yard.storedJ(before, key);
    expect(Math.abs(flows.reduce((sum, flow) => sum + flow, 0) - change) / moved).toBeLessThan(1e-6);
  });

  test('made by a heap is taken from what it has to digest, joule for joule', () => {
    const before = yard.createWorld(7, start);
    const after = run(before, dayS, 60);
    for (const { key } of yardHouses) {
      const spent =
        yard.houseWorld(before, key).heap.digestibleJ - yard.houseWorld(after, key).heap.digestibleJ;
      const made = yard.houseWorld(after, key).flowsJ.generated;
      expect(Math.abs(spent - made) / made).toBeLessThan(1e-6);
    }
  });

  test('of the fans is heat in the house: two fans for an hour are 30 W times 3600 s', () => {
    const after = run(yard.createWorld(7, start), 3600, 60, allOn);
    expect(yard.houseWorld(after, 'long-house').flowsJ.fans).toBeCloseTo(30 * 3600, 3);
  });
});

describe('steps', () => {
  test.each([10, 60])('of %d s end where steps of 1 s do, to a thousandth of a kelvin', (dtS) => {
    const fine = run(yard.createWorld(7, start), 4 * 3600, 1);
    const coarse = run(yard.createWorld(7, start), 4 * 3600, dtS);
    for (const { key } of yardHouses) {
      const [a, b] = [yard.houseWorld(fine, key), yard.houseWorld(coarse, key)];
      expect(b.airC).toBeCloseTo(a.airC, 3);
      expect(b.massC).toBeCloseTo(a.massC, 3);
      expect(b.heap.coreC).toBeCloseTo(a.heap.coreC, 3);
      expect(b.heap.baseC).toBeCloseTo(a.heap.baseC, 3);
      expect(b.ringC).toBeCloseTo(a.ringC, 3);
    }
  });

  test('leave the world before untouched', () => {
    const before = yard.createWorld(7, start);
    const copy = structuredClone(before);
    yard.stepWorld(before, allOn(), 60);
    expect(before).toEqual(copy);
  });

  test('go on alike from a world that was written down and read again', () => {
    const half = run(yard.createWorld(7, start), 3600, 30);
    const read: yard.World = JSON.parse(JSON.stringify(half));
    expect(run(read, 3600, 30)).toEqual(run(half, 3600, 30));
  });
});

describe('what a load does', () => {
  const dayOf = (relays: yard.YardRelays): yard.World =>
    run(yard.createWorld(7, start), dayS / 2, 60, () => relays);
  const idle = dayOf({});
  const airC = (world: yard.World): number => yard.houseWorld(world, 'long-house').airC;

  test("the heap's fan warms the house and cools the base", () => {
    const drawn = dayOf({ 'LH-1': { '1': 'on' } });
    expect(airC(drawn)).toBeGreaterThan(airC(idle) + 3);
    expect(yard.houseWorld(drawn, 'long-house').heap.baseC).toBeLessThan(
      yard.houseWorld(idle, 'long-house').heap.baseC - 5,
    );
  });

  test('the vent cools the house, and mat and ground tubes warm it', () => {
    expect(airC(dayOf({ 'LH-1': { '4': 'on' } }))).toBeLessThan(airC(idle) - 1);
    expect(airC(dayOf({ 'LH-1': { '3': 'on' } }))).toBeGreaterThan(airC(idle) + 1);
    expect(airC(dayOf({ 'LH-1': { '2': 'on' } }))).toBeGreaterThan(airC(idle) + 0.5);
  });

  test("nothing in one house is moved by another's relays", () => {
    expect(yard.houseWorld(dayOf({ 'PH-1': { '1': 'on' } }), 'long-house')).toEqual(
      yard.houseWorld(idle, 'long-house'),
    );
  });
});

describe('a heap', () => {
  const hardDrawn = (world: yard.World): yard.YardRelays => {
    const air = yard.houseWorld(world, 'long-house').airC;
    return { 'LH-1': { '1': air < 10.5 ? 'on' : 'off' } };
  };

  test('drawn upon at 9 to 12 °C without a rest passes its tipping point within four weeks', () => {
    const after = run(yard.createWorld(7, start), 28 * dayS, 60, hardDrawn);
    expect(yard.houseWorld(after, 'long-house').heap.coreC).toBeLessThan(25);
  });

  test('that is fed and turned is warmer ten days later than one that is not', () => {
    const tired = run(yard.createWorld(7, start), 12 * dayS, 60, hardDrawn);
    const feed = { massKg: 400, moisture: 0.6, digestibleJPerKgDry: 4.5e6, tempC: 6 };
    const helped = yard.turnHeap(yard.feedHeap(tired, 'long-house', feed), 'long-house');
    const core = (world: yard.World): number => yard.houseWorld(world, 'long-house').heap.coreC;
    expect(core(helped)).toBeLessThan(core(tired));
    expect(core(run(helped, 10 * dayS, 60, () => ({})))).toBeGreaterThan(
      core(run(tired, 10 * dayS, 60, () => ({}))),
    );
  });
});

describe('sensors', () => {
  const world = run(yard.createWorld(7, start), 3600, 60, allOn);
  const shown = Object.fromEntries(
    sensorReadings(world, 'long-house', world.ms).map(({ key, value }) => [key, value]),
  );

  test('show the truth to a few tenths', () => {
    const truth = yard.houseWorld(world, 'long-house');
    expect(Math.abs((shown['house-air'] ?? 99) - truth.airC)).toBeLessThan(0.35);
    expect(Math.abs((shown['gate-core'] ?? 99) - truth.heap.coreC)).toBeLessThan(0.5);
  });

  test('move in their own steps', () => {
    expect(((shown['bench-1'] ?? 0.01) / 0.0625) % 1).toBe(0);
  });

  test('see the current of the fan that runs, and none of one that stands', () => {
    expect(shown['fan-amps']).toBeGreaterThan(0.4);
    const still = yard.stepWorld(world, {}, 60);
    const amps = sensorReadings(still, 'long-house', still.ms).find(({ key }) => key === 'fan-amps')?.value;
    expect(amps).toBeLessThan(0.05);
  });

  test('say the same when asked again of the same moment', () => {
    expect(sensorReadings(world, 'prop-house', world.ms)).toEqual(
      sensorReadings(world, 'prop-house', world.ms),
    );
  });

  test('are not frozen: a bench probe at rest still flickers', () => {
    const values = Array.from(
      { length: 60 },
      (_, i) =>
        sensorReadings(world, 'long-house', world.ms + i * 30_000).find(({ key }) => key === 'bench-1')
          ?.value,
    );
    expect(new Set(values).size).toBeGreaterThan(1);
  });
});
