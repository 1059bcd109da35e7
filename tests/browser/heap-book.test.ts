import type { Browser, Locator, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { accessibilityFaults, faultsOf, launchBrowser, signedIn } from '../support/browser';
import { sharedApp } from '../support/shared-app';
import { until } from '../support/until';
import { picture } from '../api/picture';

let browser: Browser;

beforeAll(async () => {
  browser = await launchBrowser();
});
afterAll(() => browser.close());

async function book(who: string, width = 1400): Promise<Page> {
  const context = await signedIn(browser, sharedApp(), `${who}@larkmoor.example`, {
    viewport: { width, height: 900 },
  });
  const page = await context.newPage();
  await page.goto('/long-house/heap-book');
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

describe('the heap book in the browser', () => {
  it.each([
    ['wide', 1400],
    ['on a phone', 360],
  ])('has nothing that axe finds, with its form open too, %s', async (_, width) => {
    const page = await book('grower', width);
    expect(await accessibilityFaults(page)).toEqual([]);
    expect(
      await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth),
    ).toBeLessThanOrEqual(0);
    await openForm(page, 'Turned');
    await page
      .getByRole('dialog')
      .getByText(/carbon monoxide/)
      .waitFor();
    expect(await accessibilityFaults(page)).toEqual([]);
    await page.context().close();
  });

  it('takes an entry by the keyboard alone', async () => {
    const page = await book('grower');
    const faults = faultsOf(page);
    const words = `Damp to the hand, ${Date.now()}`;
    await page.getByRole('button', { name: 'Note', exact: true }).focus();
    await page.keyboard.press('Enter');
    await page.getByLabel('What you saw').focus();
    await page.keyboard.type(words);
    // past the photographs to the button
    await page.keyboard.press('Tab');
    await page.keyboard.press('Tab');
    await page.keyboard.press('Enter');
    await page.getByRole('dialog').waitFor({ state: 'detached' });
    await page.getByRole('listitem').getByText(words).first().waitFor();
    expect(faults).toEqual([]);
    await page.context().close();
  });

  it('says at the field what is wrong and keeps what was typed', async () => {
    const page = await book('grower');
    const dialog = await openForm(page, 'Fed');
    await dialog.getByLabel('Material 1', { exact: true }).fill('Straw');
    await dialog.getByLabel(/^Amount/).fill('a lot');
    await dialog.getByLabel(/^Water added/).fill('1e9');
    await dialog.getByRole('button', { name: 'Write it down' }).click();
    await dialog.getByText('Give a number, such as 120 or 7.5.').first().waitFor();
    expect(await dialog.getByLabel(/^Amount/).getAttribute('aria-invalid')).toBe('true');
    expect(await dialog.getByLabel('Material 1', { exact: true }).inputValue()).toBe('Straw');
    await dialog.getByLabel(/^Amount/).fill('25');
    await dialog.getByLabel(/^Water added/).fill('999999');
    await dialog.getByRole('button', { name: 'Write it down' }).click();
    await dialog.getByText('At most 100000 L.').waitFor();
    await page.context().close();
  });

  it('shows hostile text as text', async () => {
    const page = await book('grower');
    const hostile = `<img src=x onerror="document.title='broken'"> ${Date.now()}`;
    await openForm(page, 'Note');
    await page.getByLabel('What you saw').fill(hostile);
    await page.getByRole('button', { name: 'Write it down' }).click();
    await page.getByText(hostile).first().waitFor();
    expect(await page.title()).not.toBe('broken');
    await page.context().close();
  });

  it('is amended, and says by whom', async () => {
    const page = await book('grower');
    const words = `Watered at the north end ${Date.now()}`;
    await openForm(page, 'Watered');
    await page.getByLabel(/^Water added/).fill('40');
    await page.getByLabel(/^What was done/).fill(words);
    await page.getByRole('button', { name: 'Write it down' }).click();
    const entry = page.getByRole('listitem').filter({ hasText: words }).last();
    await entry.getByRole('button', { name: /^Amend/ }).click();
    await page
      .getByRole('dialog')
      .getByLabel(/^Water added/)
      .fill('55');
    await page.getByRole('button', { name: 'Save' }).click();
    await page.getByRole('dialog').waitFor({ state: 'detached' });
    await entry.getByText(/amended by/).waitFor();
    expect(await entry.innerText()).toContain('55');
    await page.context().close();
  });

  it('says to an installer why there is nothing to press', async () => {
    const page = await book('installer');
    expect(await page.getByText('Growers and owners write in this book').isVisible()).toBe(true);
    expect(await page.getByRole('button', { name: 'Fed', exact: true }).count()).toBe(0);
    await page.context().close();
  });

  it('draws a round in section as soon as it is typed, place after place', async () => {
    const page = await book('grower');
    const dialog = await openForm(page, 'Probe round …');
    await dialog.getByRole('button', { name: 'Column 1, row 1: empty' }).focus();
    // each figure is whole with its decimal, so the next place comes by itself
    await page.keyboard.type('21.430.525.141.252.349.9');
    await dialog.getByRole('button', { name: 'Column 2, row 3: 49.9' }).waitFor();
    expect(await accessibilityFaults(page)).toEqual([]);
    await dialog.getByRole('button', { name: 'Write the round down' }).click();
    await dialog.waitFor({ state: 'detached' });
    const drawing = page.getByRole('img', { name: /^Heap in section/ });
    await drawing.waitFor();
    await until('the round is drawn', async () =>
      /column 2, row 2: 52\.3/.test((await drawing.getAttribute('aria-label')) ?? ''),
    );
    expect(await drawing.locator('g path').count()).toBeGreaterThan(3);

    await page.getByText('Rounds as a table').click();
    const rounds = page.getByRole('table', { name: 'Probe rounds' });
    await rounds.getByRole('button', { name: 'Amend' }).first().click();
    const again = page.getByRole('dialog', { name: 'Probe round' });
    await again.getByRole('button', { name: 'Column 2, row 2: 52.3' }).click();
    await page.keyboard.press('Backspace');
    await page.keyboard.type('9');
    await again.getByRole('button', { name: 'Save' }).click();
    await again.waitFor({ state: 'detached' });
    await until('the round is drawn as it was amended', async () =>
      /column 2, row 2: 52\.9/.test((await drawing.getAttribute('aria-label')) ?? ''),
    );
    await page.context().close();
  });

  it('takes a photograph with an entry, shows it small and whole, and takes it out again', async () => {
    const page = await book('grower');
    const words = `With a picture ${Date.now()}`;
    const dialog = await openForm(page, 'Note');
    await dialog.getByLabel('What you saw').fill(words);
    const buffer = Buffer.from(await picture());
    await dialog
      .getByLabel('Photographs')
      .setInputFiles({ name: 'heap.jpg', mimeType: 'image/jpeg', buffer });
    await dialog.getByRole('button', { name: 'Write it down' }).click();
    await dialog.waitFor({ state: 'detached' });
    const entry = page.getByRole('listitem').filter({ hasText: words }).last();
    const small = entry.getByRole('button', { name: /^Photograph 1 of 1/ });
    await small.click();
    const whole = page.getByRole('dialog').getByRole('img');
    await until('the picture is loaded', () =>
      whole.evaluate((image) => image instanceof HTMLImageElement && image.naturalWidth === 640),
    );
    await page.getByRole('button', { name: 'Take it out …' }).click();
    await page.getByRole('button', { name: 'Take it out for good' }).click();
    await small.waitFor({ state: 'detached' });
    await page.context().close();
  });

  it('reckons a mix while it is typed, and says when both goals cannot be met', async () => {
    const page = await book('grower');
    const dialog = await openForm(page, 'Mix calculator');
    await dialog.getByLabel('Material', { exact: true }).selectOption('sawdust');
    await dialog.getByLabel(/^Wanted C:N/).fill('20');
    await dialog.getByText(/No amount of sawdust brings C:N to 20/).waitFor();
    expect(await accessibilityFaults(page)).toEqual([]);
    await page.context().close();
  });
});
