// The project's own files, as paths from its root.
import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { ROOT } from '../../scripts/places.mjs';

const NOT_OURS = /^(node_modules|\.git|\.next|\.build|\.data.*|next-env\.d\.ts|.*\.tsbuildinfo)$/;

export function projectFiles(root = ROOT): string[] {
  return filesUnder(root, '');
}

function filesUnder(root: string, folder: string): string[] {
  return readdirSync(path.join(root, folder), { withFileTypes: true }).flatMap((entry) => {
    if (NOT_OURS.test(entry.name)) return [];
    const place = folder === '' ? entry.name : `${folder}/${entry.name}`;
    return entry.isDirectory() ? filesUnder(root, place) : [place];
  });
}

/** Source of the program itself: not tests, not scripts, not settings. */
export function programFiles(root = ROOT): string[] {
  return projectFiles(root).filter(
    (file) =>
      /^(app|components|db|lib|worker)\/.*\.tsx?$/.test(file) || /^(proxy|instrumentation)\.ts$/.test(file),
  );
}

export const textOf = (file: string, root = ROOT): string => readFileSync(path.join(root, file), 'utf8');
