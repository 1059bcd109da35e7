import { chmodSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { installDebian } from '../../scripts/debian.mjs';

let folder: string;
let before: string | undefined;
const log = () => path.join(folder, 'log');

/** Puts a program of this name before all others in PATH. */
function program(name: string, script: string) {
  const file = path.join(folder, name);
  writeFileSync(file, `#!/bin/sh\n${script}\n`);
  chmodSync(file, 0o755);
}

beforeEach(() => {
  folder = mkdtempSync(path.join(tmpdir(), 'middenward-apt-'));
  before = process.env['PATH'];
  process.env['PATH'] = `${folder}:${before ?? ''}`;
  program('sudo', 'shift; exec "$@"'); // drops -n: whoever runs the tests may "install"
});
afterEach(() => {
  process.env['PATH'] = before;
  rmSync(folder, { recursive: true, force: true });
});

describe('a package of Debian’s', () => {
  const install = () => installDebian(['postgresql'], 'the database', 'Or set DATABASE_URL.');
  const calls = () => readFileSync(log(), 'utf8').trim().split('\n');

  it('is installed without questions', () => {
    program('apt-get', `echo "$DEBIAN_FRONTEND $*" >> ${log()}`);
    install();
    expect(calls()).toEqual(['noninteractive install -y --no-install-recommends postgresql']);
  });

  it('is looked for in a fresh index when the old one does not have it', () => {
    program('apt-get', `echo "$1" >> ${log()}; test "$1" = update || test $(grep -c . ${log()}) -gt 2`);
    install();
    expect(calls()).toEqual(['install', 'update', 'install']);
  });

  it('is out of reach where there is no apt-get', () => {
    process.env['PATH'] = folder;
    expect(install).toThrow(/this machine has no apt-get.*Or set DATABASE_URL/);
  });

  it('that cannot be installed is one sentence with a way out', () => {
    program('apt-get', 'exit 100');
    expect(install).toThrow(/needed for the database.*apt-get install postgresql\. Or set DATABASE_URL/);
  });
});
