import { describe, expect, it } from 'vitest';
import { isFitted } from '@/lib/analysis/rest-fit';
import { nightsBetween } from '@/lib/analysis/night';
import type { NightInput } from '@/lib/analysis/nights';
import { recoveryWeeks } from '@/lib/analysis/recovery-weeks';
import type { Reading, Series } from '@/lib/analysis/series';
import { summarise } from '@/lib/analysis/summarise';
import { pressureAtAltitude } from '@/lib/physics/air';
import { loopFlow } from '@/lib/physics/loop';
import { yardHouse } from '@/worker/yard/catalogue';
import { sensorReadings } from '@/worker/yard/sensors';
import { createWorld, houseWorld, stepWorld, type World } from '@/worker/yard/world';

const zone = 'Europe/London';
const nights = nightsBetween(Date.parse('2026-11-05T13:00:00Z'), Date.parse('2026-12-14T13:00:00Z'), zone);
const [begin, end] = [nights[0]?.from ?? 0, nights.at(-1)?.to ?? 0];
const STEP_S = 30;

interface Winter {
  /** kWh of each night that the yard's own air brought into the house. */
  truthKWh: number[];
  points: Map<string, Series>;
  decisions: NightInput['channels'][number]['record']['decisions'];
}

/** The yard alone, drawn upon by a two-position band with draws of 40 min and rests of 40: no controller of ours in it. */
function winter(key: string): Winter {
  const place = yardHouse(key);
  const loop = { ...place.heapFan, pressurePa: pressureAtAltitude(place.altitudeM) };
  const lines = new Map<string, Reading[]>(place.points.map((point) => [point.key, []]));
  const truthKWh = nights.map(() => 0);
  const decisions: Winter['decisions'] = [];
  let world: World = createWorld(20_261_105, begin);
  let on = false;
  let since = begin;
  let night = 0;
  for (let at = begin; at < end; at += STEP_S * 1000) {
    for (const { key: point, value } of sensorReadings(world, key, at)) lines.get(point)?.push({ at, value });
    const { airC, heap } = houseWorld(world, key);
    const drawn = (at - since) / 60_000;
    const next: boolean = on ? airC < 7.5 && drawn < 40 : airC < 4 && drawn >= 40;
    if (next !== on) {
      [on, since] = [next, at];
      decisions.push({ at, state: on ? 'on' : 'off', claim: on ? 'band' : 'rest' });
    }
    while (at >= (nights[night]?.to ?? Infinity)) night += 1;
    const before = on ? loopFlow(loop, airC, heap.baseC).intoHouseW : 0;
    world = stepWorld(world, { [place.node]: { [place.heapFan.relay]: on ? 'on' : 'off' } }, STEP_S);
    const then = houseWorld(world, key);
    const after = on ? loopFlow(loop, then.airC, then.heap.baseC).intoHouseW : 0;
    truthKWh[night] = (truthKWh[night] ?? 0) + (((before + after) / 2) * STEP_S) / 3_600_000;
  }
  const roles: Record<string, string> = {
    'house-air': 'house-air',
    'bench-1': 'bench',
    outdoors: 'outdoors',
  };
  const points = new Map(
    [...lines].map(([point, good]) => [
      point,
      { key: point, name: point, role: roles[point] ?? 'other', holdS: 90, sd: 0.5 / Math.sqrt(3), good },
    ]),
  );
  return { truthKWh, points, decisions };
}

const { truthKWh, points, decisions } = winter('long-house');
const place = yardHouse('long-house');
const summaries = nights.map((night) =>
  summarise({
    night,
    nowMs: end,
    house: { zone, latitude: 54.2, longitude: -2.3, altitudeM: place.altitudeM, frostLimitC: 3 },
    source: { slug: 'gate-heap', core: 'gate-core', base: 'gate-base' },
    channels: [
      {
        ...{ number: 1, label: 'Gate-heap fan', powerW: place.heapFan.fanW },
        flow: { m3PerS: place.heapFan.flowM3PerS, sdM3PerS: 0.004, from: 'measured' },
        loop: { intake: 'loop-intake', return: 'loop-return' },
        runProof: { point: 'fan-amps', above: 0.2 },
        record: { decisions, reports: [], trips: [], silences: [], stood: [], safe: 'off' },
      },
    ],
    points: new Map(
      [...points].map(([key, one]) => [
        key,
        { ...one, good: one.good.filter(({ at }) => at >= night.from - 900_000 && at < night.to) },
      ]),
    ),
  }),
);
const total = (of: (night: (typeof summaries)[number]) => number) =>
  summaries.reduce((sum, one) => sum + of(one), 0);

describe('the energy of a simulated winter', () => {
  it('lies within the stated deviation of what the yard itself moved', () => {
    const truth = truthKWh.reduce((sum, one) => sum + one, 0);
    const [told, sd] = [total((night) => night.heat?.kWh ?? 0), total((night) => night.heat?.sd ?? 0)];
    expect(truth).toBeGreaterThan(30);
    expect(
      Math.abs(told - truth),
      `${told.toFixed(1)} ± ${sd.toFixed(1)} against ${truth.toFixed(1)} kWh`,
    ).toBeLessThan(sd);
    // and the deviation is of use: a fifth at most
    expect(sd / told).toBeLessThan(1 / 5);
  });

  it('lies there in each of its nights that drew', () => {
    const out = summaries.filter((night, i) => {
      const { kWh, sd } = night.heat ?? { kWh: 0, sd: 0 };
      return Math.abs(kWh - (truthKWh[i] ?? 0)) > sd;
    });
    expect(out.map((night) => night.night)).toEqual([]);
  });

  it('was all proved by the clamp on the fan', () => {
    const drew = summaries.filter((night) => night.onSeconds > 0);
    expect(drew.length).toBeGreaterThan(20);
    expect(drew.filter((night) => night.heat?.assumedRunning)).toEqual([]);
    expect(total((night) => night.channels[0]?.standingSeconds ?? 0)).toBe(0);
  });
});

describe('the recovery of the simulated heap', () => {
  // its base: 0.16 MJ/K between a core at 90 W/K and the ground at 5 W/K
  const trueTauS = place.heap.baseJPerK / (place.heap.coreBaseWPerK + place.heap.groundWPerK);

  it('is found within 3 % in every week that tells it', () => {
    const weeks = recoveryWeeks(summaries).filter((week) => week.recovery !== null);
    expect(weeks.length).toBeGreaterThanOrEqual(4);
    for (const { recovery } of weeks)
      expect(Math.abs((recovery?.tau.value ?? 0) / trueTauS - 1)).toBeLessThan(0.03);
  });

  it('has a curve for most rests that were drawn into being', () => {
    const rests = summaries.flatMap((night) => night.rests);
    expect(rests.filter(isFitted).length / rests.length).toBeGreaterThan(0.8);
  });
});
