// The main job, end to end: a node reports, a grower moves a band, a relay moves, and who looks at Watch sees it happen.
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launchBrowser, signedIn } from '../support/browser';
import { listOf, OutsideApi } from '../support/outside-api';
import { joinNode, makeHouse, pack, type OutsideHouse } from '../support/outside-house';
import type { OutsideNode } from '../support/outside-node';
import { sharedApp } from '../support/shared-app';

/** From the press that puts a rule into force to the fan's new state on a screen that was open before. */
const SHOWN_WITHIN_MS = 3000;
/** One reading has to last the whole test. */
const STEADY = { staleAfter: 3600 };
const PRESENT_C = 6;

let browser: Browser;
let owner: OutsideApi;
let house: OutsideHouse;
let node: OutsideNode;
let rule: { id: string; path: string };

beforeAll(async () => {
  const { url, password } = sharedApp();
  browser = await launchBrowser();
  owner = await OutsideApi.signIn(url, 'owner@larkmoor.example', password);
  house = await makeHouse(owner, { band: [{ from: '00:00', low: 4, high: 7.5 }] }, STEADY);
  node = await joinNode(url, house);
  await node.readings(pack({ 'bench-1': PRESENT_C, 'house-air': PRESENT_C, core: 50 }));
  const [made] = listOf((await owner.get(`/houses/${house.slug}/rules`)).body);
  rule = { id: String(made?.['id']), path: `/${house.slug}/rules/${String(made?.['slug'])}` };
});
afterAll(async () => {
  node.close();
  await browser.close();
});

const member = (email: string) => signedIn(browser, sharedApp(), email);

async function opened(context: BrowserContext, path: string): Promise<Page> {
  const page = await context.newPage();
  await page.goto(path);
  return page;
}

const fanOf = (page: Page, state: 'on' | 'off') =>
  page.locator(`[data-channel="fan-1"][data-state="${state}"]`);

const inForce = async () => (await owner.get(`/rules/${rule.id}`)).body['inForce'];

describe('A band moved by a grower', () => {
  it('runs the fan, and a Watch that was open before shows it within 3 s without a reload', async () => {
    const grower = await member('grower@larkmoor.example');
    const watch = await opened(grower, `/${house.slug}/watch`);
    await fanOf(watch, 'off').waitFor();
    await watch.waitForSelector('[data-link="live"]');
    // a page that was loaded anew would have lost this
    await watch.evaluate(() => document.documentElement.setAttribute('data-loaded', 'once'));

    const editor = await opened(grower, rule.path);
    await editor.locator('button[type=submit]:enabled').waitFor();
    await editor.getByLabel(/^On below/).fill(String(PRESENT_C + 1));
    await editor.getByLabel(/^Off above/).fill(String(PRESENT_C + 3));
    await editor.getByRole('button', { name: 'Put into force…' }).click();
    const dialog = editor.getByRole('dialog');
    await dialog.getByLabel(/^Why/).fill('Seedlings have come in.');
    await dialog.getByLabel(/to put it into force all the same/).fill('run it unproved');
    expect(await fanOf(watch, 'off').count()).toBe(1);
    await dialog.getByRole('button', { name: 'Put into force' }).click();

    await fanOf(watch, 'on').waitFor({ timeout: SHOWN_WITHIN_MS });
    await node.coil(1, 'on', SHOWN_WITHIN_MS);
    expect(await watch.locator('html').getAttribute('data-loaded')).toBe('once');
    await watch
      .getByText(/Starts under|Stops above/)
      .first()
      .waitFor();
    await editor.getByText('“Seedlings have come in.”').waitFor();
    await grower.close();
  });

  it('is told to have been moved by whom and why', async () => {
    expect(await inForce()).toMatchObject({
      number: 2,
      why: 'Seedlings have come in.',
      body: { band: [{ from: '00:00', low: PRESENT_C + 1, high: PRESENT_C + 3 }] },
    });
  });

  it('stops the fan again when the band is moved under the present temperature', async () => {
    const grower = await member('grower@larkmoor.example');
    const watch = await opened(grower, `/${house.slug}/watch`);
    await fanOf(watch, 'on').waitFor();
    await watch.waitForSelector('[data-link="live"]');
    const editor = await opened(grower, rule.path);
    await editor.locator('button[type=submit]:enabled').waitFor();
    await editor.getByLabel(/^On below/).fill(String(PRESENT_C - 3));
    await editor.getByLabel(/^Off above/).fill(String(PRESENT_C - 1));
    await editor.getByRole('button', { name: 'Put into force…' }).click();
    const dialog = editor.getByRole('dialog');
    await dialog.getByLabel(/^Why/).fill('They are hardened off.');
    await dialog.getByLabel(/to put it into force all the same/).fill('run it unproved');
    await dialog.getByRole('button', { name: 'Put into force' }).click();
    await fanOf(watch, 'off').waitFor({ timeout: SHOWN_WITHIN_MS });
    await node.coil(1, 'off', SHOWN_WITHIN_MS);
    await grower.close();
  });
});

describe('Who may not', () => {
  it('is an installer: the page says why, the route refuses, and what is in force stays', async () => {
    const before = await inForce();
    const installer = await member('installer@larkmoor.example');
    const page = await opened(installer, rule.path);
    await page.getByText('You can read this rule, not change it.').waitFor();
    await page.getByText(/a grower or an owner writes rules and puts them into force/).waitFor();
    expect(await page.getByRole('button', { name: /Put into force|Save draft/ }).count()).toBe(0);
    const answer = await page.request.post(`/api/v1/rules/${rule.id}/force`, {
      data: { why: 'I may not', acceptUnproved: true },
      headers: { origin: sharedApp().url },
    });
    expect(answer.status()).toBe(403);
    expect(await inForce()).toEqual(before);
    await installer.close();
  });

  it('is a member of the other holding, to whom house, rule and channel do not exist', async () => {
    const stranger = await member('owner@stonebeck.example');
    for (const path of [`/${house.slug}/watch`, rule.path, `/${house.slug}/wiring`]) {
      const page = await stranger.newPage();
      expect((await page.goto(path))?.status(), path).toBe(404);
      await page.getByText('There is no such page here.').first().waitFor();
      expect(await page.locator('body').innerText()).not.toContain('Outside house');
      await page.close();
    }
    const headers = { origin: sharedApp().url };
    const force = { data: { why: 'not mine', acceptUnproved: true }, headers };
    const hand = { data: { state: 'on', seconds: 60 }, headers };
    const at = `/api/v1/houses/${house.slug}`;
    expect((await stranger.request.post(`/api/v1/rules/${rule.id}/force`, force)).status()).toBe(404);
    expect((await stranger.request.post(`${at}/channels/1/hand`, hand)).status()).toBe(404);
    expect((await stranger.request.get(`${at}/state`)).status()).toBe(404);
    expect((await stranger.request.get(`${at}/nights`)).status()).toBe(404);
    await stranger.close();
  });
});
