// Without a line at the heap: what is written waits on the phone and is sent later, once; nothing is there after signing out.
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { accessibilityFaults, launchBrowser, signedIn } from '../support/browser';
import { sharedApp } from '../support/shared-app';
import { until } from '../support/until';

let browser: Browser;
beforeAll(async () => {
  browser = await launchBrowser();
});
afterAll(() => browser.close());

async function onPhone(): Promise<{ context: BrowserContext; page: Page }> {
  const context = await signedIn(browser, sharedApp(), 'grower@larkmoor.example', {
    viewport: { width: 390, height: 844 },
  });
  const page = await context.newPage();
  await page.goto('/long-house/heap-book');
  await page.getByRole('heading', { level: 1 }).waitFor();
  return { context, page };
}

/** The worker keeps the shell while it is installed; once it is active it takes the lead of the page that is open. */
async function shellIsKept(page: Page): Promise<void> {
  await until(
    'the worker that keeps the page',
    () =>
      page.evaluate(async () =>
        (await caches.open('heap-book-shell-1')).match('/offline-book').then(Boolean),
      ),
    30_000,
  );
  await until(
    'the worker to lead the page',
    () => page.evaluate(() => navigator.serviceWorker.controller !== null),
    20_000,
  );
}

const entriesWith = async (page: Page, words: string): Promise<number> => {
  const answer = await page.request.get('/api/v1/houses/long-house/heap-entries?limit=500');
  const { items } = (await answer.json()) as { items: { text: string }[] };
  return items.filter((entry) => entry.text === words).length;
};

/** A note, by the form: pressed until the page listens. */
async function writeDown(page: Page, words: string): Promise<void> {
  await until(
    'the form',
    async () => {
      await page
        .getByRole('button', { name: 'Note', exact: true })
        .click({ timeout: 1000 })
        .catch(() => undefined);
      return page.getByRole('dialog').isVisible();
    },
    20_000,
  );
  await page.getByLabel('What you saw').fill(words);
  await page.getByRole('button', { name: 'Write it down' }).click();
}

describe('the heap book without a line', () => {
  it('takes an entry and a round on the page that it keeps, and sends both once when the line is back', async () => {
    const { context, page } = await onPhone();
    await shellIsKept(page);
    await context.setOffline(true);
    await page.goto('/long-house/heap-book?heap=gate-heap');
    await page.getByText('No line just now').waitFor();
    expect(page.url()).toContain('/offline-book');
    expect(await accessibilityFaults(page)).toEqual([]);
    const words = `Written in the snow ${Date.now()}`;
    await page.getByRole('button', { name: 'Note', exact: true }).click();
    await page.getByRole('button', { name: 'Ammonia' }).click();
    await page.getByText('More carbon').waitFor();
    await page.getByLabel('What you saw').fill(words);
    await page.getByRole('button', { name: 'Write it down' }).click();
    await page.getByText('Waiting to be sent: 1').waitFor();
    await page.getByRole('button', { name: 'Probe round', exact: true }).click();
    for (const key of ['4', '5', 'Decimal point', '4', '3', '8', 'Decimal point', '1'])
      await page.getByRole('button', { name: key, exact: true }).click();
    await page.getByRole('button', { name: 'Column 1, row 2: 38.1' }).waitFor();
    await page.getByLabel('What you saw').fill(words);
    await page.getByRole('button', { name: 'Write the round down' }).click();
    await page.getByText('Waiting to be sent: 2').waitFor();
    // as it is after a dead battery
    await page.reload();
    await page.getByText('Waiting to be sent: 2').waitFor();
    await context.setOffline(false);
    await page.getByText('Waiting to be sent: 2').waitFor({ state: 'detached', timeout: 45_000 });
    expect(await entriesWith(page, words)).toBe(1);
    const rounds = await page.request.get('/api/v1/houses/long-house/probe-sets');
    const { items } = (await rounds.json()) as { items: { text: string; places: unknown[] }[] };
    expect(items.filter((round) => round.text === words).map((round) => round.places)).toEqual([
      [
        { column: 0, row: 0, celsius: 45.4 },
        { column: 0, row: 1, celsius: 38.1 },
      ],
    ]);
    await context.close();
  });

  it('is sent once where the answer was lost on its way', async () => {
    const { context, page } = await onPhone();
    const words = `The answer was lost ${Date.now()}`;
    let lost = 0;
    await page.route('**/heap-entries', async (route) => {
      if (route.request().method() !== 'POST' || lost > 0) return route.continue();
      lost += 1;
      // the server writes it down, and the line is cut before it can say so
      await route.fetch();
      await route.abort('connectionreset');
    });
    await writeDown(page, words);
    await page.getByRole('dialog').waitFor({ state: 'detached' });
    await page.getByText('Waiting to be sent: 1').waitFor();
    expect(await entriesWith(page, words)).toBe(1);
    await page.getByRole('button', { name: 'Send now' }).click();
    await page.getByText('Waiting to be sent: 1').waitFor({ state: 'detached' });
    expect([lost, await entriesWith(page, words)]).toEqual([1, 1]);
    await context.close();
  });

  it('shows nothing of the holding once its grower has signed out', async () => {
    const { context, page } = await onPhone();
    await shellIsKept(page);
    await page.getByText('More', { exact: true }).click();
    await page.getByRole('button', { name: 'Sign out' }).last().click();
    await page.waitForURL('**/sign-in**');
    await context.setOffline(true);
    await page.goto('/long-house/heap-book');
    await page.getByText('this device keeps no book').waitFor();
    expect(await page.locator('body').innerText()).not.toMatch(/gate|larkmoor/i);
    const kept = await page.evaluate(async () => {
      const cache = await caches.open('heap-book-shell-1');
      const texts = await Promise.all((await cache.matchAll()).map((one) => one.text()));
      return texts.join('\n');
    });
    expect(kept).not.toMatch(/larkmoor|gate-heap/i);
    await context.close();
  });

  it('neither shows nor sends what another person left waiting', async () => {
    const { context, page } = await onPhone();
    const words = `Left behind ${Date.now()}`;
    await page.route('**/heap-entries', (route) =>
      route.request().method() === 'POST' ? route.abort('internetdisconnected') : route.continue(),
    );
    await writeDown(page, words);
    await page.getByText('Waiting to be sent: 1').waitFor();
    await page.unroute('**/heap-entries');
    const other = await signedIn(browser, sharedApp(), 'owner@larkmoor.example', {});
    await context.clearCookies();
    await context.addCookies(await other.cookies());
    await page.goto('/long-house/heap-book');
    await page.getByRole('button', { name: 'Note', exact: true }).waitFor();
    await page.waitForFunction(
      () => localStorage.getItem('middenward.heap-book')?.includes('owner@') === true,
    );
    expect(await page.getByText('Waiting to be sent').count()).toBe(0);
    expect(await entriesWith(page, words)).toBe(0);
    await other.close();
    await context.close();
  });
});
