// An installer's way from an empty house to its first rule, on a phone, through the pages alone.
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { accessibilityFaults, faultsOf, launchBrowser, signedIn } from '../support/browser';
import { sharedApp } from '../support/shared-app';
import { plain } from '../support/shown-figures';

let browser: Browser;
let context: BrowserContext;
let page: Page;
let faults: string[];
let slug = '';

beforeAll(async () => {
  browser = await launchBrowser();
  context = await signedIn(browser, sharedApp(), 'owner@larkmoor.example', {
    viewport: { width: 390, height: 844 },
  });
  page = await context.newPage();
  faults = faultsOf(page);
});
afterAll(() => browser.close());

const step = (name: string, state?: string) =>
  page.locator(`[data-step="${name}"]${state === undefined ? '' : `[data-state="${state}"]`}`);
const sheet = () => page.getByRole('dialog');
const sideways = () => page.evaluate(() => document.documentElement.scrollWidth - innerWidth);

/** Opens a form out of a step, sends it as it stands, and waits until it is away. */
async function add(button: string, word: string, fill: () => Promise<unknown> = () => Promise.resolve()) {
  await page.getByRole('button', { name: button }).click();
  await sheet()
    .getByRole('button', { name: `Add the ${word}` })
    .waitFor();
  await fill();
  await sheet()
    .getByRole('button', { name: `Add the ${word}` })
    .click();
  await sheet().waitFor({ state: 'detached' });
}

it('a place that does not fit is asked about, and does not keep anybody from going on', async () => {
  await page.goto('/new-house');
  await page.locator('button[type=submit]:enabled').waitFor();
  await page.getByLabel('Name', { exact: true }).fill(`Set-up house ${process.pid}`);
  await page.getByLabel('Time zone').fill('Europe/London');
  await page.getByLabel(/^Latitude/).fill('-54.2');
  await page.getByLabel(/^Longitude/).fill('-2.3');
  await page.getByText('This zone keeps summer time while it is winter', { exact: false }).waitFor();
  await page.getByText('Nought is the sea’s level.', { exact: false }).waitFor();
  await page.getByLabel(/^Latitude/).fill('54.2');
  await page.getByLabel(/^Altitude/).fill('310');
  await page.getByText('Look at the place once more').waitFor({ state: 'detached' });
  await page.getByRole('button', { name: 'Add the house' }).click();
  await page.waitForURL(/\/setup$/);
  slug = new URL(page.url()).pathname.split('/')[1] ?? '';
  await step('node', 'open').waitFor();
});

it('has nothing that axe finds, and does not scroll sideways', async () => {
  expect(await accessibilityFaults(page)).toEqual([]);
  expect(await sideways()).toBeLessThanOrEqual(0);
});

it('says what is done and what comes next', async () => {
  const said = plain(await page.getByRole('heading', { level: 1 }).innerText());
  expect(said).toContain('One of eight steps is done. Next: field nodes.');
  expect(await step('node').getAttribute('aria-current')).toBe('step');
  expect(await step('rule', 'waits').innerText()).toContain('Waits for points and a channel.');
});

it('a node gives its token once, and the points of a heap’s house are offered by name', async () => {
  await page.getByRole('button', { name: 'Register a node…' }).click();
  await sheet().getByLabel('Name of the node').fill('S-1');
  await sheet().getByRole('button', { name: 'Add the field node' }).click();
  await sheet().getByRole('button', { name: 'It is in the node' }).click();
  await step('node', 'done').waitFor();
  for (const name of ['House air', 'Heap core', 'Heap beside the pipe', 'Loop intake', 'Loop return']) {
    await add(`${name}…`, 'point');
    await page.getByRole('button', { name: `${name}…` }).waitFor({ state: 'detached' });
  }
  await step('point', 'done').waitFor();
});

it('source, channel and loop begin with what is wired already', async () => {
  await add('Add a source…', 'source', () =>
    sheet().getByLabel('Name', { exact: true }).fill(`Set-up heap ${process.pid}`),
  );
  await step('source', 'done').waitFor();
  await add('Add a channel…', 'channel');
  await step('channel', 'done').waitFor();
  await add('Add a loop…', 'loop');
  await step('loop', 'done').waitFor();
  const loops = await page.request.get(`/api/v1/houses/${slug}/loops`);
  expect(((await loops.json()) as { items: unknown[] }).items).toMatchObject([
    { intake: 'loop-intake', return: 'loop-return' },
  ]);
});

it('a step that is put off is remembered, and taken up again', async () => {
  await step('proving')
    .getByRole('button', { name: /^Put it off/ })
    .click();
  await step('proving', 'put-off').waitFor();
  await page.reload();
  await step('proving', 'put-off').waitFor();
  await step('proving')
    .getByRole('button', { name: /^Take it up again/ })
    .click();
  await step('proving', 'open').waitFor();
  expect(await step('proving').getByRole('link').getAttribute('href')).toMatch(/\/wiring\/prove\//);
});

it('Wiring begins with what is missing', async () => {
  await page.goto(`/${slug}/wiring`);
  const said = plain(await page.getByRole('heading', { level: 1 }).innerText());
  expect(said).toContain('Still missing: a rule in force.');
  expect(await sideways()).toBeLessThanOrEqual(0);
  await page.getByRole('link', { name: 'Go on with the set-up' }).click();
  await step('rule', 'open').waitFor();
});

it('the first rule is drafted and put into force', async () => {
  await page.getByRole('button', { name: 'New rule…' }).click();
  await sheet().getByLabel('Runs').selectOption({ index: 1 });
  await sheet().getByLabel('Goes by').selectOption('house-air');
  await sheet().getByRole('button', { name: 'Write the draft' }).click();
  await page.waitForURL(/\/rules\//);
  await page.goto(`/${slug}/setup`);
  expect(await step('rule', 'open').innerText()).toContain('One draft, none in force yet.');
  const rules = (await (await page.request.get(`/api/v1/houses/${slug}/rules`)).json()) as {
    items: { id: string }[];
  };
  const forced = await page.request.post(`/api/v1/rules/${rules.items[0]?.id ?? ''}/force`, {
    data: { why: 'first rule', acceptUnproved: true },
    headers: { origin: sharedApp().url },
  });
  expect(forced.status()).toBe(200);
  await page.reload();
  await step('rule', 'done').waitFor();
  expect(faults).toEqual([]);
});

it('a grower reads the steps and is not offered what only others may do', async () => {
  const grower = await signedIn(browser, sharedApp(), 'grower@larkmoor.example');
  const seen = await grower.newPage();
  await seen.goto(`/${slug}/setup`);
  await seen.getByText('You can read the set-up, not change it.').waitFor();
  expect(
    await seen.getByRole('button', { name: /^(Add|Register|Put it off|Change|House air)/ }).count(),
  ).toBe(0);
  await grower.close();
});
