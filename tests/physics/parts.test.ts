import { describe, expect, test } from 'vitest';
import { undisturbedC } from '@/lib/physics/ground';
import { coreJPerK, fed, moistureActivity, temperatureActivity, turned, type Heap } from '@/lib/physics/heap';
import { conductionWPerK, infiltrationWPerK, steadyC } from '@/lib/physics/house';
import { advance, approach } from '@/lib/physics/integrate';
import { effectiveness, loopFlow, ntuOf } from '@/lib/physics/loop';
import { celsius, squareMetres, wattsPerSquareMetreKelvin, cubicMetres } from '@/lib/units/conversion';
import * as checks from '../checks/physics';

const near = (value: number, expected: number, by: number): void => {
  expect(Math.abs(value - expected)).toBeLessThanOrEqual(by);
};

describe('activity of a heap', () => {
  test('by temperature is the published vector', () => {
    checks.cardinalPublished.activity.forEach((activity, index) => {
      near(temperatureActivity(index + 1, checks.cardinalPublished.cardinal), activity, 1e-7);
    });
  });
  test.each(checks.cardinalCompost)('at %d °C is %d, and nothing outside its limits', (tempC, activity) => {
    near(temperatureActivity(tempC, { leastC: 5, bestC: 59, mostC: 82 }), activity, 1e-5);
  });
  test.each(checks.moistureActivities)('at a moisture of %d is %d', (moisture, activity) => {
    near(moistureActivity(moisture), activity, 1e-3);
  });
});

describe('work on a heap', () => {
  const heap: Heap = {
    coreShare: 0.9,
    baseJPerK: 160_000,
    coreBaseWPerK: 90,
    airWPerK: 10.5,
    groundWPerK: 5,
    spendPerS: 1.1e-7,
    cardinal: { leastC: 5, bestC: 58, mostC: 80 },
  };
  const state = { coreC: 55, baseC: 45, digestibleJ: 8e9, shellJ: 2e9, massKg: 5500, moisture: 0.55 };

  test('feeding conserves heat and adds what is digestible in the dry matter', () => {
    const feed = { massKg: 400, moisture: 0.6, digestibleJPerKgDry: 4.5e6, tempC: 5 };
    const after = fed(heap, state, feed);
    const added = coreJPerK(heap, after) - coreJPerK(heap, state);
    near(coreJPerK(heap, after) * after.coreC, coreJPerK(heap, state) * state.coreC + added * feed.tempC, 1);
    near(after.digestibleJ - state.digestibleJ, 400 * 0.4 * 4.5e6, 1);
    expect(after.coreC).toBeLessThan(state.coreC);
  });

  test('turning evens out core and base, cools both and brings the shell into reach, making no energy', () => {
    const after = turned(state, -4);
    expect(after.baseC).toBe(after.coreC);
    expect(after.coreC).toBeLessThan(state.coreC);
    expect(after.digestibleJ).toBeGreaterThan(state.digestibleJ);
    near(after.digestibleJ + after.shellJ, state.digestibleJ + state.shellJ, 1e-3);
  });
});

describe('a loop', () => {
  test.each(checks.effectivenesses)('of %d transfer units has an effectiveness of %d', (ntu, share) => {
    near(effectiveness(ntu), share, 1e-5);
    near(ntuOf(effectiveness(ntu)), ntu, 1e-9);
  });

  // Trade figures, recomputed: a rise of 10 °F from a core of 110 °F with air entering at 45 °F.
  test("has the trade's effectiveness of 0.154 where a smooth tube would have 0.62", () => {
    const share = 10 / (110 - 45);
    near(share, 0.1538, 1e-4);
    near(ntuOf(share), 0.1671, 1e-4);
  });

  // Energy balance: 12 W in 90 cfm at sea level, 20 °C.
  test('warms its air by 0.233 K by the fan alone where the medium is as warm as the air', () => {
    const flow = loopFlow({ flowM3PerS: 0.042475, pipeWPerK: 0, fanW: 12, pressurePa: 101325 }, 20, 20);
    near(flow.returnC - 20, 0.233, 0.002);
    near(flow.fromMediumW, 0, 1e-9);
  });

  test('gives the house what the air brings back, heap and fan together', () => {
    const flow = loopFlow({ flowM3PerS: 0.0425, pipeWPerK: 45, fanW: 12, pressurePa: 97_700 }, 5, 48);
    near(flow.intoHouseW, flow.capacityWPerK * (flow.returnC - 5), 1e-6);
  });

  test('shows a loop that cools the house as negative', () => {
    const flow = loopFlow({ flowM3PerS: 0.06, pipeWPerK: 60, fanW: 20, pressurePa: 97_700 }, 24, 9);
    expect(flow.intoHouseW).toBeLessThan(0);
  });
});

describe('heat loss of a house', () => {
  // Made from ASABE EP406 and extension bulletins' method: even span, 20 × 10 ft, U 0.7, one change an hour,
  // 50 °F of difference, exact infiltration constant 0.018: 22 964 + 1440 Btu/h.
  test('of 20 by 10 ft under double film is 7.15 kW at 50 °F of difference', () => {
    const walls = conductionWPerK([
      { areaM2: squareMetres(656.12), uWPerM2K: wattsPerSquareMetreKelvin(0.7) },
    ]);
    const cracks = infiltrationWPerK(cubicMetres(1600), 1, 1.2014);
    near((walls + cracks) * (50 / 1.8), 24_404 * 0.29307107, 15);
  });

  // Steady balance, exact: 972 Btu/h over 60.75 Btu/(h·°F) from 25 °F gives 41 °F.
  test('settles at 41 °F with 972 Btu/h, 60.75 Btu/(h·°F) and 25 °F outdoors', () => {
    const btu = 0.29307107;
    near(steadyC(celsius(25), 972 * btu, 60.75 * btu * 1.8), celsius(41), 1e-9);
  });
});

describe('the ground', () => {
  test.each(checks.kusuda.byDepthM)('at %d m follows the year as published', (depthM, temps) => {
    checks.kusuda.days.forEach((day, index) => {
      near(undisturbedC(checks.kusuda.place, depthM, day), temps[index] ?? Number.NaN, 1e-3);
    });
  });

  test('at 2 m is 6.47 °C on the coldest day, not the 4.77 °C of the form without lag', () => {
    near(undisturbedC(checks.kusuda.place, 2, 35), 6.4672, 1e-3);
  });
});

describe('steps in time', () => {
  // First-order lag: from 45 to 35 °F with 20 °F outdoors and a time constant of an hour, 0.5108 h.
  test('follow a first-order lag to its closed form', () => {
    const cooled = advance([45], 0, 0.5108 * 3600, ([temp = 0]) => [(20 - temp) / 3600]);
    near(cooled[0] ?? 0, 35, 1e-3);
    near(approach(45, 20, 0.5108 * 3600, 3600), 35, 1e-3);
  });

  test('of 1, 10 and 60 s end within a millionth of a kelvin of each other', () => {
    const run = (dtS: number): number => {
      let state: number[] = [45];
      for (let t = 0; t < 7200; t += dtS) {
        state = advance(state, t, dtS, ([temp = 0], time) => [(20 + 5 * Math.sin(time / 5000) - temp) / 900]);
      }
      return state[0] ?? Number.NaN;
    };
    near(run(10), run(1), 1e-6);
    near(run(60), run(1), 1e-6);
  });
});
