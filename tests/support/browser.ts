// Debian's Chromium by playwright-core, signed in, and axe on a page.
import { createRequire } from 'node:module';
import { readFileSync } from 'node:fs';
import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core';
import type { AxeResults, RunOptions } from 'axe-core';
import { findChromium } from '../../scripts/chromium.mjs';

/** No sandbox, as root needs; no traffic of the browser's own, as tests stay on loopback. */
const FLAGS = [
  '--no-sandbox',
  '--disable-dev-shm-usage',
  '--disable-quic',
  '--disable-background-networking',
  '--no-first-run',
];

export async function launchBrowser(): Promise<Browser> {
  const executablePath = findChromium();
  if (executablePath === undefined) throw new Error('No Chromium here: npm test installs Debian’s');
  return chromium.launch({ executablePath, args: FLAGS });
}

/**
 * A context of its own (cookies, size, theme), signed in through the interface as a browser is.
 * @param app origin and the demo password
 */
export async function signedIn(
  browser: Browser,
  app: { url: string; password: string },
  email: string,
  options: Parameters<Browser['newContext']>[0] = {},
): Promise<BrowserContext> {
  const context = await browser.newContext({ baseURL: app.url, ...options });
  const answer = await context.request.post('/api/auth/sign-in/email', {
    data: { email, password: app.password },
    headers: { origin: app.url },
  });
  if (!answer.ok()) throw new Error(`${email} cannot sign in: ${answer.status()} ${await answer.text()}`);
  return context;
}

/** What went wrong on a page by itself: script errors, and lines of the console at level error (refused by CSP among them). */
export function faultsOf(page: Page): string[] {
  const faults: string[] = [];
  page.on('pageerror', (error) => faults.push(error.message));
  page.on('console', (message) => {
    if (message.type() === 'error') faults.push(message.text());
  });
  return faults;
}

const axeSource = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');

declare global {
  interface Window {
    axe: { run: (context: Document, options: RunOptions) => Promise<AxeResults> };
  }
}

/** axe's violations, one line each: rule, what it says, and the elements. Evaluated, not added as a tag, which CSP refuses. */
export async function accessibilityFaults(page: Page): Promise<string[]> {
  await page.evaluate(axeSource);
  // all rules are run; of what passes, only that it passes is kept, which is half of the time
  const { violations } = await page.evaluate(() => window.axe.run(document, { resultTypes: ['violations'] }));
  return violations.map(
    ({ id, help, nodes }) => `${id}: ${help} — ${nodes.map((node) => node.target.join(' ')).join(', ')}`,
  );
}
