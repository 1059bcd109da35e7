import { spawnSync } from 'node:child_process';
import { cpSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { MIGRATIONS, ROOT } from '../../scripts/places.mjs';

let folder: string;
beforeEach(() => {
  folder = mkdtempSync(path.join(tmpdir(), 'middenward-drift-'));
  cpSync(MIGRATIONS, folder, { recursive: true });
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

/** What the kit would still have to write to bring the migrations up to db/schema. */
function missingMigration(): string[] {
  const before = new Set(readdirSync(folder));
  const kit = path.join(ROOT, 'node_modules', 'drizzle-kit', 'bin.cjs');
  // the kit puts ./ before the folder, whatever it is
  const out = path.relative(ROOT, folder);
  const args = ['generate', '--dialect', 'postgresql', '--schema', './db/schema/*.ts', '--out', out];
  const run = spawnSync(process.execPath, [kit, ...args], { cwd: ROOT, encoding: 'utf8' });
  expect(run.stdout + run.stderr).toMatch(/No schema changes|Your SQL migration file/); // it exits 0 even where it fails
  return readdirSync(folder).filter((file) => !before.has(file));
}

it('the migrations make what db/schema says', () => {
  expect(missingMigration()).toEqual([]);
}, 60_000);

it('a table that no migration made would be noticed', () => {
  const meta = path.join(folder, 'meta');
  const newest = readdirSync(meta)
    .filter((file) => file.endsWith('_snapshot.json'))
    .sort()
    .at(-1);
  const file = path.join(meta, newest ?? '');
  const snapshot = JSON.parse(readFileSync(file, 'utf8')) as { tables: Record<string, unknown> };
  delete snapshot.tables['public.house'];
  writeFileSync(file, JSON.stringify(snapshot));
  expect(missingMigration()).toHaveLength(1);
}, 60_000);
