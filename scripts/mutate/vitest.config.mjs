import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '../..');

/** Those that play thousands of cases or long times: each of thousands of changes would run them again. */
const LONG = ['model', 'differential', 'look-ahead', 'calendar-edges', 'cycle', 'day-limit'];
const { MUTATE_TESTS: only } = process.env;

/** The core's tests; by `MUTATE_TESTS=needs,golden` those alone, which is faster where one knows who should notice. */
export default defineConfig({
  root,
  resolve: { alias: [{ find: /^@\//, replacement: `${root}/` }] },
  test: {
    include: (only?.split(',') ?? ['*']).map((name) => `tests/control/${name}.test.ts`),
    exclude: only === undefined ? LONG.map((name) => `tests/control/${name}*.test.ts`) : [],
    testTimeout: 20_000,
  },
});
