import { availableParallelism } from 'node:os';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const root = path.dirname(fileURLToPath(import.meta.url));
const under = (folders: string) => [`tests/${folders}/**/*.test.{ts,tsx}`];

const resolve = {
  alias: [
    { find: /^@\//, replacement: `${root}/` },
    // marks what must not reach a browser; outside Next it would throw, so it is the package's own empty half here
    { find: 'server-only', replacement: path.join(root, 'node_modules/server-only/empty.js') },
  ],
};

export default defineConfig({
  test: {
    // by itself it leaves one of two cores idle; many files wait for programs more than they reckon
    maxWorkers: Math.max(2, availableParallelism()),
    projects: [
      {
        resolve,
        test: {
          name: 'pure',
          testTimeout: 20_000,
          include: under(
            '{control,physics,analysis,wording,units,field,schema,structure,yard,live,door,components,conformance}',
          ),
        },
      },
      {
        resolve,
        test: {
          name: 'database',
          include: under('{db,worker,api,security,seed,server,scripts}'),
          globalSetup: 'tests/support/cluster.ts',
          setupFiles: 'tests/support/own-database.ts',
          testTimeout: 20_000,
          hookTimeout: 60_000,
        },
      },
      {
        resolve,
        test: {
          name: 'web',
          include: under('web'),
          globalSetup: ['tests/support/cluster.ts', 'tests/support/shared-app.ts'],
          testTimeout: 30_000,
          hookTimeout: 180_000,
          sequence: { groupOrder: 1 },
        },
      },
      {
        resolve,
        test: {
          name: 'browser',
          include: under('browser'),
          globalSetup: ['tests/support/cluster.ts', 'tests/support/shared-app.ts'],
          testTimeout: 60_000,
          hookTimeout: 180_000,
          // one file at a time: two browsers on two cores make each other late
          fileParallelism: false,
          sequence: { groupOrder: 2 },
        },
      },
    ],
  },
});
