// One cluster: its folder, its making, starting and stopping.
import { createHash } from 'node:crypto';
import { chownSync, existsSync, mkdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { anyFree, isFree } from '../ports.mjs';
import { say, Trouble } from '../say.mjs';
import { isRoot, runProgram, serverUser } from './programs.mjs';

const USUAL_PORT = 54_329;

/** Where the cluster lies: in the data folder, or under /var/lib where user `postgres` cannot walk in (a home of mode 0700). */
export function clusterFolder(dataDir) {
  if (!isRoot || runProgram('/usr/bin/env', ['test', '-x', dataDir]).ok) return path.join(dataDir, 'pg');
  const id = createHash('sha256').update(dataDir).digest('hex').slice(0, 10);
  return `/var/lib/middenward-pg-${id}`;
}

export const isMade = (folder) => existsSync(path.join(folder, 'PG_VERSION'));

export function isRunning(programs, folder) {
  return isMade(folder) && runProgram(path.join(programs, 'pg_ctl'), ['status', '-D', folder]).ok;
}

/** The port of a running cluster, from the file that the server itself writes. */
export function runningPort(folder) {
  try {
    return Number(readFileSync(path.join(folder, 'postmaster.pid'), 'utf8').split('\n')[3]);
  } catch {
    return null;
  }
}

/** Makes a cluster aside and renames it into place: a broken or doubled initdb leaves no half of one. */
export function makeCluster(programs, folder, password, fast) {
  const aside = `${folder}.making-${process.pid}`;
  const passwordFile = `${aside}.pw`;
  try {
    mkdirSync(path.dirname(aside), { recursive: true });
    mkdirSync(aside, { mode: 0o700 });
    writeFileSync(passwordFile, `${password}\n`, { mode: 0o600 });
    if (isRoot) {
      const { uid, gid } = serverUser();
      for (const one of [aside, passwordFile]) chownSync(one, uid, gid);
    }
    const args = [
      '-D',
      aside,
      '-U',
      'postgres',
      '-A',
      'scram-sha-256',
      `--pwfile=${passwordFile}`,
      '-E',
      'UTF8',
    ];
    const made = runProgram(path.join(programs, 'initdb'), [
      ...args,
      '--no-locale',
      ...(fast ? ['--no-sync'] : []),
    ]);
    if (!made.ok)
      throw new Trouble(`PostgreSQL could not make its files in ${folder}: ${lastLine(made.text)}`);
    if (!isMade(folder)) renameSync(aside, folder);
  } catch (error) {
    if (!isMade(folder)) throw error; // somebody else made it meanwhile, which is as good
  } finally {
    rmSync(passwordFile, { force: true });
    rmSync(aside, { recursive: true, force: true });
  }
}

/** Starts the server on loopback, on a port that is free; `fast` gives up durability and is for tests only. */
export async function startCluster(programs, folder, { fast = false, port = USUAL_PORT } = {}) {
  const free = (await isFree(port, ['127.0.0.1'])) ? port : await anyFree();
  if (free !== port) say(`port ${port} is taken, so PostgreSQL takes ${free}`);
  const settings = {
    port: free,
    listen_addresses: '127.0.0.1',
    unix_socket_directories: "''",
    max_connections: 200,
    shared_buffers: '128MB',
    max_wal_size: '1GB',
    timezone: 'UTC',
    ...(fast ? { fsync: 'off', synchronous_commit: 'off', full_page_writes: 'off' } : {}),
  };
  const options = Object.entries(settings).map(([name, value]) => `-c ${name}=${value}`);
  const log = path.join(folder, 'server.log');
  const args = ['start', '-w', '-t', '30', '-D', folder, '-l', log, '-o', options.join(' ')];
  const started = runProgram(path.join(programs, 'pg_ctl'), args);
  if (started.ok || isRunning(programs, folder)) return;
  const why = existsSync(log) ? lastLine(readFileSync(log, 'utf8')) : lastLine(started.text);
  throw new Trouble(
    `PostgreSQL did not start from ${folder}: ${why} Its log is ${log}; DATABASE_URL names another server to use instead.`,
  );
}

export function stopCluster(programs, folder) {
  const stopped = runProgram(path.join(programs, 'pg_ctl'), [
    'stop',
    '-w',
    '-m',
    'fast',
    '-t',
    '30',
    '-D',
    folder,
  ]);
  if (!stopped.ok) throw new Trouble(`PostgreSQL in ${folder} did not stop: ${lastLine(stopped.text)}`);
}

function lastLine(text) {
  const lines = text.trim().split('\n');
  return lines.findLast((line) => /FATAL|error/i.test(line)) ?? lines.at(-1) ?? '';
}
