// Every page there is, to every role: answered, readable before its script, without a fault that axe, the browser or the
// content policy finds, as narrow as a phone, by day and by night. A page that is not listed here fails.
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { accessibilityFaults, faultsOf, launchBrowser, signedIn } from '../support/browser';
import { sharedApp } from '../support/shared-app';
import { plain } from '../support/shown-figures';
import { projectFiles } from '../structure/tree';

type Role = 'owner' | 'grower' | 'installer';

interface Shown {
  at: string;
  /** What its first heading says, at least. */
  heading: RegExp;
  /** It has a chart or strips, which the server draws. */
  drawn?: true;
  /** Whom it does not exist for. */
  absentTo?: Role[];
}

/** Pages behind the sign-in, by their file; folders that only group are left out. */
const YARD: Record<string, Shown> = {
  'page.tsx': { at: '/', heading: /stands at/, drawn: true },
  '[house]/page.tsx': { at: '/long-house', heading: /stands at/, drawn: true },
  '[house]/watch/page.tsx': { at: '/long-house/watch', heading: /stands at/, drawn: true },
  '[house]/rules/page.tsx': { at: '/long-house/rules', heading: /rule/i },
  '[house]/rules/[rule]/page.tsx': {
    at: '/long-house/rules/gate-heap-fan-by-the-bench',
    heading: /when|while|below|under/i,
    drawn: true,
  },
  '[house]/wiring/page.tsx': { at: '/long-house/wiring', heading: /node|channel|relay/i },
  '[house]/wiring/points/[point]/page.tsx': {
    at: '/long-house/wiring/points/bench-1',
    heading: /bench probe 1/i,
  },
  '[house]/wiring/prove/[channel]/page.tsx': { at: '/long-house/wiring/prove/4', heading: /ridge vent/i },
  '[house]/wiring/warm-hand/page.tsx': { at: '/long-house/wiring/warm-hand', heading: /probe/i },
  '[house]/wiring/sheet/page.tsx': { at: '/long-house/wiring/sheet', heading: /Wiring of Long house/ },
  '[house]/setup/page.tsx': { at: '/long-house/setup', heading: /./ },
  '[house]/heap-book/page.tsx': { at: '/long-house/heap-book', heading: /heap/i, drawn: true },
  '[house]/duty/page.tsx': { at: '/long-house/duty', heading: /ran .* of the time/, drawn: true },
  '[house]/money/page.tsx': { at: '/long-house/money', heading: /heat/ },
  '[house]/reports/page.tsx': { at: '/long-house/reports', heading: /Long house: Week of/, drawn: true },
  '[house]/alarms/page.tsx': { at: '/long-house/alarms', heading: /alarm/i },
  '[house]/files/page.tsx': { at: '/long-house/files', heading: /logger|file/ },
  'houses/page.tsx': { at: '/houses', heading: /house/ },
  'people/page.tsx': { at: '/people', heading: /Larkmoor Growers/ },
  'people/mail/page.tsx': {
    at: '/people/mail',
    heading: /letter/i,
    absentTo: ['grower', 'installer'],
  },
  'account/page.tsx': { at: '/account', heading: /./ },
  'new-house/page.tsx': { at: '/new-house', heading: /Where does the house stand/ },
};

/** Pages before the sign-in. */
const DOOR: Record<string, Shown> = {
  'sign-in/page.tsx': { at: '/sign-in', heading: /./ },
  'offline-book/page.tsx': { at: '/offline-book', heading: /./ },
  'forgot-password/page.tsx': { at: '/forgot-password', heading: /./ },
  'reset-password/page.tsx': { at: '/reset-password?token=no-such-token', heading: /./ },
  'invitation/[id]/page.tsx': {
    at: '/invitation/019b0000-0000-7000-8000-000000000000?token=no-such-token',
    heading: /./,
  },
};

const LOOKS: { role: Role; width: number; dark: boolean }[] = [
  { role: 'owner', width: 1400, dark: false },
  { role: 'owner', width: 360, dark: true },
  { role: 'grower', width: 360, dark: false },
  { role: 'installer', width: 1400, dark: true },
];
const PAIRS = [LOOKS.slice(0, 2), LOOKS.slice(2)];
const DOOR_LOOKS = LOOKS.filter(({ role }) => role === 'owner');
const ONE_PAGE_MS = 180_000;

declare global {
  interface Window {
    refusedByPolicy: string[];
  }
}

let browser: Browser;
/** One for each look, kept: a browser that has the scripts already is what most people open the next page with. */
const contexts = new Map<string, Promise<BrowserContext>>();
beforeAll(async () => {
  browser = await launchBrowser();
});
afterAll(() => browser.close());

interface Look {
  width: number;
  dark: boolean;
  script?: boolean;
}

function contextFor(role: Role | null, look: Look): Promise<BrowserContext> {
  const key = JSON.stringify([role, look]);
  const kept = contexts.get(key) ?? openContext(role, look);
  contexts.set(key, kept);
  return kept;
}

