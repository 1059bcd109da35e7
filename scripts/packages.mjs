// The packages that package-lock.json names; installed only when they are not there yet.
import { spawnSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import path from 'node:path';
import { ROOT } from './places.mjs';
import { say, Trouble } from './say.mjs';

export function ensurePackages(root = ROOT) {
  if (areInstalled(root)) return say('packages … already there');
  say('installing packages by npm ci, which takes about a minute …');
  // npm tells its scripts where it is; called without npm, the one in PATH serves
  const npm = process.env.npm_execpath;
  const args = ['ci', '--include=dev', '--no-audit', '--no-fund', '--loglevel=error'];
  const ended = npm?.endsWith('.js')
    ? spawnSync(process.execPath, [npm, ...args], { cwd: root, stdio: ['ignore', 'ignore', 'inherit'] })
    : spawnSync('npm', args, { cwd: root, stdio: ['ignore', 'ignore', 'inherit'] });
  if (ended.status !== 0) {
    throw new Trouble(
      'The packages could not be installed; npm says why above. It needs the network once, and a project folder that this user may write.',
    );
  }
}

/** Whether what npm wrote down as installed is what the lock file asks for; packages for other systems are optional. */
export function areInstalled(root = ROOT) {
  const wanted = readPackages(path.join(root, 'package-lock.json'));
  const present = readPackages(path.join(root, 'node_modules', '.package-lock.json'));
  if (wanted === null || present === null) return false;
  return Object.entries(wanted).every(([name, entry]) => {
    if (name === '') return true;
    const there = present[name];
    return there === undefined
      ? entry.optional === true || entry.devOptional === true
      : there.version === entry.version;
  });
}

function readPackages(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8')).packages;
  } catch {
    return null;
  }
}
