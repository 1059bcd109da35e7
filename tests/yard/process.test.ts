import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { systemClock } from '@/worker/yard/clock';
import { readWorld } from '@/worker/yard/store';
import { houseWorld, type World } from '@/worker/yard/world';
import { FakeServer, until } from './support';

// Real processes start here, which a busy machine does slowly.
vi.setConfig({ testTimeout: 60_000 });

let folder: string;
let server: FakeServer;
const started: ChildProcess[] = [];

beforeEach(async () => {
  folder = mkdtempSync(join(tmpdir(), 'yard test '));
  server = await FakeServer.open();
});
afterEach(() => {
  for (const child of started.splice(0)) child.kill('SIGKILL');
  server.close();
  rmSync(folder, { recursive: true, force: true });
});

interface Run {
  child: ChildProcess;
  events: Array<Record<string, unknown>>;
  complaint: () => string;
  ended: Promise<unknown>;
}

function yard(config: object, extra: string[] = []): Run {
  const file = join(folder, 'yard.json');
  writeFileSync(file, JSON.stringify({ seed: 7, stateFile: join(folder, 'world.json'), ...config }));
  const arguments_ = [
    '--import',
    'tsx',
    'worker/yard/main.ts',
    '--config',
    file,
    '--server',
    server.url,
    ...extra,
  ];
  const child = spawn(process.execPath, arguments_, { stdio: ['ignore', 'pipe', 'pipe'] });
  started.push(child);
  const events: Run['events'] = [];
  let rest = '';
  let complaint = '';
  child.stdout.on('data', (chunk) => {
    const lines = (rest + String(chunk)).split('\n');
    rest = lines.pop() ?? '';
    events.push(...lines.map((line) => JSON.parse(line) as Record<string, unknown>));
  });
  child.stderr.on('data', (chunk) => (complaint += String(chunk)));
  return { child, events, complaint: () => complaint, ended: once(child, 'exit') };
}

const nodes = [
  { key: 'LH-1', token: 'mw-one', house: 'long-house' },
  { key: 'PH-1', token: 'mw-two', house: 'prop-house' },
];

describe('the yard as a process', () => {
  test('connects each node with its own token, obeys, and saves its world when it is ended', async () => {
    const run = yard({ nodes });
    await until(() => server.tokens.length === 2);
    expect([...server.tokens].sort()).toEqual(['Bearer mw-one', 'Bearer mw-two']);
    const line = await server.welcomed(systemClock, server.tokens.indexOf('Bearer mw-one'));
    await until(() => line.of('readings').length > 0);
    const names = line.of('readings')[0]?.pack.map((record) => (record as { n: string }).n);
    expect(names).toContain('bench-1');
    line.command(5, { '1': 'on' });
    await until(() => line.of('relays').at(-1)?.channels['1'] === 'on');
    await until(() => run.events.some(({ event, node }) => event === 'command' && node === 'LH-1'));

    run.child.kill('SIGTERM');
    expect(await run.ended).toEqual([0, null]);
    const saved = readWorld(join(folder, 'world.json'), 7);
    expect('world' in saved && saved.world.houses['long-house']?.airC).toBeGreaterThan(-20);
  });

  test('goes on from its saved world, with its coils off and over the time in which it did not run', async () => {
    const first = yard({ nodes: [] });
    await until(() => first.events.some(({ event }) => event === 'start'));
    first.child.kill('SIGTERM');
    await first.ended;
    const file = join(folder, 'world.json');
    const before = JSON.parse(readFileSync(file, 'utf8')) as World;
    const anHourMs = 3_600_000;
    writeFileSync(file, JSON.stringify({ ...before, ms: before.ms - anHourMs }));

    const second = yard({ nodes: [] });
    await until(() => second.events.some(({ event }) => event === 'start'));
    second.child.kill('SIGTERM');
    await second.ended;
    const after = JSON.parse(readFileSync(file, 'utf8')) as World;
    expect(after.ms).toBeGreaterThanOrEqual(before.ms);
    expect(houseWorld(after, 'long-house').flowsJ.generated).toBeGreaterThan(1e6);
    expect(houseWorld(after, 'long-house').flowsJ.fans).toBe(0);
  });

  test('begins anew where the saved world is torn', async () => {
    writeFileSync(join(folder, 'world.json'), '{"version":1,"se');
    const run = yard({ nodes: [] });
    await until(() => run.events.some(({ event }) => event === 'start'));
    expect(run.events[0]?.['world']).toBe('the saved world is not whole');
    run.child.kill('SIGTERM');
    await run.ended;
    expect('world' in readWorld(join(folder, 'world.json'), 7)).toBe(true);
  });

  test.each([
    ['an unknown house', { nodes: [{ key: 'X', token: 't', house: 'tower' }] }, [], 'no house "tower"'],
    ['a node without a token', { nodes: [{ key: 'X', house: 'long-house' }] }, [], 'nodes.0.token'],
    ['a rate of nothing', { nodes: [] }, ['--rate', '0'], '--rate must be a number above 0'],
  ])('ends with 78 and a sentence on %s', async (_what, config, extra, sentence) => {
    const run = yard(config, extra);
    expect(await run.ended).toEqual([78, null]);
    expect(run.complaint()).toContain(sentence);
    expect(existsSync(join(folder, 'world.json'))).toBe(false);
  });
});
