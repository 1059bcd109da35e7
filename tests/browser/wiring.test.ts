import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { accessibilityFaults, signedIn } from '../support/browser';
import { openOwnHouse, type OwnHouse } from '../support/browser-house';
import { sharedApp } from '../support/shared-app';

let browser: Browser;
let house: OwnHouse;

beforeAll(async () => {
  ({ browser, house } = await openOwnHouse());
});
afterAll(async () => browser.close());

async function open(who: string, slug = house.slug, width = 1400): Promise<Page> {
  const context = await signedIn(browser, sharedApp(), `${who}@larkmoor.example`, {
    viewport: { width, height: 900 },
  });
  const page = await context.newPage();
  await page.goto(`/${slug}/wiring`);
  await page.getByRole('heading', { level: 1 }).waitFor();
  return page;
}

/** What of tables the browser tells a screen reader, by role. */
async function tableRoles(page: Page): Promise<Map<string, number>> {
  const session = await page.context().newCDPSession(page);
  const { nodes } = await session.send('Accessibility.getFullAXTree');
  const roles = new Map<string, number>();
  for (const { ignored, role } of nodes) {
    const name = String(role?.value);
    if (!ignored && /^(table|rowgroup|row|cell|rowheader|columnheader)$/.test(name))
      roles.set(name, (roles.get(name) ?? 0) + 1);
  }
  return roles;
}

