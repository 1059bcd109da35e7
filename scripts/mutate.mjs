/** `npm run mutate [-- claims/rest.ts …]`: mutation testing of lib/control, all of it or the files named. Takes its time. */
import { spawnSync } from 'node:child_process';

const files = process.argv.slice(2);
const mutate = files.length === 0 ? [] : ['--mutate', files.map((file) => `lib/control/${file}`).join(',')];
const stryker = 'node_modules/@stryker-mutator/core/bin/stryker.js';
const { status } = spawnSync(
  process.execPath,
  [stryker, 'run', 'scripts/mutate/stryker.config.mjs', ...mutate],
  { stdio: 'inherit' },
);
process.exit(status ?? 1);
