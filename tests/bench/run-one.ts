// Runs one benchmark, given by the file that it was built into, in a process of its own, and prints its line.
import { cpus, totalmem } from 'node:os';
import path from 'node:path';
import { pathToFileURL } from 'node:url';

const built = process.argv[2] ?? '';
const name = path.basename(built, '.mjs');
const module: unknown = await import(pathToFileURL(built).href);
if (
  typeof module !== 'object' ||
  module === null ||
  !('bench' in module) ||
  typeof module.bench !== 'function'
) {
  throw new Error(`The benchmark ${name} exports no function "bench".`);
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
