/** This worker's own id, kept in DATA_DIR, so that a restarted worker takes its lead up again at once. */
import { mkdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { v7, validate } from 'uuid';

interface Kept {
  instance: string;
  pid: number;
}

/**
 * The id of the worker that last ran from this folder. While that worker still runs, a second one gets an id of its own:
 * two that share one would both believe that they lead.
 */
export function ownInstance(dataDir: string): string {
  const file = path.join(dataDir, 'worker-instance.json');
  const kept = readKept(file);
  if (kept !== null && kept.pid !== process.pid && isAlive(kept.pid)) return v7();
  const instance = kept?.instance ?? v7();
  mkdirSync(dataDir, { recursive: true });
  const aside = `${file}.${process.pid}`;
  writeFileSync(aside, JSON.stringify({ instance, pid: process.pid }), { mode: 0o600 });
  renameSync(aside, file);
  return instance;
}

function readKept(file: string): Kept | null {
  try {
    const kept: unknown = JSON.parse(readFileSync(file, 'utf8'));
    if (typeof kept !== 'object' || kept === null || !('instance' in kept) || !('pid' in kept)) return null;
    const { instance, pid } = kept;
    return validate(instance) && typeof instance === 'string' && typeof pid === 'number'
      ? { instance, pid }
      : null;
  } catch {
    // Missing at the first start, or torn: a new id costs one lease of waiting at most.
    return null;
  }
}

function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    // Alive, but another user's.
    return error instanceof Error && 'code' in error && error.code === 'EPERM';
  }
}
