import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { accessibilityFaults, faultsOf, launchBrowser, signedIn } from '../support/browser';
import { sharedApp } from '../support/shared-app';
import { figuresIn, nightsTold, plain, told } from '../support/shown-figures';

let browser: Browser;
let context: BrowserContext;

beforeAll(async () => {
  browser = await launchBrowser();
  context = await signedIn(browser, sharedApp(), 'owner@larkmoor.example', {
    viewport: { width: 1400, height: 900 },
  });
});
afterAll(() => browser.close());

const DUTY = '/long-house/duty?source=gate-heap';

async function opened(address: string): Promise<Page> {
  const page = await context.newPage();
  await page.goto(address);
  await page.getByRole('heading', { level: 1 }).waitFor();
  return page;
}
const rowsOf = (page: Page) =>
  page
    .getByRole('table', { name: /Nights/ })
    .locator('tbody tr:has(th a)')
    .count();
const end = (page: Page, name: string) => page.getByRole('slider', { name });

describe('The brush over the nights', () => {
  it('is moved by the keyboard, stands in the address, and all figures follow', async () => {
    const page = await opened(DUTY);
    const all = await rowsOf(page);
    const first = end(page, 'First night chosen');
    await first.focus();
    for (let press = 0; press < 3; press += 1) await page.keyboard.press('ArrowRight');
    const date = await first.getAttribute('aria-valuetext');
    await page.waitForURL(/from=/);
    await page.getByText(/Chosen:/).waitFor();
    expect(await rowsOf(page)).toBe(all - 3);
    expect(await page.locator('tbody tr:has(th a) th').first().innerText()).toContain(date);
    expect(plain(await page.getByRole('heading', { level: 1 }).innerText())).toContain(
      `Over the ${all - 3} nights from ${plain(date ?? '')}`,
    );
    expect(await accessibilityFaults(page)).toEqual([]);
    await page.reload();
    expect(await rowsOf(page)).toBe(all - 3);
    await page.getByRole('link', { name: 'All nights' }).click();
    await page.getByText(/Chosen:/).waitFor({ state: 'detached' });
    expect(await rowsOf(page)).toBe(all);
    await page.close();
  });

  it('is drawn by the pointer, and a tap chooses nothing', async () => {
    const page = await opened(DUTY);
    const all = await rowsOf(page);
    const box = await page.getByRole('group', { name: 'Choose nights' }).locator('svg').boundingBox();
    if (box === null) throw new Error('no bars');
    const at = (night: number) =>
      [box.x + ((night + 0.5) / all) * box.width, box.y + box.height / 2] as const;
    await page.mouse.click(...at(4));
    expect(page.url()).not.toContain('from=');
    await page.mouse.move(...at(2));
    await page.mouse.down();
    await page.mouse.move(...at(5), { steps: 4 });
    await page.mouse.up();
    await page.waitForURL(/from=/);
    await page.getByText(/Chosen:/).waitFor();
    expect(await rowsOf(page)).toBe(4);
    await page.close();
  });

  it('chooses what the file then holds', async () => {
    const page = await opened(`${DUTY}&from=2000-01-01&to=2100-01-01`);
    const all = await nightsTold(context, 'long-house', 'gate-heap');
    const [from, to] = [all.at(-4)?.night ?? '', all.at(-2)?.night ?? ''];
    await page.goto(`${DUTY}&from=${from}&to=${to}`);
    const href = await page.getByRole('link', { name: 'Download CSV' }).getAttribute('href');
    const file = await (await context.request.get(href ?? '')).text();
    const names = file
      .trim()
      .split('\r\n')
      .slice(1)
      .map((line) => line.slice(0, 10));
    expect(names.sort()).toEqual(all.slice(-4, -1).map((night) => night.night));
    await page.close();
  });
});

describe('Nights side by side', () => {
  it.each([
    ['before', 'Other nights'],
    ['source.prop-house.yew-heap', 'Yew heap'],
    ['house.prop-house', 'Prop house'],
  ])('are compared with %s, with intervals and what chance would do', async (against) => {
    const all = await nightsTold(context, 'long-house', 'gate-heap');
    const chosen = `from=${all.at(-4)?.night ?? ''}&to=${all.at(-2)?.night ?? ''}`;
    const page = await opened(`${DUTY}&${chosen}&against=${against}`);
    const panel = page.getByRole('region', { name: 'Side by side' });
    const row = panel.getByRole('row', { name: /Heat a night/ });
    expect(plain(await row.innerText())).toMatch(/−?\d+\.\d\d ± \d+\.\d\d kWh/);
    expect(plain(await row.innerText())).toMatch(/beyond chance|no more than chance/);
    expect(await accessibilityFaults(page)).toEqual([]);
    await page.close();
  });

  it('have the means of the very nights that the interface tells', async () => {
    const all = await nightsTold(context, 'long-house', 'gate-heap');
    const chosen = all.slice(-5, -1);
    const span = `from=${chosen[0]?.night ?? ''}&to=${chosen.at(-1)?.night ?? ''}`;
    const page = await opened(`${DUTY}&${span}&against=source.prop-house.yew-heap`);
    const row = page.getByRole('region', { name: 'Side by side' }).getByRole('row', { name: /Heat a night/ });
    const yew = (await nightsTold(context, 'prop-house', 'yew-heap')).slice(-5, -1);
    const meanOf = (nights: typeof all) =>
      (nights.reduce((sum, night) => sum + (night.heat?.kWh ?? Number.NaN), 0) / nights.length).toFixed(2);
    const cells = (await row.getByRole('cell').allInnerTexts()).map(plain);
    expect(cells[0]).toMatch(new RegExp(`^${meanOf(chosen)} ±`));
    expect(cells[1]).toMatch(new RegExp(`^${meanOf(yew)} ±`));
    await page.close();
  });

  it('are chosen from the list, by a brush of their own', async () => {
    const page = await opened(DUTY);
    await page.getByLabel('Compare with').selectOption({ label: 'Nights that I choose' });
    await page.waitForURL(/against=nights/);
    const last = end(page, 'Last night compared with');
    await last.focus();
    await page.keyboard.press('ArrowRight');
    const date = plain((await last.getAttribute('aria-valuetext')) ?? '');
    await page.getByRole('columnheader', { name: new RegExp(`to ${date}`) }).waitFor();
    await page.close();
  });
});

