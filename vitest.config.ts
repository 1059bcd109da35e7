import { availableParallelism } from 'node:os';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';
import { BaseSequencer, type TestSpecification } from 'vitest/node';

const root = path.dirname(fileURLToPath(import.meta.url));
const under = (folders: string) => [`tests/${folders}/**/*.test.{ts,tsx}`];

const DAY = 'tests/conformance/day.test.ts';

const resolve = {
  alias: [
    { find: /^@\//, replacement: `${root}/` },
    // marks what must not reach a browser; outside Next it would throw, so it is the package's own empty half here
    { find: 'server-only', replacement: path.join(root, 'node_modules/server-only/empty.js') },
  ],
};

const CORES = Math.max(2, availableParallelism());

/** Files that wait for leases to end begin first, so that others reckon meanwhile. */
class LongWaitsFirst extends BaseSequencer {
  override async sort(files: TestSpecification[]): Promise<TestSpecification[]> {
    const sorted = await super.sort(files);
    const waits = (file: TestSpecification) => file.project.name === 'conformance';
    return [...sorted.filter(waits), ...sorted.filter((file) => !waits(file))];
  }
}

export default defineConfig({
  test: {
    sequence: { sequencer: LongWaitsFirst },
    // by itself it leaves one of two cores idle; many files wait for programs more than they reckon
    maxWorkers: CORES,
    projects: [
      {
        resolve,
        test: {
          name: 'conformance',
          testTimeout: 20_000,
          include: under('conformance'),
          exclude: [DAY],
          maxWorkers: CORES + 1,
        },
      },
      {
        resolve,
        test: {
          name: 'pure',
          testTimeout: 20_000,
          include: under(
            '{control,physics,analysis,wording,units,field,schema,structure,yard,live,door,components}',
          ),
          maxWorkers: CORES + 1,
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
          maxWorkers: CORES + 1,
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
          // one file at a time: two browsers on two cores make each other late, and the whole no sooner
          fileParallelism: false,
          sequence: { groupOrder: 2 },
        },
      },
      {
        resolve,
        test: {
          // a day's readings in two minutes: beside others it makes them late
          name: 'conformance-day',
          testTimeout: 20_000,
          include: [DAY],
          sequence: { groupOrder: 3 },
        },
      },
    ],
  },
});
