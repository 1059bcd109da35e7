// Runs one benchmark in a process of its own and prints its line.
import { cpus, totalmem } from 'node:os';
import path from 'node:path';
import { pathToFileURL } from 'node:url';
import { ROOT } from '../../scripts/places.mjs';

const name = process.argv[2] ?? '';

const file = pathToFileURL(path.join(ROOT, 'tests', 'bench', `${name}.ts`)).href;
const module: unknown = await import(file);
if (
  typeof module !== 'object' ||
  module === null ||
  !('bench' in module) ||
  typeof module.bench !== 'function'
) {
  throw new Error(`tests/bench/${name}.ts exports no function "bench".`);
}
const bench = module.bench as () => unknown;
const figures: unknown = await bench();
const machine = {
  cpu: cpus()[0]?.model.trim() ?? 'unknown',
  cores: cpus().length,
  memoryGiB: Math.round(totalmem() / 2 ** 30),
  node: process.versions.node,
};
console.log(JSON.stringify({ bench: name, ...Object(figures), machine }));
process.exit(0); // a pool or a socket that a benchmark left open must not hold the next one up
