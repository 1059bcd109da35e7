// What a page costs a phone: kB of script, gzipped, that it names itself, and apart what it fetches later by itself; largest
// paint and blocking time, ms, with a processor four times slower and 1.6 Mbit/s with 150 ms to the server.
import { gzipSync } from 'node:zlib';
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { launchBrowser, signedIn } from '../support/browser';
import type { RunningApp } from '../support/app';
import { quantile, round3, withApp } from './support';

const ROUNDS = 5;
const TARGET_KB = 180;
const OWNER = 'owner@larkmoor.example';
const SLOW_LINE = { offline: false, latency: 150, downloadThroughput: 200_000, uploadThroughput: 200_000 };
const SLOWER = 4;
const PAGES = {
  watch: '/long-house/watch',
  rules: '/long-house/rules',
  rule: '/long-house/rules/gate-heap-fan-by-the-bench',
  wiring: '/long-house/wiring',
  heapBook: '/long-house/heap-book',
  duty: '/long-house/duty',
  houses: '/houses',
  alarms: '/long-house/alarms',
  people: '/people',
  account: '/account',
  newHouse: '/new-house',
};

declare global {
  interface Window {
    budget: { paintMs: number; firstPaintMs: number; tasks: { at: number; ms: number }[] };
  }
}

export function bench() {
  return withApp({ yard: true, seed: { nights: 7 } }, async (app) => {
    const browser = await launchBrowser();
    try {
      const pages: Record<string, unknown> = {};
      const over: string[] = [];
      for (const [name, at] of Object.entries(PAGES)) {
        const script = await scriptOf(browser, app, at);
        if (script.firstKB > TARGET_KB) over.push(name);
        pages[name] = { ...script, ...(await speedOf(browser, app, at)) };
      }
      return { targetKB: TARGET_KB, over, rounds: ROUNDS, pages };
    } finally {
      await browser.close();
    }
  });
}

/** kB (1000 bytes). What stands in the page's own markup is first; what its script asks for afterwards is later. */
async function scriptOf(browser: Browser, app: RunningApp, at: string) {
  const context = await signedIn(browser, app, OWNER, { viewport: { width: 360, height: 740 } });
  try {
    const page = await context.newPage();
    const asked = new Set<string>();
    page.on('request', (request) => {
      if (request.resourceType() === 'script') asked.add(request.url());
    });
    const answer = await page.goto(at, { waitUntil: 'load' });
    if (answer?.status() !== 200) throw new Error(`${at} answered ${answer?.status()}`);
    const markup = await answer.text();
    await quiet(page);
    const isFirst = (url: string) => markup.includes(`"${new URL(url).pathname}`);
    const urls = [...asked];
    return {
      firstKB: await gzipped(context, urls.filter(isFirst)),
      laterKB: await gzipped(
        context,
        urls.filter((url) => !isFirst(url)),
      ),
    };
  } finally {
    await context.close();
  }
}

async function gzipped(context: BrowserContext, urls: string[]): Promise<number> {
  let bytes = 0;
  for (const url of urls) bytes += gzipSync(await (await context.request.get(url)).body()).length;
  return round3(bytes / 1000);
}

export async function onSlowPhone(context: BrowserContext): Promise<Page> {
  const page = await context.newPage();
  const line = await context.newCDPSession(page);
  await line.send('Network.enable');
  await line.send('Network.emulateNetworkConditions', SLOW_LINE);
  await line.send('Emulation.setCPUThrottlingRate', { rate: SLOWER });
  return page;
}

async function speedOf(browser: Browser, app: RunningApp, at: string) {
  const paint: number[] = [];
  const blocked: number[] = [];
  for (let round = 0; round < ROUNDS; round += 1) {
    // a context of its own: nothing is in its cache
    const context = await signedIn(browser, app, OWNER, { viewport: { width: 360, height: 740 } });
    try {
      const page = await onSlowPhone(context);
      await page.addInitScript(watchLoad);
      await page.goto(at, { waitUntil: 'load' });
      await quiet(page);
      const { paintMs, firstPaintMs, tasks } = await page.evaluate(() => window.budget);
      if (paintMs === 0) throw new Error(`${at} told of no paint`);
      paint.push(paintMs);
      // the part over 50 ms of each long task after something could be seen
      const late = tasks.filter((task) => task.at + task.ms > firstPaintMs);
      blocked.push(late.reduce((sum, task) => sum + Math.max(0, task.ms - 50), 0));
    } finally {
      await context.close();
    }
  }
  return { largestPaintMs: figures(paint), blockedMs: figures(blocked) };
}

/** Nothing was asked for during half a second. A live feed is no request. */
const quiet = (page: Page) => page.waitForLoadState('networkidle', { timeout: 60_000 });

/** Runs in the page, before anything of its own; without inner functions of a name, which a compiler's helper would wrap. */
function watchLoad(): void {
  window.budget = { paintMs: 0, firstPaintMs: 0, tasks: [] };
  for (const type of ['largest-contentful-paint', 'paint', 'longtask']) {
    new PerformanceObserver((list) => {
      for (const { name, startTime: at, duration: ms } of list.getEntries()) {
        if (type === 'longtask') window.budget.tasks.push({ at, ms });
        else if (type === 'largest-contentful-paint') window.budget.paintMs = at;
        else if (name === 'first-contentful-paint') window.budget.firstPaintMs = at;
      }
    }).observe({ type, buffered: true });
  }
}

function figures(values: number[]) {
  return {
    median: round3(quantile(values, 0.5)),
    spread: [round3(Math.min(...values)), round3(Math.max(...values))],
    raw: values.map(round3),
  };
}
