// Every figure on a page agrees with every other on it, with the file and with the interface. What a night in progress says
// grows meanwhile, so pages and interface are read again until both were read in the same minute.
import type { BrowserContext, Page } from 'playwright-core';
import { describe, expect, it, vi } from 'vitest';
import type { NightAnswer } from '@/lib/analysis/night-answer';
import { count, decimal, energy, share, temperature } from '@/lib/units/format';
import { USUAL } from '@/lib/units/preferences';
import { duration } from '@/lib/units/time';
import { figuresIn, nightsTold, plain } from '../support/shown-figures';
import { ownersPages } from './owners-pages';

const AGREE = { timeout: 50_000, interval: 300 };
const SOURCES = [
  ['long-house', 'gate-heap'],
  ['long-house', 'ground-tubes'],
  ['long-house', 'bench-mat'],
  ['prop-house', 'yew-heap'],
] as const;

let owner: BrowserContext;
let page: Page;

ownersPages((opened) => ({ owner, page } = opened));

const nightsOf = (house: string, source: string) => nightsTold(owner, house, source);
/** The file's rows, newest last, by head. */
async function fileOf(house: string, source: string): Promise<Record<string, string>[]> {
  const answer = await owner.request.get(
    `/api/v1/houses/${house}/nights?format=csv&source=${source}&limit=500`,
  );
  const [heads = [], ...rows] = (await answer.text())
    .trim()
    .split('\r\n')
    .map((line) => line.split(','));
  return rows.map((row) => Object.fromEntries(heads.map((head, i) => [head, row[i] ?? '']))).reverse();
}

const add = (nights: NightAnswer[], of: (night: NightAnswer) => number) =>
  nights.reduce((sum, night) => sum + of(night), 0);
const fixed = (value: number, places: number) => Math.round(value * 10 ** places) / 10 ** places;
const clockIn = (iso: string) => iso.slice(11, 16);
const lowestWords = (night: NightAnswer) =>
  night.lowest === null
    ? 'not read'
    : `${temperature(night.lowest.value, USUAL)}, ${clockIn(night.lowest.at)}`;

