import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { accessibilityFaults, signedIn } from '../support/browser';
import { openOwnHouse, type OwnHouse } from '../support/browser-house';
import { OutsideNode } from '../support/outside-node';
import { sharedApp } from '../support/shared-app';
import { until } from '../support/until';

let browser: Browser;
let owner: BrowserContext;
let house: OwnHouse;
let node: OutsideNode;

beforeAll(async () => {
  ({ browser, owner, house } = await openOwnHouse());
  const answer = await owner.request.post(`/api/v1/houses/${house.slug}/nodes/T-1/token`, {
    headers: { origin: sharedApp().url },
  });
  const { token } = (await answer.json()) as { token: string };
  // two relays, where four are registered
  node = await OutsideNode.connect(sharedApp().url, token, 'T-1', 2);
});
afterAll(async () => {
  node.close();
  await browser.close();
});

async function open(who: string, slug = house.slug, width = 1400): Promise<Page> {
  const context = await signedIn(browser, sharedApp(), `${who}@larkmoor.example`, {
    viewport: { width, height: 900 },
  });
  const page = await context.newPage();
  await page.goto(`/${slug}/wiring`);
  await page.getByRole('heading', { level: 1 }).waitFor();
  return page;
}

/** The worker writes what a node told each ten seconds. */
const TOLD_WITHIN_MS = 30_000;
const shownAfterReload = (page: Page, text: string) =>
  until(
    `"${text}" is shown`,
    async () => {
      await page.reload();
      return (await page.getByText(text).count()) > 0;
    },
    TOLD_WITHIN_MS,
  );

const record = (n: string, v: number) => ({ n, u: 'Cel', t: Date.now() / 1000, v });

describe('nodes in the browser', () => {
  it('a relay’s coil, contact and load are told apart: an NC contact is closed by a coil that is off', async () => {
    const page = await open('installer');
    const board = page.getByRole('region', { name: 'Relay board of node T-1' });
    const relay = (label: string) => board.getByRole('listitem').filter({ hasText: label }).first();
    await until(
      'the relays are told',
      async () => {
        await page.reload();
        return /coil (on|off)/.test(await relay('Air stirrer').innerText());
      },
      TOLD_WITHIN_MS,
    );
    // whichever way the stirrer stands, the three words belong together
    expect(await relay('Air stirrer').innerText()).toMatch(
      /coil on\s+contact open\s+load off|coil off\s+contact closed\s+load on/,
    );
    expect(await relay('Tunnel fan').innerText()).toMatch(/coil off\s+contact open\s+load off/);
    await page.context().close();
  });

  it('a node that has another number of relays than is registered is told', async () => {
    const page = await open('installer');
    await shownAfterReload(page, 'It says that it has 2 relays; 4 are registered. Change one of the two.');
    await page.context().close();
  });

  it.each([
    ['wide', 1400],
    ['on a phone', 390],
  ])('a name without a point becomes one in one press, %s', async (_, width) => {
    const name = `bench-${width}`;
    await node.readings([record(name, 4)]);
    const page = await open('installer', house.slug, width);
    await shownAfterReload(page, name);
    expect(await accessibilityFaults(page)).toEqual([]);
    await page.getByRole('button', { name: new RegExp(`^Add as a point….*${name}$`) }).click();
    const sheet = page.getByRole('dialog');
    expect(await sheet.getByLabel('Key', { exact: true }).inputValue()).toBe(name);
    await sheet.getByRole('button', { name: 'Add the point' }).click();
    await sheet.waitFor({ state: 'detached' });
    const answer = await page.request.get(`/api/v1/houses/${house.slug}/points/${name}`);
    expect(await answer.json()).toMatchObject({ node: 'T-1', role: 'bench', unit: 'Cel' });
    await until('its readings are taken', async () => (await node.readings([record(name, 5)])).stored === 1);
    await page.context().close();
  });

  it('what a node sends is seen as it comes, with what is refused', async () => {
    const page = await open('grower');
    await page.getByRole('button', { name: /^What comes from T-1/ }).click();
    const sheet = page.getByRole('dialog');
    let sent = 6;
    await until('a pack is shown', async () => {
      await node.readings([record('bench', (sent += 0.1)), record('attic', 3)]);
      return (await sheet.getByText('refused: this node has no point of that name').count()) > 0;
    });
    await sheet
      .getByText(/^\d+\.\d\s°C$/)
      .first()
      .waitFor();
    expect(await accessibilityFaults(page)).toEqual([]);
    await page.context().close();
  });

  it('a new token is drawn for a camera, on the page itself', async () => {
    const page = await open('installer');
    const asked: string[] = [];
    page.on('request', (request) => asked.push(new URL(request.url()).host));
    await page.getByRole('button', { name: 'Register a node…' }).click();
    await page.getByRole('dialog').getByLabel('Name of the node').fill('T-3');
    await page.getByRole('dialog').getByRole('button', { name: 'Add the field node' }).click();
    await page.getByRole('img', { name: 'QR code of the settings of T-3' }).waitFor();
    expect(await accessibilityFaults(page)).toEqual([]);
    expect([...new Set(asked)]).toEqual([new URL(sharedApp().url).host]);
    await page.context().close();
  });
});

describe('faults for training', () => {
  it('are switched on and ended where the yard drives the house, with what should be seen', async () => {
    const page = await open('installer', 'prop-house', 390);
    const panel = page.getByRole('region', { name: 'Faults for training' });
    await panel.getByRole('button', { name: 'Switch the fault on' }).click();
    await panel.getByText('Say which point.').waitFor();
    await panel.getByLabel('Point', { exact: true }).selectOption('light');
    await panel.getByRole('button', { name: 'Switch the fault on' }).click();
    await panel.getByText('What should be seen').waitFor();
    await panel.getByText('After three reports the point is silent', { exact: false }).waitFor();
    expect(await accessibilityFaults(page)).toEqual([]);
    await panel.getByRole('button', { name: /^End it/ }).click();
    await panel.getByText('No fault is switched on.').waitFor();
    await page.context().close();
  });

  it('are only read by a grower, and there are none in a house with a node of its own', async () => {
    const grower = await open('grower', 'prop-house');
    await grower.getByRole('region', { name: 'Faults for training' }).waitFor();
    expect(await grower.getByRole('button', { name: 'Switch the fault on' }).count()).toBe(0);
    await grower.context().close();
    const page = await open('installer');
    expect(await page.getByRole('region', { name: 'Faults for training' }).count()).toBe(0);
    const answer = await owner.request.post(`/api/v1/houses/${house.slug}/training`, {
      headers: { origin: sharedApp().url },
      data: { fault: 'lost-link', on: true },
    });
    expect(answer.status()).toBe(409);
    await page.context().close();
  });
});
