// Debian's Chromium, for the tests in a browser.
import { installDebian } from './debian.mjs';
import { inPath } from './path.mjs';

/** The one without a window comes first: another keeps its own window's page busy beside the page that is tested. */
const NAMES = ['chromium-headless-shell', 'chromium', 'chromium-browser', 'google-chrome'];

/** The browser's program, or undefined: what CHROMIUM names, else the first found in PATH. */
export function findChromium() {
  if (process.env.CHROMIUM) return process.env.CHROMIUM;
  return NAMES.map(inPath).find((found) => found !== undefined);
}

export function ensureChromium() {
  const found = findChromium();
  if (found !== undefined) return found;
  installDebian(
    ['chromium-headless-shell'],
    'the tests in a browser',
    'Or name a Chromium that you already have: CHROMIUM=/path/to/chromium',
  );
  return findChromium();
}
