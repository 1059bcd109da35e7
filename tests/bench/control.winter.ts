// seconds: 150 nights of the demo's Long house, noon to noon at a minute, in a closed loop as a trial replays them: a small
// model of house and heap answers what the core decides, and is in the time. perStepUs: a step of a house of 1 to 1000
// channels, each with a heap, a band and a rest of its own; perChannelUs shows whether it grows faster than the house.
// yearGrowthKiB: live memory after a simulated year over that after its first ten days, the core's own memory in it.
import { compile } from '@/lib/control/compile';
import { emptyMemory, type Memory } from '@/lib/control/memory';
import { step } from '@/lib/control/step';
import type { HouseConfig, Observed } from '@/lib/control/types';
import { demoConfig } from './demo-config';
import { quantile, round3, timeMs } from './support';

const START = Date.UTC(2026, 9, 20, 12);
const MINUTE = 60_000;
const DAY_MINUTES = 1440;
const NIGHTS = 150;

/** As a sensor gives it. */
const sensed = (value: number): number => Math.round(value * 16) / 16;

/** The demo's house at a minute: air, things, heap core and the place beside the pipe, by Euler's rule. */
class Yard {
  private readonly plan = compile(demoConfig());
  private memory: Memory = emptyMemory();
  private air = 8;
  private things = 9;
  private core = 54;
  private base = 45;
  switchings = 0;
  private readonly observed: Observed = { workerStartedAt: 0, points: {}, relays: {}, commands: [] };

  play(fromMinute: number, toMinute: number): void {
    const { points } = this.observed;
    for (let minute = fromMinute; minute < toMinute; minute += 1) {
      const now = START + minute * MINUTE;
      const { sun, outdoors } = weather(minute);
      const fan = this.memory.channels[0]?.wanted === 'on' ? 1 : 0;
      const drawn = fan * 45 * 0.6 * (this.base - this.air);
      const mat = this.memory.channels[2]?.wanted === 'on' ? 240 : 0;
      const toThings = 90 * (this.air - this.things);
      const toBase = 90 * (this.core - this.base);
      this.things += (60 * (toThings + mat)) / 2.2e6;
      this.air += (60 * (34 * (outdoors - this.air) + drawn + 800 * sun - toThings)) / 0.45e6;
      this.base += (60 * (toBase - drawn)) / 0.16e6;
      this.core += (60 * (1100 - toBase - 10.5 * (this.core - outdoors))) / 14e6;
      const values = [
        ...[this.air, this.things + 0.4, this.things - 0.6, 80, outdoors, 400 * sun, this.air],
        ...[this.air + 12 * fan, this.core, this.base, this.core - 9, 9, 10, 0.5 * fan],
      ];
      for (let place = 0; place < values.length; place += 1) {
        const seen = points[this.plan.points[place]?.id ?? ''];
        // a replay looks at one reading after another: it makes no new ones
        if (seen === undefined)
          points[this.plan.points[place]?.id ?? ''] = { value: sensed(values[place] ?? 0), at: now };
        else {
          seen.value = sensed(values[place] ?? 0);
          seen.at = now;
        }
      }
      this.observed.commands =
        minute === 0 ? [{ kind: 'ready', source: 'gate-heap', number: 1, at: now, by: 'bench' }] : [];
      const result = step(this.plan, this.memory, this.observed, now);
      this.memory = result.memory;
      for (const event of result.events) if (event.kind === 'switching') this.switchings += 1;
    }
  }

  get memoryBytes(): number {
    return JSON.stringify(this.memory).length;
  }
}

/** Cold nights and a low sun; no real year, but the same for everybody. */
function weather(minute: number): { sun: number; outdoors: number } {
  const hour = (minute / 60 + 12) % 24;
  const day = minute / DAY_MINUTES;
  const winter = Math.cos((2 * Math.PI * (day - 90)) / 365);
  return {
    sun: Math.max(0, Math.sin((Math.PI * (hour - 7)) / 10)) * (1 - 0.6 * winter),
    outdoors:
      8 - 8 * winter - 4.5 * Math.cos((2 * Math.PI * (hour - 15)) / 24 + Math.PI) + 3 * Math.sin(day * 0.7),
  };
}

