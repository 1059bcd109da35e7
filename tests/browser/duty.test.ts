import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { accessibilityFaults, launchBrowser, signedIn } from '../support/browser';
import { sharedApp } from '../support/shared-app';

let browser: Browser;
let context: BrowserContext;

beforeAll(async () => {
  browser = await launchBrowser();
  context = await signedIn(browser, sharedApp(), 'owner@larkmoor.example');
});
afterAll(() => browser.close());

async function opened(address: string, options: { width?: number } = {}): Promise<Page> {
  const page = await context.newPage();
  if (options.width !== undefined) await page.setViewportSize({ width: options.width, height: 800 });
  await page.goto(address);
  await page.getByRole('heading', { level: 1 }).waitFor();
  return page;
}

const table = (page: Page) => page.getByRole('table', { name: /Nights/ });
/** What stands in a column of figures, row by row; the foot is last. */
async function column(page: Page, head: string): Promise<number[]> {
  const heads = await table(page).locator('thead th').allInnerTexts();
  const place = heads.findIndex((text) => text.startsWith(head));
  const fromEnd = heads.length - place;
  const rows = await table(page).locator('tbody tr, tfoot tr').all();
  const cells = await Promise.all(rows.map((row) => row.locator('td, th').nth(-fromEnd).innerText()));
  return cells.map((text) => Number(text.replace('−', '-').replace(/[^\d.-]/g, '')));
}

