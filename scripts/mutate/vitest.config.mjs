import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '../..');

/** The core's tests alone, without those that play thousands of random cases: each of 3,000 changes runs them again. */
export default defineConfig({
  root,
  resolve: { alias: [{ find: /^@\//, replacement: `${root}/` }] },
  test: {
    include: ['tests/control/**/*.test.ts'],
    exclude: ['model', 'differential', 'look-ahead', 'night'].map((name) => `tests/control/${name}*.test.ts`),
    testTimeout: 20_000,
  },
});