export async function bench() {
  // a winter beforehand, so that nothing is left to compile
  new Yard().play(0, NIGHTS * DAY_MINUTES);
  const rounds: { ms: number; switchings: number }[] = [];
  for (let round = 0; round < 5; round += 1) {
    const yard = new Yard();
    const ms = await timeMs(() => yard.play(0, NIGHTS * DAY_MINUTES), 'cpu');
    rounds.push({ ms, switchings: yard.switchings });
  }
  const perStepUs: Record<string, number> = {};
  const perChannelUs: Record<string, number> = {};
  for (const channels of [1, 10, 100, 1000]) {
    const us = await stepUs(channels);
    perStepUs[channels] = round3(us);
    perChannelUs[channels] = round3(us / channels);
  }
  const seconds = rounds.map(({ ms }) => ms / 1000);
  return {
    seconds: round3(quantile(seconds, 0.5)),
    spread: [round3(Math.min(...seconds)), round3(Math.max(...seconds))],
    steps: NIGHTS * DAY_MINUTES,
    switchings: rounds[0]?.switchings,
    perStepUs,
    perChannelUs,
    ...year(),
  };
}

/** Processor time of a step at a pack of all points, median of rounds. */
async function stepUs(channels: number): Promise<number> {
  const plan = compile(houseOf(channels));
  const packs = Math.max(20, Math.ceil(20_000 / channels));
  let memory = emptyMemory();
  let now = START;
  const observed: Observed = { workerStartedAt: 0, points: {}, relays: {}, commands: [] };
  const play = () => {
    for (let pack = 0; pack < packs; pack += 1) {
      now += 30_000;
      for (let place = 0; place < plan.points.length; place += 1) {
        const about = place % 3 === 0 ? 5.5 : place % 3 === 1 ? 50 : 43;
        const value = about + 2.4 * Math.sin(now / 4.1e6 + place);
        observed.points[plan.points[place]?.id ?? ''] = { value: sensed(value), at: now };
      }
      memory = step(plan, memory, observed, now).memory;
    }
  };
  play();
  play();
  const ms: number[] = [];
  for (let round = 0; round < 7; round += 1) ms.push(await timeMs(play, 'cpu'));
  return (1000 * quantile(ms, 0.5)) / packs;
}

/** A house of so many fans, each as the demo's, with a heap of its own. */
function houseOf(channels: number): HouseConfig {
  const demo = demoConfig();
  const [channel, rule, source] = [demo.channels[0], demo.rules[0], demo.sources[0]];
  const [bench, core, base] = ['bench-1', 'gate-core', 'gate-base'].map((key) =>
    demo.points.find((one) => one.key === key),
  );
  if (!channel || !rule || !source || !bench || !core || !base)
    throw new Error('The demo has another shape.');
  const of = <T>(make: (place: number) => T[]): T[] =>
    Array.from({ length: channels }, (_, one) => make(one)).flat();
  const named = <T extends { id: string; key: string }>(one: T, place: number): T => ({
    ...one,
    id: `${one.id}-${place}`,
    key: `${one.key}-${place}`,
  });
  return {
    ...demo,
    loops: [],
    interlocks: [],
    points: of((place) => [bench, core, base].map((one) => named({ ...one, maxRate: null }, place))),
    sources: of((place) => [
      {
        ...source,
        id: `${source.id}-${place}`,
        slug: `${source.slug}-${place}`,
        corePoint: `${core.key}-${place}`,
        basePoint: `${base.key}-${place}`,
        ready: null,
      },
    ]),
    channels: of((place) => [
      { ...named(channel, place), number: place + 1, source: `${source.slug}-${place}`, runProof: null },
    ]),
    rules: of((place) => [
      {
        ...rule,
        id: `${rule.id}-${place}`,
        channel: `${channel.key}-${place}`,
        body: {
          ...rule.body,
          point: `${bench.key}-${place}`,
          standIns: [],
          rest: {
            longestDraw: 1200,
            least: 1800,
            most: 5400,
            until: { point: `${base.key}-${place}`, level: 43 },
            frostMayBreak: true,
          },
        },
      },
    ]),
  };
}

function year() {
  const yard = new Yard();
  yard.play(0, 10 * DAY_MINUTES);
  const before = liveKiB();
  const bytesBefore = yard.memoryBytes;
  yard.play(10 * DAY_MINUTES, 365 * DAY_MINUTES);
  const after = liveKiB();
  return {
    yearGrowthKiB: round3(after - before),
    memoryBytes: { afterTenDays: bytesBefore, afterAYear: yard.memoryBytes },
  };
}

function liveKiB(): number {
  globalThis.gc?.();
  globalThis.gc?.();
  return process.memoryUsage().heapUsed / 1024;
}
