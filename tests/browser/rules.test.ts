import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { accessibilityFaults, signedIn } from '../support/browser';
import { makeHouse, openOwnHouse, wireHouse, type OwnHouse } from '../support/browser-house';
import { sharedApp } from '../support/shared-app';

let browser: Browser;
let owner: BrowserContext;
let house: OwnHouse;

beforeAll(async () => {
  ({ browser, owner, house } = await openOwnHouse());
});
afterAll(async () => browser.close());

async function open(path: string, who = 'grower', width = 1400): Promise<Page> {
  const email = `${who}@${who === 'neighbour' ? 'stonebeck' : 'larkmoor'}.example`.replace(
    'neighbour',
    'owner',
  );
  const context = await signedIn(browser, sharedApp(), email, { viewport: { width, height: 900 } });
  const page = await context.newPage();
  await page.goto(path);
  return page;
}
const EDITOR = '/long-house/rules/gate-heap-fan-by-the-bench';
const sideways = (page: Page) =>
  page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);

/** A rule of the test's own house, as a draft. */
async function draft(name: string): Promise<string> {
  const body = { purpose: 'warm', point: 'bench', band: [{ from: '00:00', low: 4, high: 7 }] };
  const rule = await house.post('/rules', { name, channel: 'fan', body });
  return `/${house.slug}/rules/${String((rule as { slug: unknown }).slug)}`;
}