describe('wiring in the browser', () => {
  it.each([
    ['wide', 1400],
    ['on a phone', 360],
  ])('has nothing that axe finds, %s, nor has its form', async (_, width) => {
    const page = await open('installer', 'long-house', width);
    expect(await accessibilityFaults(page)).toEqual([]);
    expect(
      await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth),
    ).toBeLessThanOrEqual(0);
    await page.getByRole('button', { name: 'Add a channel…' }).click();
    await page.getByRole('dialog').getByLabel('Rated power').waitFor();
    expect(await accessibilityFaults(page)).toEqual([]);
    await page.context().close();
  });

  it('on a phone shows cards that nothing must be scrolled for, and they are tables all the same', async () => {
    const wide = await open('installer', 'long-house', 1400);
    const phone = await open('installer', 'long-house', 390);
    for (const name of ['Channels', 'Field nodes', 'Points']) {
      const group = phone.getByRole('group', { name, exact: true });
      expect(await group.evaluate((box) => box.scrollWidth - box.clientWidth), name).toBeLessThanOrEqual(0);
    }
    const term = (page: Page) =>
      page
        .locator('td[data-term="Circuit"]')
        .first()
        .evaluate((cell) => getComputedStyle(cell, '::before').content);
    expect(await term(phone)).toMatch(/Circuit|attr\(data-term\)/);
    expect(await term(wide)).toBe('none');
    const told = await tableRoles(phone);
    expect(told).toEqual(await tableRoles(wide));
    for (const role of ['table', 'columnheader', 'rowheader', 'row', 'cell'])
      expect(told.get(role)).toBeGreaterThan(2);
    await Promise.all([wide.context().close(), phone.context().close()]);
  });

  it('shows a new node’s token once, with where it goes', async () => {
    const page = await open('installer');
    await page.getByRole('button', { name: 'Register a node…' }).click();
    const sheet = page.getByRole('dialog');
    await sheet.getByLabel('Name of the node').fill('T-2');
    await sheet.getByRole('button', { name: 'Add the field node' }).click();
    await page.getByText('The token of T-2').waitFor();
    const token = await sheet.locator('code').textContent();
    expect(token).toMatch(/^[\w-]{40,}$/);
    await sheet.getByText('/field/v1').waitFor();
    await sheet.getByRole('button', { name: 'It is in the node' }).click();
    await page.getByRole('rowheader', { name: /^T-2/ }).waitFor();
    expect(await page.content()).not.toContain(token);
    await page.context().close();
  });

  it('names the field that is wrong and keeps what was typed', async () => {
    const page = await open('installer');
    await page.getByRole('button', { name: 'Add a point…' }).click();
    const sheet = page.getByRole('dialog');
    await sheet.getByLabel('Key', { exact: true }).fill('<script>');
    await sheet.getByLabel('Most it can read').fill('a lot');
    await sheet.getByRole('button', { name: 'Add the point' }).click();
    await sheet.getByText('Use letters, digits, dot, dash or underscore', { exact: false }).waitFor();
    await sheet.getByText('This is missing.').first().waitFor();
    await sheet.getByText('Choose one.').first().waitFor();
    await sheet.getByText('Give a number, such as 4.5.').waitFor();
    expect(await sheet.getByLabel('Key', { exact: true }).inputValue()).toBe('<script>');
    await page.keyboard.press('Escape');
    await sheet.getByText('What you typed is not saved.', { exact: false }).waitFor();
    await sheet.getByRole('button', { name: 'Go on typing' }).click();
    expect(await sheet.getByLabel('Most it can read').inputValue()).toBe('a lot');
    await page.context().close();
  });

  it('says at the field what the server refuses', async () => {
    const page = await open('installer');
    await page.getByRole('button', { name: /^Change Tunnel fan/ }).click();
    const sheet = page.getByRole('dialog');
    await sheet.getByLabel('Relay on its board').fill('9');
    await sheet.getByRole('button', { name: 'Save' }).click();
    await sheet.locator('[aria-invalid=true]').waitFor();
    expect(await sheet.getByLabel('Relay on its board').getAttribute('aria-invalid')).toBe('true');
    expect(await sheet.getByLabel('Relay on its board').inputValue()).toBe('9');
    await page.context().close();
  });

  it('asks for limits and proofs in one section, and keeps what was typed there when it is refused', async () => {
    const page = await open('installer');
    await page.getByRole('button', { name: /^Change Tunnel fan/ }).click();
    const sheet = page.getByRole('dialog');
    await sheet.getByText('Limits and proofs').click();
    await sheet.getByLabel('Goes by').selectOption('bench');
    await sheet.getByLabel('On below').fill('2');
    await sheet.getByLabel('Off over').fill('2.2');
    await sheet.getByLabel('On at a time, at most').fill('20');
    await sheet.getByLabel('Then off, at least').fill('40');
    await sheet.getByLabel('On without a break, at most').fill('90');
    await sheet.getByRole('button', { name: 'Save' }).click();
    await sheet.getByText('Off over must be at least 0.5 °C over on under.').waitFor();
    expect(await sheet.getByLabel('Then off, at least').inputValue()).toBe('40');
    await sheet.getByLabel('Off over').fill('5');
    await sheet.getByRole('button', { name: 'Save' }).click();
    await sheet.waitFor({ state: 'detached' });
    const answer = await page.request.get(`/api/v1/houses/${house.slug}/channels/1`);
    expect(await answer.json()).toMatchObject({
      longestOn: 5400,
      fallback: { point: 'bench', below: 2, above: 5, onFor: 1200, offFor: 2400 },
      highLimit: null,
    });
    await page.context().close();
  });

  it('locks a channel out with a reason; a grower may place it and not remove it', async () => {
    const page = await open('grower');
    await page.getByRole('button', { name: /^Lock out the Tunnel fan/ }).click();
    const dialog = page.getByRole('dialog');
    await dialog.getByText('A lock-out is not isolation', { exact: false }).waitFor();
    await dialog.getByRole('button', { name: 'Lock it out' }).click();
    await dialog.getByText('Say why in a few words', { exact: false }).waitFor();
    await dialog.getByLabel(/^Why/).fill('New belt.');
    await dialog.getByRole('button', { name: 'Lock it out' }).click();
    await page.getByText('Locked out: Tunnel fan, channel 1').waitFor();
    await page.getByText('“New belt.”').first().waitFor();
    expect(await page.getByRole('button', { name: 'Remove the lock-out…' }).count()).toBe(0);
    await page.context().close();

    const installer = await open('installer');
    await installer.getByRole('button', { name: 'Remove the lock-out…' }).click();
    await installer.getByRole('dialog').getByRole('button', { name: 'Remove it' }).click();
    await installer.getByText('Lock-outs before').waitFor();
    await installer.context().close();
  });

  it('refuses a lock-out of an NC contact with the reason', async () => {
    const page = await open('grower');
    await page.getByRole('button', { name: /^Lock out the Air stirrer/ }).click();
    await page.getByText('A relay cannot make this load dead', { exact: false }).waitFor();
    expect(await page.getByRole('button', { name: 'Lock it out' }).count()).toBe(0);
    await page.context().close();
  });

  it('is read-only to a grower, who is told why', async () => {
    const page = await open('grower');
    await page.getByText('You can read the wiring, not change it.').waitFor();
    expect(await page.getByRole('button', { name: /^(Change|Add|Register|New token)/ }).count()).toBe(0);
    await page.context().close();
  });

  it('begins with a house from nothing, and says what comes next', async () => {
    const page = await open('owner');
    await page.goto('/new-house');
    await page.getByRole('button', { name: 'Add the house' }).click();
    await page.getByText('This is missing.').first().waitFor();
    await page.getByLabel('Name', { exact: true }).fill('Cold frame yard');
    await page.getByLabel('Time zone').fill('Europe/Nowhere');
    await page.getByLabel(/^Latitude/).fill('54,2');
    await page.getByLabel(/^Longitude/).fill('-2.3');
    await page.getByRole('button', { name: 'Add the house' }).click();
    await page.getByText('Name an IANA time zone', { exact: false }).waitFor();
    await page.getByLabel('Time zone').fill('Europe/London');
    await page.getByRole('button', { name: 'Add the house' }).click();
    await page.waitForURL(/\/cold-frame-yard(-\d+)?\/setup/);
    await page.getByText('Next: field nodes.', { exact: false }).waitFor();
    await page.context().close();
  });
});
