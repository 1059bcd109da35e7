#!/usr/bin/env node
// Builds the pages (Next) and the programs that run beside them (esbuild), each only when its sources changed.
//   node scripts/build.mjs             everything        node scripts/build.mjs door yard    these programs only
import { spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, openSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { compressTexts } from './compress.mjs';
import { BUILD, isCommand, ROOT, STATIC } from './places.mjs';
import { giveUp, say, Trouble } from './say.mjs';

/** Name of the program in .build/ → the module it starts with. */
export const PROGRAMS = {
  door: 'worker/door/main.ts',
  worker: 'worker/main.ts',
  yard: 'worker/yard/main.ts',
  seed: 'worker/jobs/seed.ts',
};

const SETTINGS = [
  'package.json',
  'package-lock.json',
  'tsconfig.json',
  'scripts/build.mjs',
  'scripts/compress.mjs',
];
const PROGRAM_SOURCES = ['worker', 'db', 'lib', ...SETTINGS];
const PAGE_SOURCES = [
  'app',
  'components',
  'db',
  'lib',
  'public',
  'proxy.ts',
  'instrumentation.ts',
  'instrumentation-client.ts',
  'next.config.mjs',
  'postcss.config.mjs',
  ...SETTINGS,
];

/** Builds what is out of date. @param {string[]} [names] programs; without it, all of them and the pages */
export async function build(names) {
  mkdirSync(BUILD, { recursive: true });
  await alone(async () => {
    await buildPrograms(names ?? Object.keys(PROGRAMS));
    if (names === undefined) await buildPages();
  });
}

async function buildPrograms(names) {
  const unknown = names.find((name) => !(name in PROGRAMS));
  if (unknown)
    throw new Trouble(`There is no program "${unknown}"; there are ${Object.keys(PROGRAMS).join(', ')}.`, 64);
  const hash = hashOf(PROGRAM_SOURCES);
  const stale = names.filter((name) => stamp(name) !== hash || !existsSync(path.join(BUILD, `${name}.mjs`)));
  if (stale.length === 0) return say(`programs (${names.join(', ')}) … already built`);
  say(`building the programs ${stale.join(', ')}`);
  const esbuild = await import('esbuild');
  const result = await esbuild
    .build({
      ...bundleSettings(),
      entryPoints: Object.fromEntries(stale.map((name) => [name, PROGRAMS[name]])),
      outdir: BUILD,
      outExtension: { '.js': '.mjs' },
    })
    .catch((error) => error);
  if (result instanceof Error) throw new Trouble(`The programs do not build:\n${result.message}`);
  for (const name of stale) writeStamp(name, hash);
}

/** What every bundle has in common. Packages stay outside: they are installed beside it anyhow. */
export function bundleSettings() {
  return {
    absWorkingDir: ROOT,
    bundle: true,
    platform: 'node',
    target: 'node20',
    format: 'esm',
    packages: 'external',
    sourcemap: 'linked',
    // what marks a module as the server's throws outside Next; its own empty half does not (see vitest.config.ts)
    alias: { 'server-only': path.join(ROOT, 'node_modules/server-only/empty.js') },
    logLevel: 'silent',
  };
}

async function buildPages() {
  const hash = hashOf(PAGE_SOURCES);
  const built = path.join(ROOT, '.next', 'BUILD_ID');
  const mark = () => `${hash} ${existsSync(built) ? readFileSync(built, 'utf8') : ''}`;
  if (existsSync(built) && stamp('pages') === mark()) return say('pages … already built');
  say('building the pages, which takes about a minute …');
  const log = path.join(BUILD, 'pages.log');
  const out = openSync(log, 'w');
  const next = path.join(ROOT, 'node_modules', 'next', 'dist', 'bin', 'next');
  const child = spawn(process.execPath, [next, 'build'], {
    cwd: ROOT,
    stdio: ['ignore', out, out],
    env: { ...process.env, NODE_ENV: 'production', NEXT_TELEMETRY_DISABLED: '1' },
  });
  const code = await new Promise((resolve) => child.once('close', resolve));
  if (code !== 0) {
    const lines = readFileSync(log, 'utf8').trimEnd().split('\n').slice(-40).join('\n');
    throw new Trouble(`${lines}\n\nThe pages do not build; the reason is above, all of it in ${log}.`);
  }
  await compressTexts(STATIC);
  writeStamp('pages', mark());
}

/** One build at a time in one folder: two would write into the same files. */
async function alone(work) {
  const lock = path.join(BUILD, 'lock');
  for (let waited = false; !take(lock);) {
    const holder = Number(existsSync(lock) ? readFileSync(lock, 'utf8') : '') || 0;
    if (holder !== 0 && !isAlive(holder)) rmSync(lock, { force: true });
    if (!waited) say('another build is running here; waiting for it');
    waited = true;
    await new Promise((resolve) => setTimeout(resolve, 500));
  }
  try {
    await work();
  } finally {
    rmSync(lock, { force: true });
  }
}

function take(lock) {
  try {
    writeFileSync(lock, String(process.pid), { flag: 'wx' });
    return true;
  } catch (error) {
    if (error.code === 'EEXIST') return false;
    throw new Trouble(
      `${BUILD} cannot be written (${error.code}): was it built by another user? Remove it, or start as that user.`,
    );
  }
}

function isAlive(pid) {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return error.code === 'EPERM';
  }
}

const stampFile = (name) => path.join(BUILD, `${name}.stamp`);
const stamp = (name) => (existsSync(stampFile(name)) ? readFileSync(stampFile(name), 'utf8') : null);
const writeStamp = (name, value) => writeFileSync(stampFile(name), value);

function hashOf(sources) {
  const hash = createHash('sha256');
  for (const source of sources) {
    for (const file of filesUnder(source))
      hash
        .update(file)
        .update('\0')
        .update(readFileSync(path.join(ROOT, file)));
  }
  return hash.digest('hex');
}

function filesUnder(place) {
  const full = path.join(ROOT, place);
  if (!existsSync(full)) return [];
  const entries = readDirectory(full);
  if (entries === null) return [place];
  return entries.flatMap((entry) => filesUnder(path.join(place, entry)));
}

function readDirectory(full) {
  try {
    return readdirSync(full).sort();
  } catch (error) {
    if (error.code === 'ENOTDIR') return null;
    throw error;
  }
}

if (isCommand(import.meta.url)) {
  const names = process.argv.slice(2);
  build(names.length > 0 ? names : undefined).catch(giveUp);
}