describe('rules in the browser', () => {
  it.each([
    ['/long-house/rules', 1400],
    ['/long-house/rules', 360],
    [EDITOR, 1400],
    [EDITOR, 360],
  ])('%s has nothing that axe finds and does not scroll sideways, %i wide', async (path, width) => {
    const page = await open(path, 'grower', width);
    await page.getByRole('heading', { level: 1 }).waitFor();
    expect(await accessibilityFaults(page)).toEqual([]);
    expect(await sideways(page)).toBeLessThanOrEqual(0);
    await page.context().close();
  });

  it('say what to do first, and the first rule is written and put into force', async () => {
    const own = await makeHouse(owner, sharedApp().url);
    await wireHouse(own);
    const page = await open(`/${own.slug}/rules`);
    await page.getByText('Write the first rule.').waitFor();
    await page.getByRole('button', { name: 'New rule…' }).click();
    await page.getByRole('button', { name: 'Write the draft' }).click();
    await page.getByText('Choose the channel that it runs.').waitFor();
    await page.getByLabel('Runs').selectOption('fan');
    await page.getByLabel('Goes by').selectOption('bench');
    await page.getByRole('button', { name: 'Write the draft' }).click();
    await page.waitForURL(/\/rules\/tunnel-fan-by-the-bench/);
    await page.getByLabel(/^On below/).fill('5,5');
    await page.getByRole('heading', { level: 1 }).getByText('5.5 °C').waitFor();

    await page.getByRole('button', { name: 'Put into force…' }).click();
    const dialog = page.getByRole('dialog');
    await dialog.getByRole('button', { name: 'Put into force' }).click();
    await dialog.getByText(/Say why in a few words/).waitFor();
    await dialog.getByLabel(/^Why/).fill('First frost.');
    await dialog.getByRole('button', { name: 'Put into force' }).click();
    await dialog.getByText(/or have the channel proved first/).waitFor();
    expect(await dialog.getByLabel(/^Why/).inputValue()).toBe('First frost.');
    await dialog.getByLabel(/to put it into force all the same/).fill('run it unproved');
    await dialog.getByRole('button', { name: 'Put into force' }).click();
    await page.getByText('1 · in force').waitFor();
    await page.getByText('“First frost.”').waitFor();
    await page.context().close();
  });

  it('name a field that cannot be read, and lose nothing that was typed', async () => {
    const page = await open(await draft('Hostile text'));
    const [low, high] = [page.getByLabel(/^On below/), page.getByLabel(/^Off above/)];
    await low.fill('<img src=x onerror=alert(1)>');
    await high.fill('9'.repeat(300));
    await page.getByRole('button', { name: 'Save draft' }).click();
    await page.getByText('Give a number in °C, such as 4.5.').waitFor();
    expect(await low.getAttribute('aria-invalid')).toBe('true');
    expect(await low.inputValue()).toBe('<img src=x onerror=alert(1)>');
    expect(await high.inputValue()).toHaveLength(300);
    await low.fill('');
    await high.fill('7');
    await page.getByRole('button', { name: 'Save draft' }).click();
    await page.getByText('Give a number in °C, such as 4.5.').waitFor();
    await low.fill('6.8');
    await page.getByText(/at least 0.5 °C over/).waitFor();
    await page.context().close();
  });

  it('keep what was typed when the server refuses, and say why at the field', async () => {
    const page = await open(await draft('Refused text'));
    await page.route('**/draft', (route) =>
      route.fulfill({
        status: 422,
        contentType: 'application/problem+json',
        body: JSON.stringify({
          title: 'Not valid',
          detail: 'Some fields need another look.',
          errors: [{ path: 'band.0.low', message: 'This house cannot be that warm.' }],
        }),
      }),
    );
    await page.getByLabel(/^On below/).fill('5');
    await page.getByRole('button', { name: 'Save draft' }).click();
    await page.getByText('This house cannot be that warm.').waitFor();
    expect(await page.getByLabel(/^On below/).inputValue()).toBe('5');
    await page.context().close();
  });

  it('are moved by the keyboard alone', async () => {
    const page = await open(await draft('By the keyboard'));
    await page.locator('button[type=submit]:enabled').waitFor();
    await page.getByLabel(/^Lower threshold/).focus();
    await page.keyboard.press('ArrowRight');
    expect(await page.getByLabel(/^On below/).inputValue()).toBe('4.5');
    await page.getByLabel(/^Off above/).focus();
    await page.keyboard.press('Enter');
    await page.getByText('The draft is saved.', { exact: false }).waitFor();
    await page.reload();
    expect(await page.getByLabel(/^On below/).inputValue()).toBe('4.5');
    await page.context().close();
  });

  it('warn before unsaved text is left behind', async () => {
    const path = await draft('Left behind');
    const page = await open(path);
    await page.getByLabel(/^On below/).fill('3');
    await page.getByText('Not saved yet').waitFor();
    await page.getByRole('link', { name: 'Wiring' }).first().click();
    await page.getByText('Leave with unsaved changes?').waitFor();
    await page.keyboard.press('Escape');
    expect(await page.getByLabel(/^On below/).inputValue()).toBe('3');
    await page.getByRole('link', { name: 'Wiring' }).first().click();
    await page.getByRole('button', { name: 'Leave, throw it away' }).click();
    await page.waitForURL(/\/wiring$/);
    await page.context().close();
  });

  it('are renamed, lose their draft and are retired only after a dialog that says what happens', async () => {
    const path = await draft('To be retired');
    const page = await open(path);
    const dialog = page.getByRole('dialog');
    await page.getByRole('button', { name: 'Rename…' }).click();
    await dialog.getByLabel('Name').fill(' ');
    await dialog.getByRole('button', { name: 'Rename' }).click();
    await dialog.getByText('Give a name.').waitFor();
    await dialog.getByLabel('Name').fill('Soon retired');
    await dialog.getByRole('button', { name: 'Rename' }).click();
    await page.getByRole('heading', { level: 1 }).getByText('Soon retired').waitFor();
    await page.getByLabel(/^On below/).fill('5');
    await page.getByRole('button', { name: 'Save draft' }).click();
    await page.getByText('The draft is saved.', { exact: false }).waitFor();
    await page.getByRole('button', { name: 'Retire…' }).click();
    await dialog.getByText('no load is touched', { exact: false }).waitFor();
    await dialog.getByRole('button', { name: 'Retire it' }).click();
    await dialog.getByText('Say why in a few words', { exact: false }).waitFor();
    await dialog.getByLabel('Why').fill('Never needed.');
    await dialog.getByRole('button', { name: 'Retire it' }).click();
    await page.waitForURL(/\/rules$/);
    await page.getByRole('region', { name: 'Retired' }).getByRole('link', { name: 'Soon retired' }).click();
    await page.getByText('This rule is retired: nothing runs by it.').waitFor();
    await page.getByText('grower@larkmoor.example retired it', { exact: false }).waitFor();
    await page.getByText('“Never needed.”').first().waitFor();
    await page.getByRole('button', { name: 'Bring version 1 back as the draft' }).click();
    await page.getByText('The rule is back, with version 1 as its draft.', { exact: false }).waitFor();
    await page.getByText('This rule is retired: nothing runs by it.').waitFor({ state: 'detached' });
    await page.getByRole('button', { name: 'Throw the draft away…' }).click();
    await dialog.getByRole('button', { name: 'Throw it away' }).click();
    await page.getByText('The draft is thrown away.').waitFor();
    await page.context().close();
  });

  it('are read-only to an installer, who is told why, and whom the route refuses', async () => {
    const page = await open(EDITOR, 'installer');
    await page.getByText('You can read this rule, not change it.').waitFor();
    expect(await page.getByLabel(/^On below/).isDisabled()).toBe(true);
    expect(await page.getByRole('button', { name: 'Put into force…' }).count()).toBe(0);
    expect(await page.getByRole('button', { name: /^(Rename|Retire|Throw)/ }).count()).toBe(0);
    const answer = await page.request.post('/api/v1/rules/gate-heap-fan-by-the-bench/force', {
      data: { why: 'x' },
      headers: { origin: sharedApp().url },
    });
    expect(answer.status()).toBe(403);
    await page.context().close();
  });

  it('are not found by the other holding', async () => {
    const page = await open(EDITOR, 'neighbour');
    await page.getByText('There is no such page here.').first().waitFor();
    await page.context().close();
  });
});
