// A rule's times by the sun, its copy in another house, its comparison.
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { accessibilityFaults, signedIn } from '../support/browser';
import { makeHouse, openOwnHouse, wireHouse, type OwnHouse } from '../support/browser-house';
import { sharedApp } from '../support/shared-app';

let browser: Browser;
let owner: BrowserContext;
let house: OwnHouse;
let other: OwnHouse;

beforeAll(async () => {
  ({ browser, owner, house } = await openOwnHouse());
  other = await makeHouse(owner, sharedApp().url);
  await wireHouse(other);
  const air = { node: 'T-1', role: 'humidity', unit: '%RH' };
  await house.post('/points', { ...air, key: 'damp', name: 'Damp' });
  await other.post('/points', { ...air, key: 'wet', name: 'Wet' });
});
afterAll(async () => browser.close());

const body = {
  purpose: 'warm',
  point: 'bench',
  band: [{ from: '00:00', low: 4, high: 7 }],
  only: { all: [{ fact: 'damp', operator: 'lessThan', value: 90 }] },
};

async function open(name: string): Promise<{ page: Page; slug: string }> {
  const rule = (await house.post('/rules', { name, channel: 'fan', body })) as { slug: string };
  const context = await signedIn(browser, sharedApp(), 'grower@larkmoor.example');
  const page = await context.newPage();
  await page.goto(`/${house.slug}/rules/${rule.slug}`);
  await page.locator('button[type=submit]:enabled').waitFor();
  return { page, slug: rule.slug };
}
const told = async (page: Page, slug: string) =>
  (await (await page.request.get(`/api/v1/rules/${slug}`)).json()) as Record<string, unknown>;

describe('a rule in the browser', () => {
  it('is copied to another house with its points mapped, as a draft that runs nothing', async () => {
    const { page, slug } = await open('To be copied');
    await page.getByRole('button', { name: 'Copy to another channel…' }).click();
    const dialog = page.getByRole('dialog');
    await dialog.getByLabel('House', { exact: true }).selectOption(other.slug);
    await dialog.getByRole('option', { name: '2 · Air stirrer' }).waitFor({ state: 'attached' });
    expect(await accessibilityFaults(page)).toEqual([]);
    await dialog.getByRole('button', { name: 'Write the copy' }).click();
    await dialog.getByText('Choose the channel that it shall run.').waitFor();
    await dialog.getByLabel('Runs there').selectOption('stirrer');
    await dialog.getByLabel('Name').fill('A copy there');
    // the same key, and the only humidity of that house, are suggested
    expect(await dialog.getByLabel('Bench').inputValue()).toBe('bench');
    expect(await dialog.getByLabel('Damp').inputValue()).toBe('wet');
    expect(await dialog.getByLabel('Damp').locator('option[value=bench]').isDisabled()).toBe(true);
    await dialog.getByRole('button', { name: 'Write the copy' }).click();
    await page.waitForURL(/a-copy-there/);
    await page.getByText('Began as a copy of version 1 of').waitFor();
    expect(await told(page, 'a-copy-there')).toMatchObject({
      ...{ house: other.slug, channel: 'stirrer', inForce: null, draft: { number: 1 } },
      body: { point: 'bench', only: { all: [{ fact: 'wet' }] } },
      copiedFrom: { rule: slug },
    });
    await page.context().close();
  });

  it('shows at its field what the server refuses of a copy, and keeps what was chosen', async () => {
    const { page } = await open('Refused copy');
    await page.route('**/copy', (route) =>
      route.fulfill({
        status: 422,
        contentType: 'application/problem+json',
        body: JSON.stringify({ errors: [{ path: 'points.1.to', message: 'Wet was taken out of use.' }] }),
      }),
    );
    await page.getByRole('button', { name: 'Copy to another channel…' }).click();
    const dialog = page.getByRole('dialog');
    await dialog.getByLabel('Runs there').selectOption('stirrer');
    await dialog.getByRole('button', { name: 'Write the copy' }).click();
    await dialog.getByText('Wet was taken out of use.').waitFor();
    expect(await dialog.getByLabel('Damp').getAttribute('aria-invalid')).toBe('true');
    expect(await dialog.getByLabel('Runs there').inputValue()).toBe('stirrer');
    await page.context().close();
  });

  it('has periods and hours by the sun, stand-ins in order, and says so in its sentence', async () => {
    const { page, slug } = await open('By the sun');
    await page.getByRole('button', { name: /Add a period/ }).click();
    await page
      .getByLabel(/by how much/)
      .last()
      .fill('1 h 30');
    await page
      .getByLabel(/^Off above/)
      .last()
      .fill('9');
    await page.getByLabel('Only at some hours of the day').check();
    await page.getByLabel('From', { exact: true }).last().selectOption('after-sunset');
    await page
      .getByLabel(/^From: by how much/)
      .last()
      .fill('0');
    await page.getByRole('heading', { level: 1 }).getByText('90 min before sunset').waitFor();
    await page.getByRole('button', { name: 'Save draft' }).click();
    await page.getByText('The draft is saved.', { exact: false }).first().waitFor();
    expect(await told(page, slug)).toMatchObject({
      body: {
        band: [{ from: '00:00' }, { from: 'sunset-01:30', low: 4, high: 9 }],
        hours: { from: 'sunset', to: '08:00' },
      },
    });
    await page.reload();
    expect(
      await page
        .getByLabel(/by how much/)
        .first()
        .inputValue(),
    ).toBe('90');
    await page.context().close();
  });

  it('is compared between any two of its versions, in words', async () => {
    const { page, slug } = await open('Compared');
    const origin = { headers: { origin: sharedApp().url } };
    for (const high of [7.5, 8]) {
      const data = { ...body, band: [{ from: '00:00', low: 4, high }] };
      await page.request.put(`/api/v1/rules/${slug}/draft`, { data, ...origin });
      const force = { why: `to ${high}`, acceptUnproved: true };
      await page.request.post(`/api/v1/rules/${slug}/force`, { data: force, ...origin });
    }
    const spring = { ...body, band: [{ from: '00:00', low: 3, high: 8 }] };
    await page.request.put(`/api/v1/rules/${slug}/draft`, { data: spring, ...origin });
    await page.reload();
    await page.getByRole('button', { name: 'Compare two…' }).click();
    const sheet = page.getByRole('dialog');
    await sheet.getByText('on below: 4.0 → 3.0 °C').waitFor();
    await sheet.getByLabel('From version').selectOption('1');
    await sheet.getByText('off above: 7.5 → 8.0 °C').waitFor();
    await sheet.getByLabel('to version').selectOption('1');
    await sheet.getByText('Choose two different versions.').waitFor();
    expect(await accessibilityFaults(page)).toEqual([]);
    await page.context().close();
  });
});
