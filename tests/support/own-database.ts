// Before each test file of the project "database": a database of its own, and the environment that the server code reads.
// It runs before the file's imports, so lib/server/env sees it.
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterAll, inject } from 'vitest';
import { cloneDatabase } from './clone';

const database = await cloneDatabase(inject('cluster'));
const dataDir = mkdtempSync(path.join(tmpdir(), 'middenward-test-'));

process.env['DATABASE_URL'] = database.url;
process.env['DATA_DIR'] = dataDir;
process.env['AUTH_SECRET'] = 'only-for-tests-only-for-tests-only-for-tests';
process.env['PUBLIC_URL'] = 'http://localhost:3000';
process.env['CLOCK_RATE'] = '1';
process.env['BUS_HOSTS'] = '127.0.0.1, localhost';
process.env['LOG_LEVEL'] = 'silent';

afterAll(async () => {
  await database.drop(); // with force: a pool that the file left open loses its connections, which it must bear anyhow
  rmSync(dataDir, { recursive: true, force: true });
});
