// Debian's Chromium, for the tests in a browser.
import { installDebian } from './debian.mjs';
import { inPath } from './path.mjs';

/** The browser's program, or undefined: what CHROMIUM names, else the first found in PATH. */
export function findChromium() {
  return process.env.CHROMIUM || inPath('chromium') || inPath('chromium-browser') || inPath('google-chrome');
}

export function ensureChromium() {
  const found = findChromium();
  if (found !== undefined) return found;
  installDebian(
    ['chromium'],
    'the tests in a browser',
    'Or name a Chromium that you already have: CHROMIUM=/path/to/chromium',
  );
  return findChromium();
}
