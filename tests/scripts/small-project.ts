// A project of this shape, made small: our scripts and door as they are, with a few lines for each of the other parts.
// `npm start` itself is under test here, so what it starts need only live and answer.
import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { cpSync, mkdirSync, mkdtempSync, readdirSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { ROOT } from '../../scripts/places.mjs';
import { stopPostgres } from '../../scripts/pg.mjs';

const FILES: Record<string, string> = {
  'worker/main.ts': `
    import http from 'node:http';
    if (!process.env.DATABASE_URL?.includes('middenward_app')) process.exit(78);
    const server = http.createServer((_, answer) => answer.end(JSON.stringify({ leader: true, epoch: 1 })));
    server.listen(Number(process.env.WORKER_PORT), '127.0.0.1');
    process.on('SIGTERM', () => process.exit(0));`,
  'worker/yard/main.ts': `
    if (process.env.DATABASE_URL ?? process.env.AUTH_SECRET) throw new Error('the yard was given secrets');
    console.log('yard', JSON.stringify(process.argv.slice(2)));
    setInterval(() => {}, 1000);`,
  'worker/jobs/seed.ts': `
    import { existsSync, writeFileSync } from 'node:fs';
    const file = process.env.DATA_DIR + '/yard.json';
    if (!existsSync(file)) { writeFileSync(file, '{}'); console.log('Demo holdings set up.'); }`,
  'db/migrations/0000_first.sql': 'create table house (id int);',
  'db/migrations/meta/_journal.json': JSON.stringify({
    version: '7',
    dialect: 'postgresql',
    entries: [{ idx: 0, version: '7', when: 1_700_000_000_000, tag: '0000_first', breakpoints: true }],
  }),
};

const NEXT = `
  const fs = require('fs'), http = require('http'), [, , verb, ...rest] = process.argv;
  if (verb === 'build') {
    fs.mkdirSync('.next/static/chunks', { recursive: true });
    fs.writeFileSync('.next/static/chunks/a.js', 'night();'.repeat(500));
    fs.writeFileSync('.next/BUILD_ID', String(process.pid));
  }
  else http.createServer((q, s) => s.end('{"web":true}')).listen(Number(rest[rest.indexOf('-p') + 1]), '127.0.0.1');`;

export interface SmallProject {
  root: string;
  dataDir: string;
  /** Runs \`node scripts/start.mjs\`; its output grows in \`text\`. */
  start: (env?: Record<string, string>) => Running;
  remove: () => Promise<void>;
}
export interface Running {
  child: ChildProcess;
  state: { text: string };
  /** Resolves to the exit code. */
  ended: Promise<number | null>;
}

export function smallProject(): SmallProject {
  const root = mkdtempSync(path.join(tmpdir(), 'middenward with a space '));
  const dataDir = path.join(root, '.data');
  for (const name of ['scripts', 'worker/door', 'package.json', 'package-lock.json']) {
    cpSync(path.join(ROOT, name), path.join(root, name), { recursive: true });
  }
  for (const [file, text] of Object.entries(FILES)) write(root, file, text);
  linkPackages(root);
  write(root, 'node_modules/next/dist/bin/next', NEXT);
  write(root, 'node_modules/next/package.json', '{"name":"next","type":"commonjs"}');
  const running: Running[] = [];
  return {
    root,
    dataDir,
    start(env = {}) {
      const child = spawn(process.execPath, ['scripts/start.mjs'], {
        cwd: root,
        env: { PATH: process.env['PATH'], HOME: process.env['HOME'], NODE_ENV: 'test', ...env },
      });
      const state = { text: '' };
      for (const stream of [child.stdout, child.stderr]) {
        stream.on('data', (chunk: Buffer) => {
          state.text += chunk.toString();
        });
      }
      const ended = once(child, 'close').then(([code]) => code as number | null);
      const one = { child, state, ended };
      running.push(one);
      return one;
    },
    async remove() {
      for (const { child, ended } of running) {
        child.kill('SIGTERM');
        await ended;
      }
      stopPostgres({ dataDir });
      rmSync(root, { recursive: true, force: true });
    },
  };
}

function write(root: string, file: string, text: string) {
  mkdirSync(path.join(root, path.dirname(file)), { recursive: true });
  writeFileSync(path.join(root, file), text);
}

/** The packages that are installed here, by links; only next is another. */
function linkPackages(root: string) {
  const from = path.join(ROOT, 'node_modules');
  mkdirSync(path.join(root, 'node_modules'));
  for (const name of readdirSync(from)) {
    if (name !== 'next') symlinkSync(path.join(from, name), path.join(root, 'node_modules', name));
  }
}
