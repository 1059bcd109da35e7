// What a data folder keeps from start to start: its secrets, its clock's rate, and who runs from it now.
import { randomBytes } from 'node:crypto';
import { readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { CONFIGURATION, Trouble } from '../say.mjs';

/**
 * The secrets of this data folder, made at its first start. What the environment gives is kept for the next start, which may
 * come without it.
 */
export function keptSecrets({ dataDir, authSecret, password, rate }) {
  const file = path.join(dataDir, 'secrets.json');
  const before = readJson(file) ?? {};
  if (before.rate !== undefined && before.rate !== rate) {
    throw new Trouble(
      `CLOCK_RATE is ${rate}, but the data in ${dataDir} were made at rate ${before.rate}: one folder keeps one clock. ` +
        'Set DATA_DIR to another folder for this rate.',
      CONFIGURATION,
    );
  }
  const kept = {
    authSecret: authSecret ?? before.authSecret ?? randomBytes(32).toString('base64url'),
    password: password ?? before.password ?? readablePassword(),
    rate,
  };
  writeWhole(file, kept);
  return kept;
}

/** Four groups of four letters: 80 bits, and can be typed from a screen. */
function readablePassword() {
  const letters = 'abcdefghijkmnpqrstuvwxyz23456789'; // 32 of them, without l, o, 0 and 1
  const text = Array.from(randomBytes(16), (byte) => letters[byte % 32]).join('');
  return text.match(/.{4}/g).join('-');
}

/** Refuses a second start from one folder: its worker would wait for the lease for ever, and its yard would take over the nodes. */
export function claimFolder(dataDir, port) {
  const file = path.join(dataDir, 'running.json');
  const other = readJson(file);
  if (other !== null && other.pid !== process.pid && isOurs(other.pid)) {
    throw new Trouble(
      `Middenward already runs from ${dataDir}, at http://localhost:${other.port} (process ${other.pid}). ` +
        'Stop it first, or set DATA_DIR to another folder.',
      CONFIGURATION,
    );
  }
  writeWhole(file, { pid: process.pid, port });
  process.once('exit', () => {
    if (readJson(file)?.pid === process.pid) rmSync(file, { force: true });
  });
}

/** A process id is used again after a while, so the command behind it is looked at too. */
function isOurs(pid) {
  try {
    process.kill(pid, 0);
  } catch (error) {
    return error.code === 'EPERM';
  }
  try {
    return /scripts[/\\](start|demo-night)\.mjs/.test(readFileSync(`/proc/${pid}/cmdline`, 'utf8'));
  } catch {
    return true; // no /proc on this system: the living process id decides
  }
}

function readJson(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch (error) {
    if (error.code === 'ENOENT' || error instanceof SyntaxError) return null;
    throw new Trouble(
      `${file} cannot be read (${error.code}): was this started as another user? Set DATA_DIR to a folder of your own.`,
      CONFIGURATION,
    );
  }
}

/** Written aside and renamed: a kill in the middle leaves the old file, not half of a new one. */
function writeWhole(file, value) {
  const aside = `${file}.${process.pid}`;
  try {
    writeFileSync(aside, JSON.stringify(value, null, 1), { mode: 0o600 });
    renameSync(aside, file);
  } catch (error) {
    throw new Trouble(
      `${file} cannot be written (${error.code}). Set DATA_DIR to a folder that can.`,
      CONFIGURATION,
    );
  }
}
