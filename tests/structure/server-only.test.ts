// db/ and lib/server/ are marked `server-only`, which throws outside Next's server build. Plain Node must load them too:
// the bundles and vitest put the package's own empty half in its place, tsx takes it by `--conditions=react-server`.
import { spawnSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, rmSync } from 'node:fs';
import path from 'node:path';
import { build } from 'esbuild';
import { afterAll, expect, it } from 'vitest';
import { BUILD, ROOT } from '../../scripts/places.mjs';
import { bundleSettings } from '../../scripts/build.mjs';

// inside the project, so that the bundle finds its packages
mkdirSync(BUILD, { recursive: true });
const folder = mkdtempSync(path.join(BUILD, 'test-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const SOURCE = "import { closePools } from '@/db/client'; await closePools(); console.log('loaded');";

async function runBundled(name: string, settings: ReturnType<typeof bundleSettings>) {
  const outfile = path.join(folder, `${name}.mjs`);
  await build({
    ...settings,
    stdin: { contents: SOURCE, resolveDir: ROOT, loader: 'ts' },
    outfile,
    sourcemap: false,
  });
  return spawnSync(process.execPath, [outfile], { encoding: 'utf8' });
}

it('a bundle of the database’s client runs in plain Node', async () => {
  expect((await runBundled('with', bundleSettings())).stdout).toBe('loaded\n');
});

it('without the empty half it would refuse to load, so the mark works', async () => {
  const { alias, ...rest } = bundleSettings();
  expect(Object.keys(alias)).toEqual(['server-only']);
  const { status, stderr } = await runBundled('without', rest as ReturnType<typeof bundleSettings>);
  expect(status).not.toBe(0);
  expect(stderr).toContain('cannot be imported from a Client Component');
});

it('tsx loads it under the condition that Next’s server uses', () => {
  const tsx = path.join(ROOT, 'node_modules/tsx/dist/cli.mjs');
  const script = "import('@/db/client').then((m) => m.closePools()).then(() => console.log('loaded'))";
  const run = spawnSync(process.execPath, [tsx, '--conditions=react-server', '-e', script], {
    cwd: ROOT,
    encoding: 'utf8',
  });
  expect(run.stdout).toBe('loaded\n');
});
