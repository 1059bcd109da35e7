import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { areInstalled } from '../../scripts/packages.mjs';

let root: string;
beforeEach(() => {
  root = mkdtempSync(path.join(tmpdir(), 'middenward-packages-'));
  mkdirSync(path.join(root, 'node_modules'));
});
afterEach(() => rmSync(root, { recursive: true, force: true }));

function lock(wanted: object, present: object | null) {
  writeFileSync(path.join(root, 'package-lock.json'), JSON.stringify({ packages: { '': {}, ...wanted } }));
  if (present === null) return;
  writeFileSync(path.join(root, 'node_modules', '.package-lock.json'), JSON.stringify({ packages: present }));
}
const a = (version: string) => ({ 'node_modules/a': { version } });
const optional = { 'node_modules/b': { version: '1.0.0', optional: true } };

it('packages of the lock file are installed', () => {
  lock(a('1.0.0'), a('1.0.0'));
  expect(areInstalled(root)).toBe(true);
});

it('nothing is installed in a fresh checkout', () => {
  lock(a('1.0.0'), null);
  expect(areInstalled(root)).toBe(false);
});

it('another version is not what was asked for', () => {
  lock(a('1.0.1'), a('1.0.0'));
  expect(areInstalled(root)).toBe(false);
});

it('a package for another system may be missing', () => {
  lock({ ...a('1.0.0'), ...optional }, a('1.0.0'));
  expect(areInstalled(root)).toBe(true);
});

it('a new package is not there yet', () => {
  lock({ ...a('1.0.0'), 'node_modules/c': { version: '1.0.0' } }, a('1.0.0'));
  expect(areInstalled(root)).toBe(false);
});