describe('Duty in the browser', () => {
  it.each([
    ['wide', 1400],
    ['on a phone', 360],
  ])('has nothing that axe finds and does not scroll sideways, %s', async (_, width) => {
    const page = await opened('/long-house/duty', { width });
    expect(await accessibilityFaults(page)).toEqual([]);
    expect(
      await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth),
    ).toBeLessThanOrEqual(0);
    await page.close();
  });

  it('has rows that add up to what stands under them and in the sentence, but for their rounding', async () => {
    const page = await opened('/long-house/duty?source=gate-heap');
    const kWh = await column(page, 'kWh');
    const total = kWh.pop() ?? 0;
    expect(kWh.length).toBeGreaterThanOrEqual(7);
    // each row is rounded by half of a tenth at most, the total once
    expect(Math.abs(kWh.reduce((sum, one) => sum + one, 0) - total)).toBeLessThan(0.05 * (kWh.length + 1));
    const said = (await page.getByRole('heading', { level: 1 }).innerText()).replaceAll('\u00a0', ' ');
    expect(said).toContain(`${Math.abs(total).toFixed(1)} ±`);
    const starts = await column(page, 'starts');
    const all = starts.pop();
    expect(starts.reduce((sum, one) => sum + one, 0)).toBe(all);
    await page.close();
  });

  it('shows of each whole night what the interface tells', async () => {
    const page = await opened('/long-house/duty?source=gate-heap');
    const answer = await context.request.get('/api/v1/houses/long-house/nights?source=gate-heap');
    const nights = (
      (await answer.json()) as { items: { dutyOfNight: number; starts: number }[] }
    ).items.reverse();
    // the last row grows while it is looked at, and the foot is no night
    const ran = (await column(page, 'ran')).slice(0, -2);
    const told = nights.slice(0, -1).map((night) => Math.round(night.dutyOfNight * 100));
    expect(ran).toEqual(told.slice(-ran.length));
    await page.close();
  });

  it('gives the same nights as a file', async () => {
    const page = await opened('/long-house/duty?source=gate-heap');
    const rows = await table(page).locator('tbody tr').count();
    const href = await page.getByRole('link', { name: 'Download CSV' }).getAttribute('href');
    const file = await context.request.get(href ?? '');
    expect(file.headers()['content-type']).toContain('text/csv');
    expect((await file.text()).trim().split('\r\n')).toHaveLength(rows + 1);
    await page.close();
  });

  it('keeps source and number of nights in its address', async () => {
    const page = await opened('/long-house/duty');
    await page.getByLabel('Source').selectOption({ label: 'Ground tubes' });
    await page.waitForURL(/source=ground-tubes/);
    await page.reload();
    expect(await page.getByLabel('Source').inputValue()).toBe('ground-tubes');
    expect(await page.getByRole('heading', { level: 1 }).innerText()).toContain('ground tubes');
    await page.close();
  });

  it('opens a night by the keyboard, with its decisions', async () => {
    const page = await opened('/long-house/duty?source=gate-heap');
    const link = table(page).locator('tbody th a').first();
    await link.focus();
    await page.keyboard.press('Enter');
    await page.waitForURL(/night=/);
    await page.getByRole('heading', { name: /The night of/ }).waitFor();
    await page.getByRole('list', { name: 'Decisions of the night' }).waitFor();
    expect(await accessibilityFaults(page)).toEqual([]);
    await page.getByRole('link', { name: 'Close' }).click();
    await page.getByRole('heading', { name: /The night of/ }).waitFor({ state: 'detached' });
    await page.close();
  });

  it('sorts its nights by a press on a head, and says so', async () => {
    const page = await opened('/long-house/duty?source=gate-heap');
    await table(page).getByRole('link', { name: 'starts' }).click();
    await page.waitForURL(/sort=starts/);
    const starts = (await column(page, 'starts')).slice(0, -1);
    expect(starts).toEqual(starts.toSorted((a, b) => a - b));
    expect(await table(page).getByRole('columnheader', { name: 'starts' }).getAttribute('aria-sort')).toBe(
      'ascending',
    );
    await page.close();
  });

  it('makes the table behind the core’s curve when it is opened, a row a dawn', async () => {
    const page = await opened('/long-house/duty?source=gate-heap');
    const panel = page.getByRole('region', { name: 'Core at dawn' });
    const rows = panel.locator('tbody tr');
    expect(await rows.count()).toBe(0);
    await panel.getByText('As a table').click();
    await rows.first().waitFor();
    const cores = await rows.locator('td').allInnerTexts();
    const said = (await panel.getByRole('img').getAttribute('aria-label')) ?? '';
    const firstLines = (cells: string[]) => cells.map((cell) => cell.trim().split(/\s*\n/)[0]);
    const nights = firstLines(await table(page).locator('tbody tr').allInnerTexts());
    const dawns = firstLines(await rows.allInnerTexts()).map((line) => line?.split('\t')[0]);
    // a night's dawn has the next one's date; the first night may have begun after its own, for a history begins at the
    // hour of day at which it was made
    expect(dawns).toEqual(expect.arrayContaining(nights.slice(2)));
    expect(dawns).toHaveLength(cores.length);
    expect(said).toContain(`from ${cores[0]} to ${cores.at(-1)},`);
    await page.close();
  });

  it('has its faces after a first visit, and a second begins with them', async () => {
    const first = await signedIn(browser, sharedApp(), 'owner@larkmoor.example');
    const page = await first.newPage();
    const asked: string[] = [];
    page.on('request', (request) => asked.push(request.url()));
    await page.goto('/long-house/duty');
    await page.locator('html:not([data-faces])').waitFor({ state: 'attached' });
    expect(asked.filter((url) => url.endsWith('.woff2'))).toHaveLength(3);
    expect(await page.evaluate(() => document.fonts.check('1em sentence'))).toBe(true);
    const answer = await first.request.get('/long-house/duty');
    expect(await answer.text()).not.toContain('data-faces="later"');
    await first.close();
  });

  it('is readable before its script', async () => {
    const page = await context.newPage();
    await page.route('**/_next/static/**/*.js', (route) => route.abort());
    await page.goto('/long-house/duty');
    expect(await table(page).locator('tbody tr svg').count()).toBeGreaterThan(0);
    await page.close();
  });

  it('shows its usual self where the address makes no sense', async () => {
    const page = await opened('/long-house/duty?source=nothing&nights=-5&sort=;drop&night=2026-99-99');
    expect(await table(page).locator('tbody tr').count()).toBeGreaterThan(0);
    await page.close();
  });
});
