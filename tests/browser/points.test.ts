// A probe is calibrated in ice, two swapped probes are found by hand, and an interlock is tried before it is made.
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { accessibilityFaults, launchBrowser, signedIn } from '../support/browser';
import { OutsideApi } from '../support/outside-api';
import { joinNode, makeHouse, type OutsideHouse } from '../support/outside-house';
import type { OutsideNode } from '../support/outside-node';
import { sharedApp } from '../support/shared-app';
import { plain } from '../support/shown-figures';

let browser: Browser;
let context: BrowserContext;
let house: OutsideHouse;
let node: OutsideNode;

beforeAll(async () => {
  const { url, password } = sharedApp();
  browser = await launchBrowser();
  const owner = await OutsideApi.signIn(url, 'owner@larkmoor.example', password);
  house = await makeHouse(owner, {}, { staleAfter: 3600 });
  node = await joinNode(url, house);
  context = await signedIn(browser, sharedApp(), 'installer@larkmoor.example', {
    viewport: { width: 390, height: 844 },
  });
});
afterAll(async () => {
  node.close();
  await browser.close();
});

const seconds = () => Date.now() / 1000;
/** Six readings half a minute apart, the last one now. */
const bath = (n: string, values: readonly number[]) =>
  values.map((v, place) => ({ n, u: 'Cel', v, t: seconds() - (values.length - 1 - place) * 30 }));

async function open(path: string): Promise<Page> {
  const page = await context.newPage();
  await page.goto(`/${house.slug}/wiring${path}`);
  await page.getByRole('heading', { level: 1 }).waitFor();
  return page;
}

it('waits until the probe lies still in the ice, and corrects what comes from now on', async () => {
  const page = await open('/points/bench-1');
  await page.getByText('It is silent.', { exact: false }).waitFor();
  expect(await page.getByRole('button', { name: 'Take what it reads' }).isEnabled()).toBe(false);
  await node.readings(bath('bench-1', [0.38, 0.44, 0.38, 0.44, 0.38, 0.38]));
  await page.locator('[data-raw="steady"]').waitFor();
  expect(await accessibilityFaults(page)).toEqual([]);
  expect(await page.evaluate(() => document.documentElement.scrollWidth - innerWidth)).toBeLessThanOrEqual(0);
  await page.getByRole('button', { name: 'Take what it reads' }).click();
  await page.getByLabel('Note').fill('flask in the shed');
  await page.getByRole('button', { name: 'Calibrate it by this' }).click();
  await page.getByText('“flask in the shed”').waitFor();
  const answer = await page.request.get(`/api/v1/houses/${house.slug}/points/bench-1`);
  const told = (await answer.json()) as { offset: number; gain: number };
  expect(told.offset).toBeCloseTo(-0.4, 6);
  expect(told.gain).toBe(1);
  expect(plain(await page.getByRole('heading', { level: 1 }).innerText())).toMatch(/calibrated on .* −0\.40/);
  await page.close();
});

it('asks about a correction that no sound probe needs, before it is kept', async () => {
  const page = await open('/points/house-air');
  await node.readings(bath('house-air', [4.2, 4.2, 4.25, 4.2, 4.2, 4.2]));
  await page.locator('[data-raw="steady"]').waitFor();
  await page.getByRole('button', { name: 'Take what it reads' }).click();
  await page.getByText('more than a sound probe is wrong by', { exact: false }).waitFor();
  expect(await page.getByRole('button', { name: 'Calibrate it by this' }).isEnabled()).toBe(false);
  await page.getByRole('checkbox', { name: 'It is meant so.' }).check();
  expect(await page.getByRole('button', { name: 'Calibrate it by this' }).isEnabled()).toBe(true);
  await page.getByRole('button', { name: 'Begin anew' }).click();
  await page.getByRole('button', { name: 'Take what it reads' }).waitFor();
  await page.close();
});

it('keeps a photograph of the place', async () => {
  const page = await open('/points/bench-1');
  await page.locator('fieldset:enabled input[type=file]').setInputFiles({
    name: 'shield.png',
    mimeType: 'image/png',
    // one white point
    buffer: Buffer.from(
      'iVBORw0KGgoAAAANSUhEUgAAAAEAAAABCAYAAAAfFcSJAAAADUlEQVR42mP8/5+hHgAHggJ/PchI7wAAAABJRU5ErkJggg==',
      'base64',
    ),
  });
  await page.getByAltText('bench-1: where the probe hangs').waitFor();
  await page.locator('fieldset:enabled input[type=file]').setInputFiles({
    name: 'not.png',
    mimeType: 'image/png',
    buffer: Buffer.from('<svg onload=alert(1)>'),
  });
  await page.getByText('This is no JPEG, PNG or WebP picture.').waitFor();
  await page.close();
});

it('a held probe that warms another point shows that two are swapped, and exchanges them', async () => {
  const page = await open(`/warm-hand?node=${house.nodeKey}`);
  // well before the press, which the page counts in whole seconds
  const rest = [40, 30, 20].flatMap((ago) =>
    ['bench-1', 'house-air', 'core'].map((n) => ({ n, u: 'Cel', v: 5, t: seconds() - ago })),
  );
  await node.readings(rest);
  await page.getByRole('button', { name: 'I hold it now' }).click();
  await page.getByText('Hold it in the closed hand.', { exact: false }).waitFor();
  await node.readings([
    { n: 'bench-1', u: 'Cel', v: 5.1, t: seconds() + 1 },
    { n: 'house-air', u: 'Cel', v: 9.4, t: seconds() + 1 },
    { n: 'core', u: 'Cel', v: 5, t: seconds() + 1 },
  ]);
  await page.getByText('You hold bench-1, yet house-air warmed', { exact: false }).waitFor();
  expect(await accessibilityFaults(page)).toEqual([]);
  await page.getByRole('button', { name: 'Exchange the two…' }).click();
  await page.getByRole('dialog').getByRole('button', { name: 'Exchange them' }).click();
  await page.getByText('have changed places.', { exact: false }).waitFor();
  const answer = await page.request.get(`/api/v1/houses/${house.slug}/points/house-air`);
  expect(await answer.json()).toMatchObject({ name: 'bench-1', role: 'bench' });
  await page.close();
});

it('an interlock is drawn and held against the last nights while it is typed; a contradiction is refused there', async () => {
  const page = await open('');
  await page.getByRole('button', { name: 'Add an interlock…' }).click();
  const sheet = page.getByRole('dialog');
  await sheet.getByLabel('Channel', { exact: true }).selectOption('fan-1');
  await sheet.getByLabel('Other channel').selectOption('fan-2');
  await sheet.locator('[data-replay]').waitFor();
  expect(await sheet.locator('[data-lock="never-with"]').count()).toBe(1);
  expect(plain(await sheet.locator('[data-replay]').innerText())).toContain('In the last seven nights');
  expect(await accessibilityFaults(page)).toEqual([]);
  await sheet.getByRole('button', { name: 'Add the interlock' }).click();
  await sheet.waitFor({ state: 'detached' });
  await page.getByRole('button', { name: 'Add an interlock…' }).click();
  await sheet.getByLabel('Channel', { exact: true }).selectOption('fan-2');
  await sheet.getByLabel('Other channel').selectOption('fan-1');
  await sheet.getByLabel('How it depends').selectOption('needs');
  await sheet.getByText('would need each other and never run together', { exact: false }).waitFor();
  await page.close();
});
