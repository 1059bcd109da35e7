// A whole proof on a phone beside the panel, with a node from outside that is unplugged in it.
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { picture } from '../api/picture';
import { accessibilityFaults, signedIn } from '../support/browser';
import { openOwnHouse, type OwnHouse } from '../support/browser-house';
import { OutsideNode } from '../support/outside-node';
import { sharedApp } from '../support/shared-app';
import { until } from '../support/until';

let browser: Browser;
let house: OwnHouse;
let token: string;
const phone = { viewport: { width: 390, height: 844 } };

beforeAll(async () => {
  ({ browser, house } = await openOwnHouse());
  const node = (await house.post('/nodes', { key: 'P-1', kind: 'socket', channels: 2 })) as { token: string };
  token = node.token;
  await house.post('/channels', {
    ...{ number: 9, node: 'P-1', relay: 1, key: 'stir', label: 'Stirring fan', contact: 'NO' },
    load: { kind: 'motor', watts: 12, volts: 24, supply: 'dc', contactAmps: 5 },
    ...{ minOn: 0, minOff: 0 },
  });
});
afterAll(async () => browser.close());

async function open(who: string): Promise<{ context: BrowserContext; page: Page }> {
  const context = await signedIn(browser, sharedApp(), `${who}@larkmoor.example`, phone);
  const page = await context.newPage();
  await page.goto(`/${house.slug}/wiring/prove/9`);
  await page.getByRole('heading', { level: 1 }).waitFor();
  return { context, page };
}
const press = (page: Page, name: string | RegExp) => page.getByRole('button', { name }).click();

it('is gone through at 390 px, from a dead circuit to a node that was unplugged', async () => {
  const { context, page } = await open('installer');
  const node = await OutsideNode.connect(sharedApp().url, token, 'P-1', 2);
  await press(page, 'Begin to prove it');
  await press(page, 'The circuit is dead');
  await page.getByText('Prove the tester on a known live source first.').first().waitFor();
  for (const label of [/shows a known live source/, /This circuit is dead/, /live source again/])
    await page.getByLabel(label).check();
  await press(page, 'The circuit is dead');
  await page.getByText(/a third of the contact’s 5/).waitFor();
  expect(await accessibilityFaults(page)).toEqual([]);
  const wide = () => page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
  expect(await wide()).toBeLessThanOrEqual(0);
  await press(page, 'It fits the plate');
  const file = { name: 'p.jpg', mimeType: 'image/jpeg', buffer: Buffer.from(await picture()) };
  await page.getByLabel('Photograph the rating plate').setInputFiles(file);
  await page.getByAltText('Rating plate, photograph 1').waitFor();
  await page.getByLabel('Photograph the wiring').setInputFiles(file);
  await page.getByAltText('Wiring, photograph 1').waitFor();
  await press(page, 'Both are photographed');
  for (const label of [/nobody is at it/, /the isolator is on/]) await page.getByLabel(label).check();
  await press(page, 'Clear to run');
  await press(page, /^5 s$/);
  await press(page, 'Run for 5 s');
  await node.coil(1, 'on', 10_000);
  await page.getByText('It ends by itself.').waitFor();
  await node.coil(1, 'off', 15_000);
  await press(page, 'It moved the right way');
  await press(page, 'Begin: the load runs for 60 s');
  await node.coil(1, 'on', 10_000);
  await page.getByText('Pull the network of P-1 NOW', { exact: false }).waitFor();
  const { boot, number } = node;
  node.terminate();
  const left = performance.now();
  // the node's own lease: nobody commands it for longer than that
  await until('the lease is over', () => performance.now() - left > 32_000, 60_000);
  const back = await OutsideNode.connect(sharedApp().url, token, 'P-1', 2, { boot, number, trips: 1 });
  await page.getByRole('button', { name: 'The load stopped' }).click({ timeout: 30_000 });
  await press(page, 'All is done: the channel is proved');
  await page.getByText('The channel is proved.').waitFor();
  back.terminate();
  await page.reload();
  await page.getByRole('heading', { level: 1, name: /was proved on/ }).waitFor();
  await page.getByText('Proofs before').waitFor();
  await context.close();
}, 180_000);
