import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, rmSync, statSync } from 'node:fs';
import net from 'node:net';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { stopPostgres } from '../../scripts/pg.mjs';
import { ROOT } from '../../scripts/places.mjs';
import { severalFree } from '../../scripts/ports.mjs';

let dataDir: string;
let port: number;
beforeEach(async () => {
  // its parent is open to user `postgres`, as a home of mode 0700 would not be
  dataDir = path.join(mkdtempSync(path.join(tmpdir(), 'middenward-pg ')), 'data');
  [port = 0] = await severalFree(1);
});
afterEach(() => {
  stopPostgres({ dataDir });
  rmSync(path.dirname(dataDir), { recursive: true, force: true });
});

async function pgScript(word: string): Promise<string> {
  const child = spawn(process.execPath, [path.join(ROOT, 'scripts/pg.mjs'), word], {
    env: { PATH: process.env['PATH'], NODE_ENV: 'test', DATA_DIR: dataDir, PG_PORT: String(port) },
  });
  let text = '';
  for (const stream of [child.stdout, child.stderr]) {
    stream.on('data', (chunk: Buffer) => {
      text += chunk.toString();
    });
  }
  const [code] = (await once(child, 'close')) as [number];
  return `${text}exit ${code}`;
}

it('three starts at once make one cluster, and each of them succeeds', async () => {
  const texts = await Promise.all([pgScript('ensure'), pgScript('ensure'), pgScript('ensure')]);
  expect(texts.map((text) => text.endsWith('exit 0'))).toEqual([true, true, true]);
  expect(await pgScript('status')).toContain(`PostgreSQL runs on 127.0.0.1:${port}`);
}, 60_000);

it('a busy port is left to who has it', async () => {
  const holder = net.createServer().listen(port, '127.0.0.1');
  await once(holder, 'listening');
  const text = await pgScript('ensure');
  holder.close();
  expect(text).toContain(`port ${port} is taken, so PostgreSQL takes `);
}, 60_000);

it('its passwords are for the user’s eyes only', async () => {
  await pgScript('ensure');
  expect(statSync(path.join(dataDir, 'pg.json')).mode & 0o777).toBe(0o600);
}, 60_000);

it('it stops when told', async () => {
  await pgScript('ensure');
  expect(await pgScript('stop')).toContain('PostgreSQL stopped');
  expect(await pgScript('status')).toContain('exit 3');
}, 60_000);
