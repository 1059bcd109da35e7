// Where things are, for every script.
import path from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { realpathSync } from 'node:fs';

export const ROOT = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '..');
export const BUILD = path.join(ROOT, '.build');
/** What the pages' build made for browsers. */
export const STATIC = path.join(ROOT, '.next', 'static');
export const MIGRATIONS = path.join(ROOT, 'db', 'migrations');

/** The data folder: what DATA_DIR says (from the project's folder if it is relative), else `.data`. */
export function dataFolder(value = process.env.DATA_DIR) {
  return path.resolve(ROOT, value === undefined || value === '' ? '.data' : value);
}

/** Whether the module with this `import.meta.url` is the one that node was asked to run. */
export function isCommand(url) {
  try {
    return url === pathToFileURL(realpathSync(process.argv[1] ?? '')).href;
  } catch {
    return false;
  }
}
