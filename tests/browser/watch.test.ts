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

interface Look {
  who?: string;
  width?: number;
  dark?: boolean;
  script?: boolean;
}

async function watch({
  who = 'grower',
  width = 1400,
  dark = false,
  script = true,
}: Look = {}): Promise<Page> {
  const context = await signedIn(browser, sharedApp(), `${who}@larkmoor.example`, {
    viewport: { width, height: 900 },
    colorScheme: dark ? 'dark' : 'light',
    javaScriptEnabled: script,
  });
  const page = await context.newPage();
  await page.goto('/long-house/watch');
  await page.getByRole('heading', { level: 1, name: /The long house stands at/ }).waitFor();
  return page;
}

const close = (page: Page) => page.context().close();
const hand = (page: Page, channel: string) =>
  page.getByRole('group', { name: `${channel}: hand, off or auto` });
const spaced = (text: string) => text.replaceAll('\u00a0', ' ');

describe('Watch in the browser', () => {
  it.each([
    ['by day, wide', { width: 1400 }],
    ['at night, on a phone', { width: 360, dark: true }],
  ])('has nothing that axe finds and does not scroll sideways, %s', async (_, look) => {
    const page = await watch(look);
    expect(await accessibilityFaults(page)).toEqual([]);
    expect(
      await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth),
    ).toBeLessThanOrEqual(0);
    await close(page);
  });

  it('can be read before its script: sentence, chart, channels with their reasons', async () => {
    const page = await watch({ script: false });
    const words = spaced(await page.locator('main').innerText());
    expect(words).toMatch(/stands at −?\d+\.\d °C/);
    expect(words).toMatch(/Gate-heap fan/);
    expect(await page.locator('figure svg path').count()).toBeGreaterThan(3);
    expect(await page.getByText(/Starts under|Stops above|Rests till/).count()).toBeGreaterThan(0);
    await close(page);
  });

  it('makes no fault of its own, and joins the live feed', async () => {
    const page = await watch();
    const faults = faultsOf(page);
    const frames: string[] = [];
    page.on('websocket', (socket) => {
      if (!socket.url().includes('/live?house=')) return;
      socket.on('framereceived', ({ payload }) => frames.push(String(payload)));
    });
    await page.reload();
    await until(
      'the feed tells the state',
      () => frames.some((frame) => frame.includes('"type":"state"')),
      40_000,
    );
    expect(faults).toEqual([]);
    await close(page);
  });

  it('gives a channel by hand and takes it back, saying first what will happen, by keyboard alone', async () => {
    const page = await watch();
    const off = hand(page, 'Bench mat').getByRole('button', { name: 'Off' });
    await off.focus();
    await page.keyboard.press('Enter');
    const dialog = page.getByRole('dialog');
    await dialog.waitFor();
    expect(spaced(await dialog.innerText())).toMatch(/The bench mat is off till .* \(1 h\)/);
    await dialog.getByRole('button', { name: /Turn off/ }).focus();
    await page.keyboard.press('Enter');
    await dialog.waitFor({ state: 'detached' });
    await page.getByText(/Turned off by grower@larkmoor\.example/).waitFor();
    expect(await off.getAttribute('aria-pressed')).toBe('true');

    await hand(page, 'Bench mat').getByRole('button', { name: 'Auto' }).click();
    await page.getByRole('dialog').getByRole('button', { name: 'Give it back' }).click();
    await page.getByText(/Turned off by grower@larkmoor\.example/).waitFor({ state: 'detached' });
    await close(page);
  });

  it('says why, down to the claim that decided, and gives focus back', async () => {
    const page = await watch({ width: 360, dark: true });
    const why = page.getByRole('button', { name: /Why, and what next\s*: Gate-heap fan/ });
    await why.click();
    const sheet = page.getByRole('dialog');
    await sheet.getByText(/claims above it kept still/).click();
    await sheet.getByText('Nobody has locked it out.').waitFor();
    await sheet.getByText('decides', { exact: true }).waitFor();
    expect(await accessibilityFaults(page)).toEqual([]);
    await page.keyboard.press('Escape');
    await sheet.waitFor({ state: 'detached' });
    await until('focus is back', () => why.evaluate((button) => button === document.activeElement));
    await close(page);
  });

  it('lets an installer look, and says why nothing can be commanded', async () => {
    const page = await watch({ who: 'installer' });
    expect(await hand(page, 'Gate-heap fan').getByRole('button', { name: 'Off' }).isDisabled()).toBe(true);
    expect(await page.getByRole('button', { name: /Everything off/ }).isDisabled()).toBe(true);
    await page.getByText(/are the grower’s and the owner’s/).waitFor();
    await close(page);
  });

  it('keeps the reader’s units, and the server renders them', async () => {
    const page = await watch();
    await page.locator('summary', { hasText: 'Larkmoor grower' }).click();
    const degrees = page.getByRole('group', { name: 'Temperature' }).first();
    await degrees.getByRole('button', { name: '°F' }).click();
    await page.getByRole('heading', { level: 1, name: /°F/ }).waitFor();
    await page.reload();
    await page.getByRole('heading', { level: 1, name: /°F/ }).waitFor();
    await page.locator('summary', { hasText: 'Larkmoor grower' }).click();
    await degrees.getByRole('button', { name: '°C' }).click();
    await page.getByRole('heading', { level: 1, name: /°C/ }).waitFor();
    await close(page);
  });

  it('says the same in its sentence, its drawing and the interface', async () => {
    const page = await watch();
    await until(
      'all three agree',
      async () => {
        const answer = await page.context().request.get('/api/v1/houses/long-house/state');
        const state: { points: { key: string; value: number }[] } = await answer.json();
        const outdoors = state.points.find((point) => point.key === 'outdoors')?.value ?? NaN;
        const shown = `${outdoors < -0.05 ? '−' : ''}${Math.abs(outdoors).toFixed(1)}`;
        const sentence = spaced(await page.getByRole('heading', { level: 1 }).innerText());
        const drawing = await page.locator('svg[role=img]').first().innerHTML();
        return sentence.includes(`Outdoors ${shown} °C`) && drawing.includes(`${shown}°`);
      },
      40_000,
    );
    await close(page);
  });

  it('of another holding is as absent as one that never was', async () => {
    const context = await signedIn(browser, sharedApp(), 'owner@stonebeck.example');
    const page = await context.newPage();
    const answer = await page.goto('/long-house/watch');
    expect(answer?.status()).toBe(404);
    await page.getByText('There is no such page here.').waitFor();
    await context.close();
  });
});
