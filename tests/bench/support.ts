// What benchmarks share. A benchmark is tests/bench/NAME.ts with `export async function bench()`, which returns the figures
// of its line; raw figures go in too, so that a reader can reckon them again.
import { startApp, type AppOptions, type RunningApp } from '../support/app';
import { makeTemplate, releaseTemplate } from '../support/cluster';

export interface Ratio {
  /** of the rounds' ratios */
  median: number;
  /** least and greatest of them */
  spread: [number, number];
  rounds: number;
  /** milliseconds of each round, in order */
  raw: { subject: number[]; baseline: number[] };
}

export type Clock = 'wall' | 'cpu';

/** One round of work; whatever it returns is thrown away. */
export type Work = () => unknown;

/**
 * Time of `subject` over time of `baseline`, in rounds that alternate A B A B: what slows the machine down for a while then
 * meets both, and the ratio of a round compares neighbours.
 * @param options.rounds at least five
 * @param options.warmUp rounds thrown away, in which code is compiled and caches are filled
 * @param options.clock `cpu`: this process's own time on all cores, where a round is reckoning alone and waits for nobody
 */
export async function ratio(
  subject: Work,
  baseline: Work,
  { rounds = 7, warmUp = 2, clock = 'wall' }: { rounds?: number; warmUp?: number; clock?: Clock } = {},
): Promise<Ratio> {
  if (rounds < 5) throw new Error('At least five rounds.');
  const raw: Ratio['raw'] = { subject: [], baseline: [] };
  for (let round = 0; round < warmUp + rounds; round += 1) {
    const subjectMs = await timeMs(subject, clock);
    const baselineMs = await timeMs(baseline, clock);
    if (round < warmUp) continue;
    raw.subject.push(subjectMs);
    raw.baseline.push(baselineMs);
  }
  const ratios = raw.subject.map((ms, round) => ms / (raw.baseline[round] ?? Number.NaN));
  return { median: round3(quantile(ratios, 0.5)), spread: spreadOf(ratios), rounds, raw };
}

export async function timeMs(work: Work, clock: Clock): Promise<number> {
  globalThis.gc?.(); // garbage of the round before is not this round's
  const startedMs = performance.now();
  const startedCpu = process.cpuUsage();
  await work();
  const { user, system } = process.cpuUsage(startedCpu);
  return clock === 'cpu' ? (user + system) / 1000 : performance.now() - startedMs;
}

function spreadOf(values: number[]): [number, number] {
  return [round3(Math.min(...values)), round3(Math.max(...values))];
}

/** The value under which a share `q` of the values lies, between neighbours in proportion. */
export function quantile(values: number[], q: number): number {
  const sorted = [...values].sort((a, b) => a - b);
  const at = (sorted.length - 1) * q;
  const low = sorted[Math.floor(at)] ?? Number.NaN;
  const high = sorted[Math.ceil(at)] ?? Number.NaN;
  return low + (high - low) * (at - Math.floor(at));
}

export const round3 = (value: number): number => Number(value.toPrecision(3));

/** The whole program for a benchmark, with its database; ended and dropped afterwards. */
export async function withApp<T>(options: AppOptions, work: (app: RunningApp) => Promise<T>): Promise<T> {
  const app = await startApp(options, await makeTemplate());
  try {
    return await work(app);
  } finally {
    await app.stop();
    await releaseTemplate();
  }
}
