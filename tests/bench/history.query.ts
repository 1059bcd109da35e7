// nightMs, yearMs: from the query to the series of a chart, four points, one reading a minute for a year; a night in steps of
// five minutes, the year in steps of an hour. overHand: the year ÷ the plainest query by hand on the roll-ups, on the same pool.
import { mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { cloneDatabase } from '../support/clone';
import { makeTemplate, releaseTemplate } from '../support/cluster';
import { quantile, ratio, round3 } from './support';

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;
const POINTS = 4;

export async function bench() {
  const cluster = await makeTemplate();
  const database = await cloneDatabase(cluster);
  // before anything that reads the environment is loaded
  process.env['DATABASE_URL'] = database.url;
  process.env['DATA_DIR'] = mkdtempSync(path.join(tmpdir(), 'middenward-bench-'));
  process.env['AUTH_SECRET'] = 'only-for-benchmarks-only-for-benchmarks-only';
  const { makeScene } = await import('../support/field-scene');
  const { closePools, everyPool, inHolding } = await import('@/db/client');
  const { makeReadingMonth, rollUp } = await import('@/db/queries/reading-write');
  const { readSeries } = await import('@/db/queries/reading');

  try {
    const { holding, houseId } = await makeScene();
    const pool = everyPool();
    const { rows } = await pool.query<{ number: string }>(
      'select number from point where house_id = $1 order by number limit $2',
      [houseId, POINTS],
    );
    const numbers = rows.map((row) => Number(row.number));
    if (numbers.length < POINTS) throw new Error(`The scene has ${numbers.length} points of ${POINTS}.`);
    const to = Math.floor(Date.now() / HOUR_MS) * HOUR_MS + 17 * 60_000;
    const from = to - 365 * DAY_MS;
    for (let at = from; at < to + 31 * DAY_MS; at += 28 * DAY_MS) await makeReadingMonth(pool, at);
    // a slow wave a day with a little roughness: what a bench probe of a sixteenth of a degree sends
    for (const [place, number] of numbers.entries())
      await pool.query(
        `insert into reading (point, at, value, quality)
         select $1, at, round(16 * (8 + $2 + 5 * sin(extract(epoch from at) / 13751) + 0.2 * sin(extract(epoch from at)))) / 16, 0
         from generate_series($3::timestamptz, $4::timestamptz - interval '1 minute', interval '1 minute') at`,
        [number, place, new Date(from), new Date(to)],
      );
    for (let at = from; at < to; at += 28 * DAY_MS)
      await rollUp(pool, numbers, at, Math.min(at + 28 * DAY_MS, to));
    await pool.query('analyze reading, rollup');

    const year = () => inHolding(holding.id, (own) => readSeries(own, numbers, from, to, 3600));
    const night = () =>
      inHolding(holding.id, (own) => readSeries(own, numbers, to - 30 * HOUR_MS, to - 6 * HOUR_MS, 300));
    const byHand = () =>
      pool.query(
        'select point, at, least, mean, greatest from rollup where point = any($1) and step_s = 3600 and at >= $2 and at < $3 order by point, at',
        [numbers, new Date(from), new Date(to)],
      );
    const { raw, ...overHand } = await ratio(year, byHand, { rounds: 9 });
    const nights = await ratio(night, byHand, { rounds: 9 });
    const steps = [...(await year()).values()].reduce((sum, series) => sum + series.at.length, 0);
    return {
      yearMs: round3(quantile(raw.subject, 0.5)),
      nightMs: round3(quantile(nights.raw.subject, 0.5)),
      overHand,
      byHandMs: round3(quantile(raw.baseline, 0.5)),
      steps,
      readings: (POINTS * (to - from)) / 60_000,
    };
  } finally {
    await closePools();
    await database.drop();
    await releaseTemplate();
  }
}
