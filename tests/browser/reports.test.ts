// Money is entered and told, and a report lies on paper as it should.
import { inflateSync } from 'node:zlib';
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { accessibilityFaults, launchBrowser, signedIn } from '../support/browser';
import { sharedApp } from '../support/shared-app';
import { plain } from '../support/shown-figures';

let browser: Browser;
let context: BrowserContext;
beforeAll(async () => {
  browser = await launchBrowser();
  context = await signedIn(browser, sharedApp(), 'owner@larkmoor.example');
});
afterAll(() => browser.close());

const sentence = async (page: Page) => plain(await page.getByRole('heading', { level: 1 }).innerText());
const AT = '/long-house/money?source=gate-heap';

it('an owner enters prices and a cost, and the page tells what a kWh of heat costs', async () => {
  const page = await context.newPage();
  await page.goto(AT);
  expect(await sentence(page)).toMatch(/not known yet/);
  await page.getByLabel('Currency').fill('eur');
  await page.getByRole('button', { name: 'A tariff …' }).click();
  await page.getByLabel('From the day').fill('2020-01-01');
  await page.getByLabel('Price, EUR/kWh').fill('0,30');
  await page.getByRole('group', { name: 'Propane' }).getByLabel('Price, EUR each').fill('2.35');
  await page.getByRole('button', { name: 'Keep the prices' }).click();
  await page.getByText('The prices are kept.').waitFor();
  await page.getByLabel('Paid').fill('120');
  await page.getByRole('button', { name: 'Enter this cost' }).click();
  await page.getByText('The cost is entered.').waitFor();
  await page.reload();
  const said = await sentence(page);
  expect(said).toMatch(/a kWh of heat from the gate heap has cost \d+\.\d{3} ± \d+\.\d{3} EUR\/kWh, all in/);
  expect(said).toContain('0.300 EUR/kWh from electricity');
  await page.goto('/long-house/duty?source=gate-heap&nights=400');
  const heat = /\d+\.\d ± \d+\.\d kWh/.exec(await sentence(page))?.[0] ?? 'no heat';
  expect(said).toContain(heat);
  await page.close();
});

it.each([
  ['/long-house/money', 1400, 'light'],
  ['/long-house/money', 390, 'dark'],
  ['/long-house/reports', 1400, 'dark'],
  ['/long-house/reports', 390, 'light'],
] as const)(
  '%s at %i, %s, has nothing that axe finds and does not scroll sideways',
  async (at, width, theme) => {
    const page = await context.newPage();
    await page.emulateMedia({ colorScheme: theme });
    await page.setViewportSize({ width, height: 844 });
    await page.goto(at);
    expect(await accessibilityFaults(page)).toEqual([]);
    expect(await page.evaluate(() => document.documentElement.scrollWidth - innerWidth)).toBeLessThanOrEqual(
      0,
    );
    await page.close();
  },
);

/** Sizes of the sheets in points, as the file says them. */
const sheets = (pdf: Buffer) =>
  [...pdf.toString('latin1').matchAll(/\/MediaBox\s*\[0 0 ([\d.]+) ([\d.]+)\]/g)].map(([, width, height]) => [
    Math.round(Number(width)),
    Math.round(Number(height)),
  ]);

/** What is drawn on all sheets, as operators. */
function drawn(pdf: Buffer): string {
  const text = pdf.toString('latin1');
  return [...text.matchAll(/stream\r?\n/g)]
    .map((found) => {
      const begin = found.index + found[0].length;
      try {
        return inflateSync(pdf.subarray(begin, text.indexOf('endstream', begin))).toString('latin1');
      } catch {
        return '';
      }
    })
    .join('\n');
}

it.each([
  ['A4', [595, 842]],
  ['Letter', [612, 792]],
] as const)(
  'a week’s report is a few sheets of %s, with text and without the menus',
  async (format, size) => {
    const page = await context.newPage();
    await page.goto('/long-house/reports?span=week');
    await page.emulateMedia({ media: 'print' });
    expect(await page.getByRole('navigation').filter({ visible: true }).count()).toBe(0);
    expect(await page.getByRole('button', { name: 'Print' }).isVisible()).toBe(false);
    expect(await page.getByRole('heading', { name: /Week of/ }).isVisible()).toBe(true);
    const pdf = await page.pdf({ format });
    const found = sheets(pdf);
    expect(found.length).toBeGreaterThanOrEqual(1);
    expect(found.length).toBeLessThanOrEqual(8);
    for (const [width = 0, height = 0] of found) {
      expect(Math.abs(width - size[0])).toBeLessThanOrEqual(1);
      expect(Math.abs(height - size[1])).toBeLessThanOrEqual(1);
    }
    expect(drawn(pdf).match(/\bT[jJ]\b/g)?.length ?? 0).toBeGreaterThan(100);
    await page.close();
  },
);

it('a report shows the sections that were chosen, and its address keeps them', async () => {
  const page = await context.newPage();
  await page.goto('/long-house/reports');
  for (const name of ['Figures', 'Every night', 'Recovery', 'Money', 'Heap book'])
    await page.getByRole('checkbox', { name, exact: true }).uncheck();
  await page.getByRole('button', { name: 'Show these' }).click();
  await page.waitForURL(/section=alarms/);
  const titles = await page.getByRole('article').getByRole('heading', { level: 2 }).allInnerTexts();
  expect(titles).toEqual(['Alarms, answers and tests']);
  await page.close();
});
