// What stands over every page of a house must cost those pages little: its dialog is fetched by the press that opens it.
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { accessibilityFaults, signedIn } from '../support/browser';
import { openOwnHouse, type OwnHouse } from '../support/browser-house';
import { sharedApp } from '../support/shared-app';

let browser: Browser;
let house: OwnHouse;
let page: Page;

beforeAll(async () => {
  ({ browser, house } = await openOwnHouse());
  await house.post('/lockouts', { channel: 'fan', why: 'New belt.' });
  const context = await signedIn(browser, sharedApp(), 'installer@larkmoor.example');
  page = await context.newPage();
  await page.goto(`/${house.slug}/alarms`);
  await page.getByText('Locked out: Tunnel fan, channel 1').waitFor();
});
afterAll(() => browser.close());

const button = () => page.getByRole('button', { name: 'Remove the lock-out…' });
const hasFocus = () => button().evaluate((element) => element === document.activeElement);
const notFetched = () => page.getByRole('alert').getByText('The server did not send what this button opens');

describe('the lock-out over a page', () => {
  it('says at the button that its dialog could not be fetched, and leaves focus there', async () => {
    await page.route('**/_next/static/**', (route) => route.abort());
    await button().focus();
    await page.keyboard.press('Enter');
    await notFetched().waitFor();
    expect(await page.getByRole('dialog').count()).toBe(0);
    expect(await hasFocus()).toBe(true);
    expect(await accessibilityFaults(page)).toEqual([]);
    await page.unrouteAll();
  });

  it('opens at the next press, and its words are gone', async () => {
    await page.keyboard.press('Enter');
    await page.getByRole('dialog', { name: 'Remove the lock-out of the Tunnel fan?' }).waitFor();
    expect(await notFetched().count()).toBe(0);
  });

  it('keeps focus in the dialog and gives it back to its button, by the key and by the safe answer', async () => {
    const dialog = page.getByRole('dialog');
    const isInside = () => dialog.evaluate((element) => element.contains(document.activeElement));
    for (let press = 0; press < 4; press += 1) {
      expect(await isInside()).toBe(true);
      await page.keyboard.press('Tab');
    }
    await page.keyboard.press('Escape');
    await dialog.waitFor({ state: 'detached' });
    await expect.poll(hasFocus).toBe(true);
    await page.keyboard.press('Enter');
    await dialog.getByRole('button', { name: 'Leave it locked out' }).click();
    await dialog.waitFor({ state: 'detached' });
    await expect.poll(hasFocus).toBe(true);
  });

  it('is removed by the dialog', async () => {
    await button().click();
    await page.getByRole('dialog').getByRole('button', { name: 'Remove it' }).click();
    await page.getByText('The Tunnel fan is given back to its rules.').waitFor();
    await button().waitFor({ state: 'detached' });
  });
});