function openContext(role: Role | null, { width, dark, script = true }: Look): Promise<BrowserContext> {
  const options = {
    viewport: { width, height: 800 },
    colorScheme: dark ? ('dark' as const) : ('light' as const),
    javaScriptEnabled: script,
  };
  return role === null
    ? browser.newContext({ baseURL: sharedApp().url, ...options })
    : signedIn(browser, sharedApp(), `${role}@larkmoor.example`, options);
}

/** What is wrong with a page as it stands, in words; nothing where all is well. */
async function faultsAt(
  context: BrowserContext,
  { at, heading }: Shown,
  isThere: boolean,
): Promise<string[]> {
  const page = await context.newPage();
  await page.addInitScript(() => {
    window.refusedByPolicy = [];
    document.addEventListener('securitypolicyviolation', (event) => {
      window.refusedByPolicy.push(`the policy refused ${event.violatedDirective}: ${event.blockedURI}`);
    });
  });
  const own = faultsOf(page);
  const answer = await page.goto(at, { waitUntil: 'load' });
  const faults: string[] = [];
  const status = answer?.status();
  if (status !== (isThere ? 200 : 404)) faults.push(`answered ${status}`);
  const first = page.getByRole('heading', { level: 1 }).first();
  await first.waitFor({ state: 'attached' });
  const says = plain((await first.textContent()) ?? '');
  if (isThere && !heading.test(says)) faults.push(`is headed ${JSON.stringify(says)}`);
  await settled(page);
  faults.push(...(await accessibilityFaults(page)));
  const over = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
  if (over > 0) faults.push(`is ${over} px wider than its window`);
  faults.push(...(await page.evaluate(() => window.refusedByPolicy)));
  // Chromium puts the answer's own status on the console
  faults.push(...own.filter((fault) => isThere || !fault.includes('status of 404')));
  await page.close();
  return faults;
}

/** Its script has run: what hydration would find wrong stands on the console by then. */
async function settled(page: Page): Promise<void> {
  await page.waitForLoadState('networkidle', { timeout: 5000 }).catch(() => undefined);
}

const asOf = ({ role, width, dark }: { role: string; width: number; dark: boolean }) =>
  `${role}, ${width} wide, ${dark ? 'dark' : 'light'}`;

describe('The pages', () => {
  it('are all looked at here', () => {
    const there = projectFiles().flatMap((file) => /^app\/(.*page\.tsx)$/.exec(file)?.[1] ?? []);
    // a folder in brackets groups files and is no part of the address
    const addresses = there.map((file) => file.replaceAll(/\([a-z]+\)\//g, ''));
    expect(addresses.toSorted()).toEqual([...Object.keys(YARD), ...Object.keys(DOOR)].toSorted());
  });
});

describe.each(Object.values(YARD))('The page $at', (shown) => {
  it(
    'is sound to every role, wide and narrow, light and dark',
    async () => {
      const found: Record<string, string[]> = {};
      const lookAt = async (look: (typeof LOOKS)[number]) => {
        const context = await contextFor(look.role, look);
        const faults = await faultsAt(context, shown, shown.absentTo?.includes(look.role) !== true);
        if (faults.length > 0) found[asOf(look)] = faults;
      };
      // two at a time: half of a look is waiting until the page is quiet
      for (const pair of PAIRS) await Promise.all(pair.map(lookAt));
      expect(found).toEqual({});
    },
    ONE_PAGE_MS,
  );

  it('can be read before its script, its drawing among the rest', async () => {
    const context = await contextFor('owner', { width: 360, dark: false, script: false });
    const page = await context.newPage();
    await page.goto(shown.at);
    // what is hidden until a script shows it is not read by anybody
    const words = plain(await page.locator('main').innerText());
    expect(words.length).toBeGreaterThan(60);
    expect(plain(await page.getByRole('heading', { level: 1 }).first().innerText())).toMatch(shown.heading);
    if (shown.drawn === true) {
      expect(await page.locator('main svg:visible :is(path, rect, line, circle)').count()).toBeGreaterThan(3);
    }
    await page.close();
  });

  it('wants a sign-in first, and leads there', async () => {
    const context = await contextFor(null, { width: 1400, dark: false });
    const page = await context.newPage();
    await page.goto(shown.at);
    expect(new URL(page.url()).pathname).toBe('/sign-in');
    await page.close();
  });
});

describe.each(Object.values(DOOR))('The page $at', (shown) => {
  it(
    'is sound to who is not signed in, wide and narrow, light and dark',
    async () => {
      const found: Record<string, string[]> = {};
      for (const look of DOOR_LOOKS) {
        const context = await contextFor(null, look);
        const faults = await faultsAt(context, shown, true);
        if (faults.length > 0) found[asOf({ ...look, role: 'nobody' })] = faults;
      }
      expect(found).toEqual({});
    },
    ONE_PAGE_MS,
  );
});
