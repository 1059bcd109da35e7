// Conditions are built without a mouse, read with how they stand, and lose nothing that was typed.
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { accessibilityFaults, faultsOf, signedIn } from '../support/browser';
import { openOwnHouse, type OwnHouse } from '../support/browser-house';
import { sharedApp } from '../support/shared-app';

let browser: Browser;
let house: OwnHouse;

beforeAll(async () => {
  ({ browser, house } = await openOwnHouse());
});
afterAll(async () => browser.close());

const NOW = { fact: 'time.month', operator: 'greaterThanInclusive', value: 1 };
const NEVER = { fact: 'time.month', operator: 'lessThan', value: 1 };
const UNKNOWN = { fact: 'bench', operator: 'greaterThan', value: 3 };

async function open(only: object | undefined, width = 1400): Promise<Page> {
  const body = { purpose: 'warm', point: 'bench', band: [{ from: '00:00', low: 4, high: 7 }], only };
  const rule = (await house.post('/rules', { name: 'Built by keys', channel: 'fan', body })) as {
    slug: string;
  };
  const context = await signedIn(browser, sharedApp(), 'grower@larkmoor.example', {
    viewport: { width, height: 900 },
  });
  const page = await context.newPage();
  await page.goto(`/${house.slug}/rules/${rule.slug}`);
  await page.locator('button[type=submit]:enabled').waitFor();
  return page;
}

const section = (page: Page) => page.getByRole('region', { name: 'Only while' });
const draftOf = async (page: Page): Promise<unknown> => {
  const slug = new URL(page.url()).pathname.split('/').at(-1);
  const answer = await page.request.get(`/api/v1/rules/${slug}`);
  return ((await answer.json()) as { draft: { body: { only?: unknown } } }).draft.body.only;
};
async function save(page: Page): Promise<void> {
  await page.getByRole('button', { name: 'Save draft' }).click();
  await page.getByText('The draft is saved.', { exact: false }).first().waitFor();
}
/** What has the focus, by its name for a screen reader. */
const focused = (page: Page) =>
  page.evaluate(() => {
    const at = document.activeElement;
    const label = at?.id ? document.querySelector(`label[for="${CSS.escape(at.id)}"]`) : null;
    return (label ?? at)?.textContent ?? '';
  });

