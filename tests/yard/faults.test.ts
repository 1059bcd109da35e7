import { describe, expect, test } from 'vitest';
import { Faults, type TrainingFault } from '@/worker/yard/faults';
import { createWorld, houseWorld, stepWorld, storedJ, type World } from '@/worker/yard/world';

const readings = [
  { n: 'bench-1', u: 'Cel', v: 4 },
  { n: 'gate-core', u: 'Cel', v: 52 },
  { n: 'humidity', u: '%RH', v: 80 },
];
const fault = (kind: TrainingFault['fault'], more: Partial<TrainingFault> = {}): TrainingFault => ({
  ...{ fault: kind, point: null, other: null, relay: null, endsMs: 1000 },
  ...more,
});
const withFaults = (...all: TrainingFault[]): Faults => {
  const faults = new Faults();
  for (const one of all) faults.put(one);
  return faults;
};

describe('a fault for training changes what the node sees', () => {
  test('a dead sensor sends nothing, the others go on', () => {
    const seen = withFaults(fault('dead-sensor', { point: 'bench-1' })).readings(readings, 0);
    expect(seen.map(({ n }) => n)).toEqual(['gate-core', 'humidity']);
  });

  test('a lying probe says 85.0', () => {
    const seen = withFaults(fault('lying-85', { point: 'bench-1' })).readings(readings, 0);
    expect(seen.map(({ v }) => v)).toEqual([85, 52, 80]);
  });

  test('swapped probes send under each other’s name', () => {
    const seen = withFaults(fault('swapped-probes', { point: 'bench-1', other: 'gate-core' })).readings(
      readings,
      0,
    );
    expect(Object.fromEntries(seen.map(({ n, v }) => [n, v]))).toEqual({
      'bench-1': 52,
      'gate-core': 4,
      humidity: 80,
    });
  });

  test('a welded relay has its load on, a dead fan off, whatever the coils are', () => {
    const faults = withFaults(fault('welded-relay', { relay: 1 }), fault('dead-fan', { relay: 2 }));
    expect(faults.contacts({ '1': 'off', '2': 'on', '3': 'on' }, 0)).toEqual({
      '1': 'on',
      '2': 'off',
      '3': 'on',
    });
  });

  test('it ends by itself, and when it is ended', () => {
    const one = fault('dead-sensor', { point: 'bench-1' });
    const faults = withFaults(one);
    expect(faults.readings(readings, 999)).toHaveLength(2);
    expect(faults.readings(readings, 1000)).toHaveLength(3);
    faults.end(one);
    expect(faults.at(0)).toEqual([]);
  });

  test('switched on again it only ends later', () => {
    const one = fault('lost-link');
    expect(withFaults(one, { ...one, endsMs: 5000 }).at(2000)).toHaveLength(1);
  });
});

describe('a leak in the heap’s loop', () => {
  const start = createWorld(7, Date.UTC(2026, 11, 1, 18));
  const coils = { 'LH-1': { '1': 'on' } } as const;
  const ran = (leaks: Record<string, number>): World => {
    let world = start;
    for (let minute = 0; minute < 20; minute += 1) world = stepWorld(world, coils, 60, leaks);
    return world;
  };
  const whole = houseWorld(ran({}), 'long-house');
  const leakingWorld = ran({ 'long-house': 0.8 });
  const leaking = houseWorld(leakingWorld, 'long-house');

  test('lets the return fall under the house’s air, where a whole pipe brings it over', () => {
    expect(whole.heapReturnC - whole.airC).toBeGreaterThan(3);
    expect(leaking.heapReturnC - leaking.airC).toBeLessThan(3);
  });

  test('takes from the house what it gives outdoors: flows still add up to what is stored', () => {
    const { flowsJ } = leaking;
    const flows = Object.values(flowsJ).reduce((sum, flow) => sum + flow, 0);
    const change = storedJ(leakingWorld, 'long-house') - storedJ(start, 'long-house');
    expect(Math.abs(flows - change) / Math.abs(flowsJ.generated)).toBeLessThan(1e-6);
    expect(leaking.airC).toBeLessThan(whole.airC);
    expect(flowsJ.outdoors).toBeLessThan(whole.flowsJ.outdoors);
  });
});
