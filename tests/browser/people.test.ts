import type { Browser, Locator, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { accessibilityFaults, launchBrowser, signedIn } from '../support/browser';
import { sharedApp } from '../support/shared-app';
import { until } from '../support/until';

let browser: Browser;

beforeAll(async () => {
  browser = await launchBrowser();
});
afterAll(() => browser.close());

async function at(path: string, who = 'owner', width = 1400): Promise<Page> {
  const context = await signedIn(browser, sharedApp(), `${who}@larkmoor.example`, {
    viewport: { width, height: 900 },
  });
  const page = await context.newPage();
  await page.goto(path);
  await page.getByRole('heading', { level: 1 }).waitFor();
  return page;
}

/** A page is pressed as soon as it shows; what comes before its script is there is pressed again, as a person would. */
async function openForm(page: Page, button: string): Promise<Locator> {
  const dialog = page.getByRole('dialog');
  const press = page.getByRole('button', { name: button, exact: true });
  await until(
    `the form behind ${button}`,
    async () => {
      // the form may open between the look and the press, and then lies over the button
      if (!(await dialog.isVisible())) await press.click({ timeout: 1000 }).catch(() => undefined);
      return dialog.isVisible();
    },
    20_000,
  );
  return dialog;
}

describe('People in the browser', () => {
  it.each([
    ['/people', 1400],
    ['/people', 360],
    ['/account', 1400],
    ['/account', 360],
    ['/people/mail', 1400],
  ])('%s has nothing that axe finds at %i px', async (path, width) => {
    const page = await at(path, 'owner', width);
    expect(await accessibilityFaults(page)).toEqual([]);
    expect(
      await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth),
    ).toBeLessThanOrEqual(0);
    await page.context().close();
  });

  it('shows members to a grower without controls, and says who has them', async () => {
    const page = await at('/people', 'grower');
    expect(await page.getByRole('row').filter({ hasText: 'installer@larkmoor.example' }).count()).toBe(1);
    expect(await page.getByText('Who owns the holding invites people').isVisible()).toBe(true);
    expect(await page.getByRole('button', { name: /Invite|Remove|Role/ }).count()).toBe(0);
    expect(await page.getByText('Audit log').count()).toBe(0);
    await page.context().close();
  });

  it('refuses what is no address, then sends a letter that can be read here, and takes it back', async () => {
    const page = await at('/people');
    const email = `cover-${Date.now()}@larkmoor.example`;
    const dialog = await openForm(page, 'Invite…');
    await dialog.getByLabel('E-mail').fill('not an address');
    await dialog.getByRole('button', { name: 'Send the letter' }).click();
    await dialog.getByText('Give an e-mail address').waitFor();
    expect(await dialog.getByLabel('E-mail').inputValue()).toBe('not an address');
    expect(await accessibilityFaults(page)).toEqual([]);
    await dialog.getByLabel('E-mail').fill(email);
    await page.keyboard.press('Enter');
    await dialog.waitFor({ state: 'detached' });
    const invited = page.getByRole('listitem').filter({ hasText: email });
    await invited.waitFor();
    const letters = await page.context().newPage();
    await letters.goto('/people/mail');
    await letters.getByText(`to ${email}`).waitFor({ timeout: 20_000 });
    await letters.close();
    await invited.getByRole('button', { name: /Take back/ }).click();
    await invited.waitFor({ state: 'detached' });
    await page.context().close();
  });

  it('shows a key once; it works, and is refused when it is ended', async () => {
    const page = await at('/people');
    const name = `Weather mast ${Date.now()}`;
    const dialog = await openForm(page, 'New key…');
    await dialog.getByRole('button', { name: 'Make the key' }).click();
    await dialog.getByText('Give a name.').waitFor();
    await dialog.getByLabel('Name').fill(name);
    await dialog.getByRole('button', { name: 'Make the key' }).click();
    const key = await dialog.locator('code').innerText();
    const asked = () => fetch(`${sharedApp().url}/api/v1/houses`, { headers: { 'x-api-key': key } });
    expect((await asked()).status).toBe(200);
    await dialog.getByRole('button', { name: 'I have it' }).click();
    await page.reload();
    expect(await page.content()).not.toContain(key);
    // the audit log names the key too
    const row = page
      .getByRole('table', { name: 'Keys of programs' })
      .getByRole('row')
      .filter({ hasText: name });
    await row.getByRole('button', { name: /End/ }).click();
    await page.getByRole('button', { name: 'End it' }).click();
    // under an open dialog the rows are hidden from roles: they would seem gone at once
    await page.getByRole('dialog').waitFor({ state: 'detached' });
    await row.waitFor({ state: 'detached' });
    expect((await asked()).status).toBe(401);
    await page.context().close();
  });

  it('keeps the last owner, and says why', async () => {
    const page = await at('/people');
    const row = page.getByRole('row').filter({ hasText: '(you)' });
    await row.getByRole('button', { name: /Remove/ }).click();
    await page.getByRole('button', { name: 'Remove me' }).click();
    await page.getByRole('dialog').getByText('last owner').waitFor();
    await page.context().close();
  });

  it('changes a role after saying what it may do, and back', async () => {
    const page = await at('/people');
    const row = page.getByRole('row').filter({ hasText: 'installer@larkmoor.example' });
    for (const role of ['Grower', 'Installer']) {
      await row.getByRole('button', { name: /Role/ }).click();
      await page
        .getByRole('dialog')
        .getByRole('radio', { name: new RegExp(`^${role}`) })
        .check();
      await page.getByRole('button', { name: `Change to ${role}` }).click();
      await page.getByRole('dialog').waitFor({ state: 'detached' });
      await row.getByRole('cell', { name: role, exact: true }).waitFor();
    }
    await page.context().close();
  });
});

describe('the account in the browser', () => {
  it('tells at its field that the present password is wrong, and keeps what was typed', async () => {
    const page = await at('/account', 'grower');
    await page.getByLabel('Password now').fill('this is not the one');
    await page.getByRole('textbox', { name: 'New password' }).fill('short');
    await page.getByRole('button', { name: 'Change password' }).click();
    await page.getByText('At least 15 characters; a few plain words will do.').nth(1).waitFor();
    await page.getByRole('textbox', { name: 'New password' }).fill('nine damp leaves in a row');
    await page.getByRole('button', { name: 'Change password' }).click();
    await page.getByText('That is not the password of this account.').waitFor();
    expect(await page.getByRole('textbox', { name: 'New password' }).inputValue()).toBe(
      'nine damp leaves in a row',
    );
    await page.context().close();
  });

  it('ends all other sessions', async () => {
    const lost = await at('/account', 'installer');
    const page = await at('/account', 'installer');
    await page.getByRole('button', { name: 'Sign out everywhere else' }).click();
    await page.getByText('You are signed out everywhere else.').waitFor();
    await lost.goto('/account');
    expect(new URL(lost.url()).pathname).toBe('/sign-in');
    await page.context().close();
    await lost.context().close();
  });
});
