#!/usr/bin/env node
// Writes the next migration from db/schema.   npm run db:generate -- --name NAME [--custom]
// `--custom` writes an empty one, for SQL that the kit does not know (partitions, row security, triggers).
import { spawnSync } from 'node:child_process';
import path from 'node:path';
import { ROOT } from './places.mjs';

const kit = path.join(ROOT, 'node_modules', 'drizzle-kit', 'bin.cjs');
const ended = spawnSync(process.execPath, [kit, 'generate', ...process.argv.slice(2)], {
  cwd: ROOT,
  stdio: 'inherit',
});
process.exit(ended.status ?? 1);
