#!/usr/bin/env node
// npm run bench [-- NAME …]: one JSON line a benchmark on standard output; what goes on meanwhile goes to standard error.
// A benchmark is tests/bench/NAME.ts, which exports `bench`; see tests/bench/support.ts.
import { spawn } from 'node:child_process';
import { readdirSync } from 'node:fs';
import path from 'node:path';
import { bundleSettings } from './build.mjs';
import { BUILD, ROOT } from './places.mjs';
import { giveUp, Trouble } from './say.mjs';

const FOLDER = path.join(ROOT, 'tests', 'bench');

async function main() {
  const there = readdirSync(FOLDER)
    .filter((file) => /^[a-z]+(\.[a-z]+)?\.ts$/.test(file) && file !== 'support.ts')
    .map((file) => file.slice(0, -'.ts'.length))
    .sort();
  const asked = process.argv.slice(2);
  const unknown = asked.find((name) => !there.includes(name));
  if (unknown) throw new Trouble(`There is no benchmark "${unknown}"; there are ${there.join(', ')}.`, 64);
  let failed = 0;
  for (const name of asked.length > 0 ? asked : there) if ((await runOne(name)) !== 0) failed += 1;
  process.exitCode = failed === 0 ? 0 : 1;
}

/**
 * A process each, so that one does not measure the heap and the compiled code that another left. What is measured is built
 * as the programs are: a runner that compiles each module by itself makes a call of every function that is written down.
 */
async function runOne(name) {
  const { build } = await import('esbuild');
  const result = await build({
    ...bundleSettings(),
    entryPoints: ['run-one', name].map((one) => path.join(FOLDER, `${one}.ts`)),
    outdir: path.join(BUILD, 'bench'),
    outExtension: { '.js': '.mjs' },
    plugins: [SCRIPTS_STAY_OUTSIDE],
  }).catch((error) => error);
  if (result instanceof Error) throw new Trouble(`The benchmark ${name} does not build:\n${result.message}`);
  const built = (one) => path.join(BUILD, 'bench', `${one}.mjs`);
  const args = ['--conditions=react-server', '--expose-gc', built('run-one'), built(name)];
  return new Promise((resolve) => {
    const child = spawn(process.execPath, args, { cwd: ROOT, stdio: ['ignore', 'pipe', 'inherit'] });
    // a library that prints must not come between the lines
    let rest = '';
    child.stdout.on('data', (chunk) => {
      const lines = (rest + chunk).split('\n');
      rest = lines.pop() ?? '';
      for (const line of lines)
        (line.startsWith('{"bench":') ? process.stdout : process.stderr).write(`${line}\n`);
    });
    child.once('close', (code) => resolve(code ?? 1));
  });
}

/** They find the project by where they lie. */
const SCRIPTS_STAY_OUTSIDE = {
  name: 'scripts-stay-outside',
  setup: (build) =>
    build.onResolve({ filter: /\/scripts\/[\w-]+\.mjs$/ }, ({ path: asked, resolveDir }) => ({
      path: path.resolve(resolveDir, asked),
      external: true,
    })),
};

main().catch(giveUp);
