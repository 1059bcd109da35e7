// The small holding goes out of the page and comes in beside itself; a grower is not offered it.
import { existsSync } from 'node:fs';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { accessibilityFaults, faultsOf, launchBrowser, signedIn } from '../support/browser';
import { sharedApp } from '../support/shared-app';
import { until } from '../support/until';

let browser: Browser;
beforeAll(async () => {
  browser = await launchBrowser();
});
afterAll(() => browser.close());

async function files(who: string, house: string, width = 1400): Promise<Page> {
  const context = await signedIn(browser, sharedApp(), who, { viewport: { width, height: 900 } });
  const page = await context.newPage();
  await page.goto(`/${house}/files`);
  await page.getByRole('heading', { level: 1 }).waitFor();
  return page;
}

describe('the whole holding on the page of files', () => {
  it('goes out, comes in as a holding of its own, and its house is put in service there', async () => {
    const page = await files('owner@stonebeck.example', 'beck-house');
    const faults = faultsOf(page);
    const fetched = page.waitForEvent('download', { timeout: 40_000 });
    // pressed again until its script is there
    await until(
      'the archive is asked for',
      async () => {
        await page
          .getByRole('button', { name: 'Make an archive' })
          .click({ timeout: 1000 })
          .catch(() => undefined);
        return page.getByText('Your browser fetches it').or(page.getByText('went out,')).isVisible();
      },
      20_000,
    );
    const file = await (await fetched).path();
    expect((await fetched).suggestedFilename()).toMatch(/^stonebeck-nursery-\d{4}-\d\d-\d\d\.zip$/);
    expect(existsSync(file)).toBe(true);

    await page.getByLabel('Archive', { exact: true }).setInputFiles(file);
    const bring = page.getByRole('button', { name: 'Bring it in as a new holding' });
    await bring.waitFor({ timeout: 60_000 });
    await page.getByText('This is Stonebeck Nursery as it stood').waitFor();
    expect(await accessibilityFaults(page)).toEqual([]);
    await page.getByLabel('Name of the new holding').fill('Stonebeck beside itself');
    await bring.click();
    const go = page.getByRole('button', { name: 'Go to Stonebeck beside itself' });
    await go.waitFor({ timeout: 100_000 });
    await go.click();
    await page.getByText('Beck house is laid up: nothing drives it').waitFor({ timeout: 30_000 });
    await page.getByText('Stonebeck beside itself').first().waitFor();
    expect(await accessibilityFaults(page)).toEqual([]);

    await page.goto('/beck-house/duty');
    await page.getByRole('button', { name: 'Put it in service' }).click();
    const dialog = page.getByRole('dialog');
    const serve = dialog.getByRole('button', { name: 'Put it in service' });
    await serve.click();
    await dialog.getByRole('alert').filter({ hasText: 'Nobody has proved' }).waitFor();
    await dialog.getByLabel('Rules may drive channels that nobody has proved here').check();
    await serve.click();
    await until('the notice is gone', async () => (await page.getByText('is laid up').count()) === 0, 20_000);
    expect(faults.filter((fault) => !fault.includes('409'))).toEqual([]);

    await page.goto('/account');
    await page.getByRole('button', { name: 'Go to Stonebeck Nursery' }).click();
    await page.waitForURL(/beck-house/, { timeout: 30_000 });
    expect(await page.getByText('Stonebeck beside itself').count()).toBe(0);
    await page.context().close();
  }, 300_000);

  it.each(['grower', 'installer'])('is not offered to a %s, who is told who can', async (role) => {
    const page = await files(`${role}@larkmoor.example`, 'long-house', 390);
    await page.getByText('An owner can take the whole holding away').waitFor();
    expect(await page.getByRole('button', { name: 'Make an archive' }).count()).toBe(0);
    const asked = await page.request.get('/api/v1/archives');
    expect(asked.status()).toBe(403);
    await page.context().close();
  });
});