describe.each(SOURCES)('The nights of %s, %s', (house, source) => {
  const duty = `/${house}/duty?source=${source}`;

  it('stand in the rows of Duty as the interface and the file tell them', async () => {
    await vi.waitFor(async () => {
      await page.goto(duty);
      const rows = await page.locator('tbody tr:has(th a)').all();
      const shown = await Promise.all(
        rows.map(async (row) => (await row.locator('td:not(:has(svg))').allInnerTexts()).map(plain)),
      );
      const file = await fileOf(house, source);
      const nights = await nightsOf(house, source);
      const hasHeat = nights.some((night) => night.heat !== null);
      const figure = (celsius: number | undefined) =>
        celsius === undefined ? 'not known' : decimal(celsius, 1);
      expect(shown.map((cells) => cells.map((text) => text.replace(' under the frost limit', '')))).toEqual(
        nights.map((night, i) =>
          [
            share(night.dutyOfNight),
            ...(hasHeat ? [night.heat === null ? 'not known' : decimal(night.heat.kWh, 1)] : []),
            String(night.starts),
            figure(night.lowest?.value),
            figure(file[i]?.['outdoors_lowest_C'] ? Number(file[i]['outdoors_lowest_C']) : undefined),
          ].map(plain),
        ),
      );
      expect(nights.length).toBeGreaterThanOrEqual(7);
    }, AGREE);
  });

  it('are in the file to the last figure what they are in the interface', async () => {
    const file = (await fileOf(house, source)).slice(0, -1);
    const nights = (await nightsOf(house, source)).slice(0, -1);
    expect(
      file.map((row) => ({
        night: row['night'],
        source: row['source'],
        hours: Number(row['hours_h']),
        onSeconds: Number(row['on_s']),
        restSeconds: Number(row['rest_s']),
        dutyOfNight: Number(row['duty_of_night']),
        starts: Number(row['starts']),
        heat: row['heat_kWh'] ? { kWh: Number(row['heat_kWh']), sd: Number(row['heat_sd_kWh']) } : null,
        lowest: row['lowest_C']
          ? { point: row['lowest_point'], value: Number(row['lowest_C']), at: row['lowest_at'] }
          : null,
        coverage: Number(row['coverage']),
      })),
    ).toEqual(
      nights.map(({ night, source: of, hours, onSeconds, restSeconds, dutyOfNight, ...rest }) => {
        const { starts, heat, lowest, coverage } = rest;
        return {
          ...{ night, source: of, hours, onSeconds, restSeconds, dutyOfNight },
          ...{ starts, heat, lowest, coverage },
        };
      }),
    );
  });

  it('add up to what stands together, and to the sentence', async () => {
    await vi.waitFor(async () => {
      await page.goto(duty);
      const nights = await nightsOf(house, source);
      const on = add(nights, (night) => night.onSeconds);
      const long = (s: number) => (s < 48 * 3600 ? duration(s) : `${decimal(s / 3600, 0)} h`);
      const together = await figuresIn(page, /^Together$/);
      expect(together['Ran']).toBe(
        plain(
          `${long(on)}, ${count(
            add(nights, (n) => n.starts),
            'start',
          )}`,
        ),
      );
      expect(together['Rested']).toBe(plain(long(add(nights, (night) => night.restSeconds))));
      const warm = nights.flatMap(({ heat }) => (heat === null ? [] : [heat]));
      if (warm.length > 0) {
        // as the file has it: who adds its column up and rounds once gets the total
        const kWh = fixed(
          warm.reduce((sum, heat) => sum + heat.kWh, 0),
          3,
        );
        const sd = warm.reduce((sum, heat) => sum + heat.sd, 0);
        expect(together['Heat']).toBe(plain(energy(kWh, 1, sd)));
      }
      const electricity = fixed(
        add(nights, (night) => night.electricity?.kWh ?? 0),
        4,
      );
      expect(together['Electricity']).toBe(plain(energy(electricity, 3)));
      const least = Math.min(...nights.map((night) => night.lowest?.value ?? Infinity));
      expect(together['Lowest in the house']).toContain(`${plain(temperature(least, USUAL))}, `);
      const said = plain(await page.getByRole('heading', { level: 1 }).innerText());
      const ran = share(on / add(nights, (night) => night.hours * 3600));
      expect(said).toContain(on === 0 ? 'did not run' : `ran ${plain(ran)} of the time`);
      const foot = await page.locator('tfoot td').first().innerText();
      expect(plain(foot)).toBe(plain(ran));
    }, AGREE);
  });

  it.each([
    ['the last whole night', -2],
    ['the night in progress', -1],
  ])('are opened with the same figures: %s', async (_, place) => {
    await vi.waitFor(async () => {
      const name = (await nightsOf(house, source)).at(place)?.night ?? '';
      await page.goto(`${duty}&night=${name}`);
      const shown = await figuresIn(page, /^The night of/);
      const night = (await nightsOf(house, source)).at(place);
      if (night === undefined) throw new Error('no night is told');
      const { heat, electricity } = night;
      expect(shown).toMatchObject({
        Ran: plain(`${duration(night.onSeconds)}, ${count(night.starts, 'start')}`),
        Rested: plain(duration(night.restSeconds)),
        'Lowest in the house': plain(lowestWords(night)),
        Read: plain(`${share(night.coverage, 1)} of what was to be read`),
        ...(heat === null ? {} : { Heat: plain(energy(heat.kWh, 1, heat.sd)) }),
        ...(electricity === null ? {} : { Electricity: plain(energy(electricity.kWh, 3)) }),
      });
    }, AGREE);
  });

  it('are drawn as long as they ran', async () => {
    await page.goto(duty);
    // strokes of the runs, and boxes of what was on by hand, in seconds
    const drawn = await page.locator('tbody tr:has(th a)').evaluateAll((rows) =>
      rows.map((row) => {
        const paths = row.querySelectorAll('path[class~="stroke-ember"], path[class*="fill-ember"]');
        const lengths = [...paths].flatMap((path) =>
          [...(path.getAttribute('d') ?? '').matchAll(/h(\d+)/g)].map((match) => Number(match[1])),
        );
        return lengths.reduce((sum, seconds) => sum + seconds, 0);
      }),
    );
    const nights = await nightsOf(house, source);
    expect(drawn).toHaveLength(nights.length);
    for (const [i, night] of nights.slice(0, -1).entries())
      // each end of a run is a whole second
      expect(Math.abs((drawn[i] ?? -1) - night.onSeconds), night.night).toBeLessThanOrEqual(1 + night.starts);
  });
});