describe('An opened night', () => {
  it('shows lines, each draw with its heat, and draws that add up to the night', async () => {
    const all = await nightsTold(context, 'long-house', 'gate-heap');
    const night = all.findLast((one, place) => place < all.length - 1 && one.starts > 1);
    if (night === undefined) throw new Error('no night with draws');
    const page = await opened(`${DUTY}&night=${night.night}`);
    const panel = page.getByRole('region', { name: /The night of/ });
    expect(await panel.locator('figure svg').first().isVisible()).toBe(true);
    const cells = await panel
      .getByRole('table', { name: 'Draws' })
      .locator('tbody tr td:last-child')
      .allInnerTexts();
    expect(cells).toHaveLength(night.starts);
    const sum = cells.reduce((total, text) => total + Number(plain(text).replace('−', '-').split(' ')[0]), 0);
    expect(Math.abs(sum - (night.heat?.kWh ?? Number.NaN))).toBeLessThan(0.006 * cells.length);
    const figures = await figuresIn(page, /The night of/);
    expect(figures['Regains two thirds in']).toMatch(/\d min|not known yet/);
    expect(figures['Read']).toContain('%');
    await page.close();
  });
});

describe('The year', () => {
  it('is walked by arrows and opens a night by Enter', async () => {
    const page = await opened(DUTY);
    const year = page.getByRole('slider', { name: /Night of the year/ });
    await year.focus();
    await page.keyboard.press('ArrowUp');
    await page.keyboard.press('ArrowUp');
    const said = plain((await year.getAttribute('aria-valuetext')) ?? '');
    const night = (await nightsTold(context, 'long-house', 'gate-heap')).at(-3);
    expect(said).toContain(`ran ${Math.round((night?.dutyOfNight ?? 0) * 100)} %`);
    await page.keyboard.press('Enter');
    await page.waitForURL(new RegExp(`night=${night?.night ?? 'none'}`));
    await page.getByRole('heading', { name: /The night of/ }).waitFor();
    await page.close();
  });
});

describe('Heat against outdoors', () => {
  it('fetches its chart only when it is seen', async () => {
    const page = await context.newPage();
    const faults = faultsOf(page);
    // a phone, where the nights above fill more than the screen
    await page.setViewportSize({ width: 360, height: 600 });
    await page.goto(DUTY);
    await page.waitForLoadState('networkidle');
    expect(await page.locator('.recharts-surface').count()).toBe(0);
    await page.getByRole('heading', { name: 'Heat against outdoors' }).scrollIntoViewIfNeeded();
    await page.locator('.recharts-surface').first().waitFor();
    expect(faults).toEqual([]);
    await page.close();
  });
});

describe('All houses', () => {
  it.each([1400, 360])('stand on one page without a fault, %i px wide', async (width) => {
    const page = await context.newPage();
    await page.setViewportSize({ width, height: 800 });
    await page.goto('/houses');
    for (const name of ['Long house', 'Prop house'])
      expect(await page.getByRole('heading', { level: 2, name, exact: true }).count()).toBe(1);
    // other files may have made houses of their own by now
    const houses = (await (await page.request.get('/api/v1/houses')).json()) as { items: unknown[] };
    expect(houses.items.length).toBeGreaterThanOrEqual(2);
    expect(await page.getByRole('heading', { level: 2 }).count()).toBe(houses.items.length);
    expect(await accessibilityFaults(page)).toEqual([]);
    expect(
      await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth),
    ).toBeLessThanOrEqual(0);
    await page.close();
  });

  it('are in the menu, and tell of each house what Duty tells of its last week', async () => {
    const page = await opened('/long-house/watch');
    await page.getByRole('link', { name: 'All houses' }).first().click();
    await page.waitForURL(/\/houses$/);
    const row = page.getByRole('row', { name: /Gate heap/ });
    const heat = plain(await row.getByRole('cell').nth(1).innerText());
    const nights = (await nightsTold(context, 'long-house', 'gate-heap')).slice(-8, -1);
    // of the nights as they are kept, rounded once
    const sum = nights.reduce((total, night) => total + (night.heat?.kWh ?? 0), 0);
    expect(heat).toContain(`${sum.toFixed(1).replace('-', '−')} ±`);
    await page.close();
  });

  it('are another holding’s own', async () => {
    const stonebeck = await signedIn(browser, sharedApp(), 'owner@stonebeck.example');
    const page = await stonebeck.newPage();
    await page.goto('/houses');
    expect(await page.getByText('Gate heap').count()).toBe(0);
    const houses = await told<{ items: { name: string }[] }>(stonebeck, '/houses');
    expect((await page.getByRole('heading', { level: 2 }).allInnerTexts()).sort()).toEqual(
      houses.items.map(({ name }) => name).sort(),
    );
    await stonebeck.close();
  });
});
