// The wiring sheet lies on paper as it should, and says what is wired.
import { execFileSync } from 'node:child_process';
import { existsSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import type { Browser, BrowserContext } from 'playwright-core';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { qrPath } from '@/components/ui/qr-path';
import { accessibilityFaults, launchBrowser, signedIn } from '../support/browser';
import { sharedApp } from '../support/shared-app';
import { plain } from '../support/shown-figures';
import { until } from '../support/until';

let browser: Browser;
let context: BrowserContext;
const AT = '/long-house/wiring/sheet';

beforeAll(async () => {
  browser = await launchBrowser();
  context = await signedIn(browser, sharedApp(), 'installer@larkmoor.example');
});
afterAll(() => browser.close());

/** Sizes of the sheets in points, as the file says them. */
const sheets = (pdf: Buffer) =>
  [...pdf.toString('latin1').matchAll(/\/MediaBox\s*\[0 0 ([\d.]+) ([\d.]+)\]/g)].map(([, width, height]) => [
    Math.round(Number(width)),
    Math.round(Number(height)),
  ]);

const WANTED = [
  'Wiring of Long house',
  'How to run the fan without software',
  'Gate-heap fan',
  'Not proved',
  'not recorded',
  'Bench probe 1',
  'Interlocks and limits',
  'residual-current protection',
  'The isolator is at',
];

it.each([
  ['a4', [595, 842]],
  ['letter', [612, 792]],
] as const)(
  'on %s it is a few sheets of that size, with all that is wired',
  async (paper, [width, height]) => {
    const page = await context.newPage();
    await page.goto(`${AT}?paper=${paper}`);
    await page.emulateMedia({ media: 'print' });
    expect(await page.getByRole('navigation').filter({ visible: true }).count()).toBe(0);
    const told = plain(await page.getByRole('article').innerText());
    for (const text of WANTED) expect(told).toContain(text);
    // the paper is the sheet's own choice, not the printer's
    const other = paper === 'a4' ? 'Letter' : 'A4';
    let pdf: Buffer = Buffer.alloc(0);
    // a busy browser may print once before it has laid the page out for paper
    await until(`it lies on ${paper}`, async () => {
      pdf = await page.pdf({ preferCSSPageSize: true, format: other });
      return sheets(pdf).every(
        ([wide = 0, high = 0]) => Math.abs(wide - width) <= 1 && Math.abs(high - height) <= 1,
      );
    });
    const found = sheets(pdf);
    expect(found.length).toBeGreaterThanOrEqual(2);
    expect(found.length).toBeLessThanOrEqual(6);
    const text = textOf(pdf);
    if (text !== null) for (const one of WANTED) expect(text).toContain(one);
    await page.close();
  },
);

/** The words on the paper, where poppler is at hand; elsewhere what stands in the article is all that is looked at. */
function textOf(pdf: Buffer): string | null {
  if (!existsSync('/usr/bin/pdftotext')) return null;
  const folder = mkdtempSync(path.join(tmpdir(), 'sheet-'));
  try {
    const file = path.join(folder, 'sheet.pdf');
    writeFileSync(file, pdf);
    return plain(execFileSync('/usr/bin/pdftotext', ['-raw', file, '-'], { encoding: 'utf8' }));
  } finally {
    rmSync(folder, { recursive: true });
  }
}

it('its code is the address of the page, and it is said in words beside it', async () => {
  const page = await context.newPage();
  await page.goto(AT);
  const address = `${sharedApp().url}/long-house/wiring`;
  const code = page.getByRole('img', { name: /address of this house/ });
  // that the drawing is the text's is shown by reading it back, in tests/components/qr-code.test.ts
  expect(await code.locator('path').getAttribute('d')).toBe(qrPath(address).path);
  expect(await page.getByText(address, { exact: true }).count()).toBe(1);
  await page.close();
});

it.each([
  [1400, 'light'],
  [390, 'dark'],
] as const)('at %i, %s, has nothing that axe finds and does not scroll sideways', async (width, theme) => {
  const page = await context.newPage();
  await page.emulateMedia({ colorScheme: theme });
  await page.setViewportSize({ width, height: 844 });
  await page.goto(AT);
  expect(await accessibilityFaults(page)).toEqual([]);
  expect(await page.evaluate(() => document.documentElement.scrollWidth - innerWidth)).toBeLessThanOrEqual(0);
  await page.close();
});
