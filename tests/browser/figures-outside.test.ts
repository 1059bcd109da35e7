// What a night says of a source is reckoned again as anybody would who has only the files: runs and readings.
import { DateTime } from 'luxon';
import type { BrowserContext } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import { nightsTold } from '../support/shown-figures';
import { ownersPages } from './owners-pages';

let owner: BrowserContext;
ownersPages((opened) => ({ owner } = opened));

type Row = Record<string, string>;

async function fileOf(path: string): Promise<Row[]> {
  const answer = await owner.request.get(`/api/v1/houses/long-house/export/${path}`);
  expect(answer.status()).toBe(200);
  const [heads = [], ...rows] = (await answer.text())
    .trim()
    .split('\r\n')
    .map((line) => line.split(','));
  return rows.map((row) => Object.fromEntries(heads.map((head, i) => [head, row[i] ?? ''])));
}

interface Line {
  at: number;
  intake: number;
  gain: number;
}

/** Straight lines between the times at which both ends were read. */
function linesOf(readings: readonly Row[], intake: string, back: string): Line[] {
  return readings.flatMap((row): Line[] => {
    const [cold, warm] = [row[`${intake}_Cel`], row[`${back}_Cel`]];
    if (!cold || !warm || row[`${intake}_quality`] !== 'good' || row[`${back}_quality`] !== 'good') return [];
    return [{ at: Date.parse(row['at'] ?? ''), intake: Number(cold), gain: Number(warm) - Number(cold) }];
  });
}

/**
 * kWh that the air of a run carried: ρ V̇ c_p ΔT. Pressure by the standard atmosphere (ICAO Doc 7488, from memory), dry air of
 * 287.042 J/(kg K) (ASHRAE Fundamentals, from memory) and 1006 J/(kg K).
 */
function heatOf(run: Row, lines: readonly Line[]): number {
  const pressure = 101_325 * (1 - 2.25577e-5 * Number(run['altitude_m'])) ** 5.25588;
  const flow = Number(run['flow_L_per_s']) / 1000;
  const [from, to] = [Date.parse(run['from'] ?? ''), Date.parse(run['to'] ?? '')];
  let joule = 0;
  lines.slice(1).forEach((end, i) => {
    const start = lines[i] ?? end;
    const [begin, finish] = [Math.max(start.at, from), Math.min(end.at, to)];
    if (finish <= begin) return;
    const along = (at: number, of: (line: Line) => number) =>
      of(start) + ((of(end) - of(start)) * (at - start.at)) / (end.at - start.at);
    const mean = (of: (line: Line) => number) => (along(begin, of) + along(finish, of)) / 2;
    const density = pressure / (287.042 * (273.15 + mean((line) => line.intake)));
    joule += (density * flow * 1006 * mean((line) => line.gain) * (finish - begin)) / 1000;
  });
  return joule / 3_600_000;
}

describe.each([
  ['gate-heap', 'gate-heap-fan'],
  ['ground-tubes', 'ground-fan'],
])('The nights of %s', (source, channel) => {
  it('are what the files of its runs and readings make, to the last digit', async () => {
    // the last one is not over
    const nights = (await nightsTold(owner, 'long-house', source)).slice(-5, -1);
    expect(nights.length).toBe(4);
    for (const night of nights) {
      const noon = DateTime.fromISO(`${night.night}T12:00`, { zone: 'Europe/London' });
      const next = noon.plus({ days: 1 });
      const [from, to] = [noon, next].map((at) => at.toUTC().toISO());
      const runs = (await fileOf(`runs?from=${from}&to=${to}`)).filter(
        (run) => run['key'] === channel && run['load'] === 'on',
      );
      const [first] = runs;
      const [intake = '', back = ''] = [first?.['intake'], first?.['return']];
      const [early, late] = [noon.minus({ minutes: 15 }), next.plus({ minutes: 15 })].map((at) =>
        at.toUTC().toISO(),
      );
      const asked = `readings?points=${intake},${back}&from=${early}&to=${late}`;
      const readings = first === undefined ? [] : await fileOf(asked);
      const lines = linesOf(readings, intake, back);
      const seconds = runs.reduce((sum, run) => sum + Number(run['seconds']), 0);
      const heat = runs.reduce((sum, run) => sum + heatOf(run, lines), 0);
      const kWh = (seconds * Number(first?.['power_W'] ?? 0)) / 3_600_000;
      // nights are told in whole seconds
      expect({ seconds: Math.round(seconds), heat: heat.toFixed(3), electricity: kWh.toFixed(4) }).toEqual({
        seconds: night.onSeconds,
        heat: (night.heat?.kWh ?? 0).toFixed(3),
        electricity: (night.electricity?.kWh ?? 0).toFixed(4),
      });
    }
  });
});