describe('conditions in the browser', () => {
  it('are read with how each stands, and the whole: an unknown one is not met', async () => {
    const page = await open({ all: [NOW, { any: [NEVER, UNKNOWN] }] });
    const said = (await section(page).innerText()).replaceAll(/\s+/g, ' ');
    expect(said).toMatch(/All of these hold: not known, so not met/);
    expect(said).toMatch(/The month is January or later now \w+, holds/);
    expect(said).toMatch(/The month is before January now \w+, does not hold/);
    expect(said).toMatch(/above 3.0 °C now not known, not known, so not met/);
    expect(
      await section(page)
        .getByLabel(/^Condition/)
        .count(),
    ).toBe(0);
    await page.context().close();
  });

  it('are built by the keyboard alone, and the focus stays with what is being done', async () => {
    const page = await open(undefined);
    const faults = faultsOf(page);
    const press = async (...keys: string[]) => {
      for (const key of keys) await page.keyboard.press(key);
    };
    await section(page).getByRole('button', { name: 'Add a condition' }).focus();
    await press('Enter');
    await page.getByLabel('Condition 1: what it goes by').waitFor();
    expect(await focused(page)).toBe('Condition 1: what it goes by');
    await page.keyboard.type('Bench');
    await press('Tab', 'Tab');
    await page.keyboard.type('4,5');
    await section(page).getByRole('button', { name: 'Add a condition' }).focus();
    await press('Enter');
    expect(await focused(page)).toBe('Condition 2: what it goes by');
    await page.keyboard.type('The sun');
    await section(page)
      .getByText(/now (up|down)/)
      .waitFor();

    await section(page).getByRole('button', { name: 'Move or remove condition 2' }).focus();
    await press('Enter', 'Tab', 'Enter');
    expect(await focused(page)).toMatch(/Move or remove condition 1|^Up$/);
    expect(await page.getByLabel('Condition 1: what it goes by').inputValue()).toBe('time.sunUp');
    await section(page).getByText('The sun is moved up, 1 of 2.').waitFor();

    await section(page).getByRole('button', { name: 'Put in a group' }).focus();
    await press('Enter');
    await page.getByLabel('Condition 1.1: what it goes by').waitFor();
    await section(page).getByRole('button', { name: 'Move or remove condition 2' }).focus();
    await press('Enter');
    await section(page).getByRole('button', { name: 'Into the group' }).focus();
    await press('Enter');
    await page
      .getByLabel('Condition 1.2: what it goes by')
      .or(page.getByLabel('Condition 1.1: what it goes by'))
      .first()
      .waitFor();
    await page.getByLabel('Group 1: how many must hold').selectOption('none');
    await save(page);
    expect(await draftOf(page)).toMatchObject({ all: [{ not: { any: [{}, {}] } }] });
    const { all } = (await draftOf(page)) as { all: { not: { any: { fact: string }[] } }[] };
    expect(all[0]?.not.any.map((one) => one.fact).sort()).toEqual(['bench', 'time.sunUp']);
    expect(faults).toEqual([]);
    await page.context().close();
  });

  it('taken out, leave the focus on what is near, and at the end none', async () => {
    const page = await open({ all: [NOW, NEVER] });
    await section(page).getByRole('button', { name: 'Change the conditions' }).click();
    const removed = async (number: string) => {
      await section(page)
        .getByRole('button', { name: `Move or remove condition ${number}` })
        .click();
      await section(page).getByRole('button', { name: 'Remove', exact: true }).press('Enter');
    };
    await removed('2');
    expect(await focused(page)).toContain('Move or remove condition 1');
    await removed('1');
    expect(await focused(page)).toBe('Add a condition');
    await save(page);
    expect(await draftOf(page)).toBeUndefined();
    await page.context().close();
  });

  it('name what cannot be read at its field, bring the focus there, and keep what was typed', async () => {
    const page = await open({ all: [NOW] });
    await section(page).getByRole('button', { name: 'Change the conditions' }).click();
    await section(page).getByRole('button', { name: 'Add a condition' }).click();
    await page.getByLabel('Condition 2: what it goes by').selectOption('bench');
    await page.getByLabel(/^Condition 2: value/).fill('warm enough');
    await page.getByRole('button', { name: 'Save draft' }).click();
    await page.getByText('Give a number in °C, such as 4.5.').waitFor();
    expect(await page.getByLabel(/^Condition 2: value/).inputValue()).toBe('warm enough');
    expect(await page.getByLabel(/^Condition 2: value/).getAttribute('aria-invalid')).toBe('true');
    await page.getByLabel(/^Condition 2: value/).fill('4');
    await save(page);
    expect(await draftOf(page)).toEqual({
      all: [NOW, { fact: 'bench', operator: 'greaterThanInclusive', value: 4 }],
    });
    await page.context().close();
  });

  it('that can never hold are told as one types, and a press goes to them', async () => {
    const page = await open({ all: [NEVER] });
    const found = page.getByRole('region', { name: 'Things to look at' });
    await found.getByText('These conditions can never hold together', { exact: false }).waitFor();
    await found.getByRole('listitem').filter({ hasText: 'never hold' }).getByRole('button').click();
    await page.getByLabel('Condition 1: what it goes by').waitFor();
    await expect.poll(() => focused(page)).toContain('Condition 1: what it goes by');
    await page.getByLabel('Condition 1: how').selectOption('in');
    await page.getByLabel('December').check();
    await found.getByText('never hold together', { exact: false }).waitFor({ state: 'detached' });
    await page.context().close();
  });

  it.each([1400, 360])('have nothing that axe finds and do not scroll sideways, %i wide', async (width) => {
    const page = await open({ any: [{ not: NOW }, { all: [NEVER, { any: [UNKNOWN, NOW] }] }] }, width);
    expect(await accessibilityFaults(page)).toEqual([]);
    await section(page).getByRole('button', { name: 'Change the conditions' }).click();
    await section(page).getByRole('button', { name: 'Move or remove condition 1' }).click();
    expect(await accessibilityFaults(page)).toEqual([]);
    const over = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
    expect(over).toBeLessThanOrEqual(0);
    await page.context().close();
  });

  it('of a program, many and deep, are shown whole, and a thirteenth group is refused in words', async () => {
    const deep = (levels: number): object =>
      levels === 1 ? { all: [NOW] } : { any: [deep(levels - 1), NEVER] };
    const page = await open(deep(12), 360);
    expect(await section(page).getByText('now', { exact: false }).count()).toBeGreaterThan(11);
    const slug = new URL(page.url()).pathname.split('/').at(-1);
    const body = { purpose: 'warm', point: 'bench', band: [{ from: '00:00', low: 4, high: 7 }] };
    const answer = await page.request.put(`/api/v1/rules/${slug}/draft`, {
      data: { ...body, only: deep(13) },
      headers: { origin: sharedApp().url },
    });
    expect([answer.status(), await answer.json()]).toMatchObject([422, { errors: [{ path: 'only' }] }]);
    await page.context().close();
  });
});
