// Debian's Chromium, for the tests in a browser.
import { existsSync } from 'node:fs';
import path from 'node:path';
import { installDebian } from './debian.mjs';

/** The browser's program, or undefined: what CHROMIUM names, else the first found in PATH. */
export function findChromium() {
  if (process.env.CHROMIUM) return process.env.CHROMIUM;
  const folders = (process.env.PATH ?? '').split(path.delimiter);
  const places = ['chromium', 'chromium-browser', 'google-chrome'].flatMap((name) =>
    folders.map((folder) => path.join(folder, name)),
  );
  return places.find((place) => existsSync(place));
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
