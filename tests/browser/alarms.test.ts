import pg from 'pg';
import type { Browser, Page } from 'playwright-core';
import { v7 as uuid } from 'uuid';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { accessibilityFaults, launchBrowser, signedIn } from '../support/browser';
import { sharedApp } from '../support/shared-app';

let browser: Browser;
let database: pg.Client;

beforeAll(async () => {
  browser = await launchBrowser();
  database = new pg.Client({ connectionString: sharedApp().ownerUrl });
  await database.connect();
  await database.query(`select set_config('app.holding', '*', false)`);
});
afterAll(async () => {
  await database.end();
  await browser.close();
});

/** An alarm as the worker would raise it. @returns its id */
async function raise(kind: string, about: object): Promise<string> {
  const id = uuid();
  await database.query(
    `insert into alarm (holding_id, id, house_id, key, kind, about, data, raised_at)
     select holding_id, $1, id, $2, $3, $4, '{}', now() - interval '5 minutes' from house where slug = 'long-house'
     order by created_at limit 1`,
    [id, `test ${id}`, kind, JSON.stringify(about)],
  );
  return id;
}
const clear = (id: string) => database.query('update alarm set cleared_at = now() where id = $1', [id]);

async function alarms(who = 'grower', width = 1400): Promise<Page> {
  const context = await signedIn(browser, sharedApp(), `${who}@larkmoor.example`, {
    viewport: { width, height: 900 },
  });
  const page = await context.newPage();
  await page.goto('/long-house/alarms');
  await page.getByRole('heading', { level: 1 }).waitFor();
  return page;
}

const TITLE = 'The gate-heap fan moves air but no heat';

describe('alarms in the browser', () => {
  it.each([
    ['wide', 1400],
    ['on a phone', 360],
  ])('have nothing that axe finds, %s', async (_, width) => {
    const id = await raise('no-gain', { channel: 'gate-heap-fan' });
    const page = await alarms('grower', width);
    await page.getByText(TITLE).first().waitFor();
    expect(await accessibilityFaults(page)).toEqual([]);
    expect(
      await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth),
    ).toBeLessThanOrEqual(0);
    await clear(id);
    await page.context().close();
  });

  it('are taken on by the keyboard, and others see by whom', async () => {
    const id = await raise('no-gain', { channel: 'gate-heap-fan' });
    const page = await alarms('grower');
    // the card itself: its title and its button have one parent that has no other card in it
    const card = page
      .locator('div')
      .filter({ hasText: TITLE })
      .filter({ has: page.getByRole('button') })
      .last();
    await card.getByRole('button', { name: 'I’ve got it' }).focus();
    await page.keyboard.press('Enter');
    await page
      .getByText(/grower@larkmoor.example has it since/)
      .first()
      .waitFor();
    const other = await alarms('installer');
    await other
      .getByText(/grower@larkmoor.example has it since/)
      .first()
      .waitFor();
    await clear(id);
    await page.context().close();
    await other.context().close();
  });

  it('come and go on an open page, and stand in the history after', async () => {
    const page = await alarms('owner');
    const id = await raise('daily-limit', { source: 'gate-heap' });
    const title = 'The gate heap has been drawn on to its daily limit';
    await page.getByText(title).first().waitFor({ timeout: 15_000 });
    await clear(id);
    await page.getByRole('row').filter({ hasText: title }).first().waitFor({ timeout: 15_000 });
    await page.context().close();
  });

  it('of one holding are unknown in another', async () => {
    const id = await raise('no-gain', { channel: 'gate-heap-fan' });
    const context = await signedIn(browser, sharedApp(), 'owner@stonebeck.example');
    const page = await context.newPage();
    const answer = await page.goto('/long-house/alarms');
    expect(answer?.status()).toBe(404);
    await clear(id);
    await context.close();
  });
});
