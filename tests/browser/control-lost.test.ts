// Silence is an alarm: a worker that freezes or dies is told on Watch, in words, and so is its return. The door starts a
// worker that died at once, so one that stays away is one that is stopped.
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { startApp, type RunningApp } from '../support/app';
import { accessibilityFaults, launchBrowser, signedIn } from '../support/browser';
import { until } from '../support/until';

const SAID_WITHIN_MS = 15_000;
/** A new worker may lead only after the lease of the one before has ended. */
const BACK_WITHIN_MS = 40_000;

let app: RunningApp;
let browser: Browser;
let grower: BrowserContext;
let watch: Page;

beforeAll(async () => {
  app = await startApp({ yard: true, seed: { nights: 1 } });
  browser = await launchBrowser();
  grower = await signedIn(browser, app, 'grower@larkmoor.example');
});
afterAll(async () => {
  await browser.close();
  await app.stop();
});
beforeEach(async () => {
  watch = await grower.newPage();
  await watch.goto('/long-house/watch');
  await watch.waitForSelector('[data-link="live"]');
  return async () => watch.close();
});

const notice = (page: Page) => page.getByRole('alert').filter({ hasText: 'Control is not running.' });
/** How many notices the page has as the server sends it now. */
async function noticesAnew(page: Page): Promise<number> {
  await page.goto('/long-house/watch');
  return notice(page).count();
}

function workerPid(): number {
  const pid = app.pid('worker');
  if (pid === null) throw new Error('the worker does not run');
  return pid;
}

/** Stopped, it holds its sockets open and says nothing, which is the hardest silence to notice. */
async function whileFrozen(look: () => Promise<void>): Promise<void> {
  const pid = workerPid();
  process.kill(pid, 'SIGSTOP');
  try {
    await look();
  } finally {
    process.kill(pid, 'SIGCONT');
  }
}

describe('A worker that says nothing any more', () => {
  it('is told within 15 s, with what the relays do, and no longer once it speaks', async () => {
    expect(await notice(watch).count()).toBe(0);
    await whileFrozen(async () => {
      await notice(watch).waitFor({ timeout: SAID_WITHIN_MS });
      const words = await notice(watch).innerText();
      expect(words).toContain('Every relay is in its safe state, or falls to it within 30 s');
      expect(words).toMatch(/Gate-heap fan.* are off/);
      expect(words).toContain('What is shown is from');
      // what was last known is not passed off as what is
      await watch
        .getByText(/^Last seen/)
        .first()
        .waitFor();
      expect(await accessibilityFaults(watch)).toEqual([]);
    });
    await notice(watch).waitFor({ state: 'detached', timeout: BACK_WITHIN_MS });
    await watch
      .getByText(/^Last seen/)
      .first()
      .waitFor({ state: 'detached', timeout: BACK_WITHIN_MS });
  }, 90_000);

  it('is told by the server too, to who opens the page only now and without its script', async () => {
    const plain = await signedIn(browser, app, 'grower@larkmoor.example', { javaScriptEnabled: false });
    const page = await plain.newPage();
    await whileFrozen(async () => {
      await until(
        'the page as the server sends it says so',
        async () => (await noticesAnew(page)) === 1,
        SAID_WITHIN_MS,
      );
      expect(await notice(page).innerText()).toContain('Every relay is in its safe state');
    });
    await until('the page no longer says so', async () => (await noticesAnew(page)) === 0, BACK_WITHIN_MS);
    await plain.close();
  }, 90_000);
});

describe('A worker that is killed', () => {
  it('is told at once, and its successor’s lead ends the telling without a reload', async () => {
    await watch.evaluate(() => document.documentElement.setAttribute('data-loaded', 'once'));
    const pid = workerPid();
    process.kill(pid, 'SIGKILL');
    await notice(watch).waitFor({ timeout: SAID_WITHIN_MS });
    expect(await notice(watch).innerText()).toContain('Every relay is in its safe state');
    await until('the door has started another', () => ![pid, null].includes(app.pid('worker')));
    await notice(watch).waitFor({ state: 'detached', timeout: BACK_WITHIN_MS });
    await watch.waitForSelector('[data-link="live"]');
    expect(await watch.locator('html').getAttribute('data-loaded')).toBe('once');
  }, 90_000);
});
