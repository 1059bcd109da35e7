// Programs by name.
import { existsSync } from 'node:fs';
import path from 'node:path';

/** The first file of this name in the folders of PATH, or undefined. */
export function inPath(name) {
  const folders = (process.env.PATH ?? '').split(path.delimiter);
  return folders.map((folder) => path.join(folder, name)).find((file) => existsSync(file));
}
