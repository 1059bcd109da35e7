import { spawn } from 'node:child_process';
import { mkdtempSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { claimFolder, keptSecrets } from '../../scripts/start/kept.mjs';

let dataDir: string;
const running = (): unknown => JSON.parse(readFileSync(path.join(dataDir, 'running.json'), 'utf8'));
beforeEach(() => {
  dataDir = mkdtempSync(path.join(tmpdir(), 'middenward kept '));
});
afterEach(() => rmSync(dataDir, { recursive: true, force: true }));

describe('secrets', () => {
  it('are made once and stay', () => {
    const first = keptSecrets({ dataDir, rate: 1 });
    expect(keptSecrets({ dataDir, rate: 1 })).toEqual(first);
    expect(first.authSecret.length).toBeGreaterThanOrEqual(32);
    expect(first.password.length).toBeGreaterThanOrEqual(15);
  });

  it('are for the user’s eyes only', () => {
    keptSecrets({ dataDir, rate: 1 });
    expect(statSync(path.join(dataDir, 'secrets.json')).mode & 0o777).toBe(0o600);
    expect(readdirSync(dataDir)).toEqual(['secrets.json']);
  });

  it('that are given replace the kept ones, and are kept', () => {
    keptSecrets({ dataDir, rate: 1 });
    const password = 'a password of the visitor';
    expect(keptSecrets({ dataDir, rate: 1, password }).password).toBe(password);
    expect(keptSecrets({ dataDir, rate: 1 }).password).toBe(password);
  });

  it('survive a file that was cut short', () => {
    writeFileSync(path.join(dataDir, 'secrets.json'), '{"authSecret": "abc');
    expect(keptSecrets({ dataDir, rate: 1 }).authSecret.length).toBeGreaterThanOrEqual(32);
  });
});

it('another rate is refused, naming CLOCK_RATE and DATA_DIR', () => {
  keptSecrets({ dataDir, rate: 1 });
  expect(() => keptSecrets({ dataDir, rate: 60 })).toThrow(/CLOCK_RATE is 60.*rate 1.*DATA_DIR/);
});

describe('a folder from which it runs already', () => {
  it('is refused, with the address to find it at', () => {
    const other = spawn(process.execPath, ['-e', 'setInterval(() => {}, 1000)', 'scripts/start.mjs']);
    try {
      writeFileSync(path.join(dataDir, 'running.json'), JSON.stringify({ pid: other.pid, port: 3007 }));
      expect(() => claimFolder(dataDir, 3000)).toThrow(/already runs from .* at http:\/\/localhost:3007/);
    } finally {
      other.kill();
    }
  });

  it('is free when its process id now belongs to another program', () => {
    writeFileSync(path.join(dataDir, 'running.json'), JSON.stringify({ pid: process.ppid, port: 3007 }));
    claimFolder(dataDir, 3000);
    expect(running()).toEqual({ pid: process.pid, port: 3000 });
  });

  it('is free again when that process is gone', () => {
    writeFileSync(path.join(dataDir, 'running.json'), JSON.stringify({ pid: 2 ** 22 - 1, port: 3007 }));
    claimFolder(dataDir, 3000);
    expect(running()).toEqual({ pid: process.pid, port: 3000 });
  });
});
