#!/usr/bin/env node
// npm test: what the tests need, then format, lint, types, build and all tests. The last line counts them.
//   npm test -- tests/control        only these tests, without the four checks
import { spawn } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs';
import path from 'node:path';
import { ensurePackages } from './packages.mjs';
import { BUILD, ROOT } from './places.mjs';
import { giveUp, say } from './say.mjs';
import { checkNode } from './start/settings.mjs';
import { countTests } from './test/count.mjs';

const RESULTS = path.join(BUILD, 'tests.json');
const bin = (...parts) => path.join(ROOT, 'node_modules', ...parts);

async function main() {
  checkNode();
  process.chdir(ROOT);
  ensurePackages();
  const cluster = await testCluster();
  const { ensureChromium } = await import('./chromium.mjs');
  say(`browser for the tests: ${ensureChromium()}`);
  const { ensureMosquitto } = await import('./mosquitto.mjs');
  say(`broker for the tests: ${ensureMosquitto()}`);

  const chosen = process.argv.slice(2);
  const checks = chosen.length === 0 ? await runChecks() : [];
  // without a build there are no pages to test; the failed check has been counted
  const projects = checks.includes('build') ? ['--project', 'pure', '--project', 'database'] : [];
  if (projects.length > 0) say('the tests of pages and in the browser are left out: there is no build');
  const tests = await runTests([...projects, ...chosen]);
  await cluster.release();

  const passed = tests.passed + (chosen.length === 0 ? CHECKS.flat().length - checks.length : 0);
  const failed = tests.failed + checks.length;
  for (const name of checks) console.log(`failed: ${name}`);
  console.log(`${passed} passed, ${failed} failed`);
  process.exitCode = failed === 0 ? 0 : 1;
}

/** Looked after here once, so that its absence is one sentence and not one for each test file. */
async function testCluster() {
  const { ensurePostgres, stopPostgres } = await import('./pg.mjs');
  const dataDir = path.join(ROOT, '.data-test');
  // DATABASE_URL is left aside on purpose: tests drop databases
  const { started, adminUrl } = await ensurePostgres({ dataDir, databaseUrl: '', fast: true, port: 54_330 });
  say(started ? 'PostgreSQL for the tests started' : 'PostgreSQL for the tests … already there');
  return {
    release: async () => {
      if (started && !(await hasOtherUsers(adminUrl))) stopPostgres({ dataDir });
    },
  };
}

async function hasOtherUsers(adminUrl) {
  const { default: pg } = await import('pg');
  const client = new pg.Client({ connectionString: adminUrl });
  await client.connect();
  try {
    const sql =
      "select 1 from pg_stat_activity where backend_type = 'client backend' and pid <> pg_backend_pid()";
    return (await client.query(sql)).rowCount > 0;
  } finally {
    await client.end();
  }
}

// Side by side, each row in its order: half of a build is one thread.
const CHECKS = [
  [
    {
      name: 'format',
      command: [bin('prettier', 'bin', 'prettier.cjs'), '--check', '--log-level', 'warn', '.'],
    },
    { name: 'lint', command: [bin('eslint', 'bin', 'eslint.js'), '.', '--max-warnings', '0'] },
  ],
  [
    { name: 'build', command: [path.join(ROOT, 'scripts', 'build.mjs')] },
    // after the build, which writes the types of the routes
    { name: 'types', command: [bin('typescript', 'bin', 'tsc'), '--noEmit'] },
  ],
];

/** @returns the names of the checks that failed */
async function runChecks() {
  const failed = await Promise.all(CHECKS.map(runRow));
  return failed.flat();
}

async function runRow(checks) {
  const failed = [];
  for (const { name, command } of checks) {
    say(`check: ${name}`);
    if ((await run(command)) !== 0) {
      failed.push(name);
      say(`check: ${name} FAILED`);
    }
  }
  return failed;
}

async function runTests(more) {
  say('tests');
  mkdirSync(BUILD, { recursive: true });
  rmSync(RESULTS, { force: true });
  const reporters = ['--reporter=default', '--reporter=json', `--outputFile.json=${RESULTS}`];
  const code = await run([bin('vitest', 'vitest.mjs'), 'run', ...reporters, ...more]);
  return countTests(existsSync(RESULTS) ? JSON.parse(readFileSync(RESULTS, 'utf8')) : null, code);
}

function run(args) {
  return new Promise((resolve) => {
    const child = spawn(process.execPath, args, { cwd: ROOT, stdio: ['ignore', 'inherit', 'inherit'] });
    child.once('close', (code) => resolve(code ?? 1));
  });
}

main().catch(giveUp);
