// A day without a line. Its hours pass in minutes by the `rate` of the welcome, for which intervals are that much shorter; of a
// node whose stamps do not follow it nothing can be said in that time, and nothing is.
import { performance } from 'node:perf_hooks';
import { Broken, LeftOut, seconds } from './bench.mjs';
import { measuring, recordsOf } from './readings.mjs';

const DAY_S = 86_400;
/** What a node is asked for unless somebody chose another interval. */
const REPORT_S = 30;
const LOOK_MS = 5000;
/**
 * A busy machine may stand still for so long, real s: what is then not taken is no hole in what was kept. At two minutes a day
 * these are an hour of it; a longer --day looks closer.
 */
const STALL_S = 5;
/** Who sends nothing more of the day for so long has nothing more, real ms. */
const DONE_MS = 20_000;

/** Stamps of each point, the oldest first. */
function stampsOf(bench, line) {
  const byName = new Map();
  for (const { n, t } of recordsOf(bench, line)) byName.set(n, (byName.get(n) ?? new Set()).add(t));
  return new Map([...byName].map(([name, stamps]) => [name, [...stamps].sort((a, b) => a - b)]));
}

/** Lets a node off whose clock goes by itself, or whose sensors are slower than a day in so few minutes asks for. */
async function follows(bench, line) {
  await bench.pause(LOOK_MS);
  const records = recordsOf(bench, line);
  const { n } = records.at(-1) ?? {};
  const own = records.filter((one) => one.n === n);
  const spanS = (own.at(-1)?.t ?? 0) - (own[0]?.t ?? 0);
  const realS = ((own.at(-1)?.at ?? 0) - (own[0]?.at ?? 0)) / 1000;
  const rate = Math.round(bench.rate);
  if (!(spanS > 0.7 * bench.rate * realS && spanS < 1.4 * bench.rate * realS))
    throw new LeftOut(
      `not checked: its stamps do not follow a welcome of rate ${rate}, so a day would take a day`,
    );
  const asked = spanS / REPORT_S + 1;
  const came = new Set(own.map(({ t }) => t)).size;
  if (came < 0.8 * asked)
    throw new LeftOut(
      `not checked: it took ${came} of ${Math.round(asked)} readings at rate ${rate}; give it longer with --day`,
    );
}

/** Waits for as long as more of the time between comes. @returns stamps by point, of that time alone */
async function between(bench, line, names, from, to, isEnough) {
  const inside = () => {
    const all = stampsOf(bench, line);
    return new Map(names.map((name) => [name, (all.get(name) ?? []).filter((t) => t > from && t < to)]));
  };
  for (let [many, since] = [-1, performance.now()]; ;) {
    const found = inside();
    const now = [...found.values()].reduce((sum, { length }) => sum + length, 0);
    if (now !== many) [many, since] = [now, performance.now()];
    if (isEnough(found) || performance.now() - since > DONE_MS) return found;
    await bench.pause(200);
  }
}

/** The longest time without a stamp, s of app time, and where it ends. */
function holeOf(stamps, from, to) {
  const all = [from, ...stamps, to];
  const holes = all.slice(1).map((till, before) => ({ till, s: till - all[before] }));
  return holes.reduce((one, other) => (other.s > one.s ? other : one));
}

export const day = [
  {
    promise: 'what was measured in 24 h without a line is kept, and comes when there is one',
    isSlow: true,
    look: async (bench) => {
      await measuring(bench);
      const dayMs = bench.settings.day * 60_000;
      bench.reportS = REPORT_S;
      const fast = await bench.again({ rate: Math.max(bench.rate, (DAY_S * 1000) / dayMs) });
      await follows(bench, fast);
      const names = [...stampsOf(bench, fast).keys()];
      const most = 3 * REPORT_S + STALL_S * bench.rate;
      const cutAt = bench.now();
      const line = await bench.again({ closedForMs: dayMs, rate: bench.settings.rate });
      // it may have been away for longer, and need not keep more than a day
      const to = line.welcomedAt;
      const from = Math.max(cutAt, to - DAY_S);
      const isWhole = (stamps) => holeOf(stamps, from, to).s <= most;
      const found = await between(bench, line, names, from, to, (all) => [...all.values()].every(isWhole));
      for (const [name, stamps] of found) {
        if (!isWhole(stamps)) {
          const hole = holeOf(stamps, from, to);
          throw new Broken(
            `of ${hoursOf(to - cutAt)} without a line ${name} has a hole of ${hoursOf(hole.s)}, to ${hoursOf(to - hole.till)} before its end`,
          );
        }
        const asked = Math.round((to - from) / REPORT_S);
        if (stamps.length < asked / 2)
          throw new LeftOut(
            `not checked: it took ${stamps.length} readings of ${name} in ${seconds(dayMs)} where a day has ${asked}; give it longer with --day`,
          );
      }
    },
  },
];

const hoursOf = (s) => `${Math.round(s / 360) / 10} h`;
