// What outlives a lost line and a power cut: readings that nobody acknowledged yet, log lines likewise, and the fallback.
import { closeSync, fsyncSync, mkdirSync, openSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import path from 'node:path';

/** The protocol asks for a day at the least. */
const KEPT_S = 26 * 3600;
/** Some 20 MB on the disk: a day of 60 points each 30 s has 172,800. */
const RECORDS_MOST = 250_000;
const PACK_MOST = 100;
const LOGS_MOST = 500;

/** Readings by point and time, the oldest first. Each keeps the stamp it was taken with, so that sending it twice is harmless. */
export class Readings {
  #file;
  #lines = 0;
  /** `{ record, seq }`; seq: the pack that it is under way in, or null. */
  #entries;

  constructor(folder) {
    mkdirSync(folder, { recursive: true });
    this.#file = path.join(folder, 'readings.jsonl');
    const records = textOf(this.#file).split('\n').flatMap(parsed);
    const byTime = records
      .filter(({ n, t }) => typeof n === 'string' && Number.isFinite(t))
      .sort((a, b) => a.t - b.t);
    const once = new Map(byTime.map((record) => [`${record.n} ${record.t}`, { record, seq: null }]));
    this.#entries = [...once.values()];
    this.#compact();
  }

  get size() {
    return this.#entries.length;
  }

  add(records) {
    if (records.length === 0) return;
    this.#entries.push(...records.map((record) => ({ record, seq: null })));
    const latest = records.at(-1).t;
    if (this.#entries[0].record.t < latest - KEPT_S || this.size > RECORDS_MOST) {
      this.#entries = this.#entries.filter(({ record }) => record.t >= latest - KEPT_S).slice(-RECORDS_MOST);
    }
    append(this.#file, records.map((record) => `${JSON.stringify(record)}\n`).join(''));
    this.#lines += records.length;
  }

  /** The newest of each point that is not under way. */
  newest() {
    const byPoint = new Map(this.#entries.map((entry) => [entry.record.n, entry]));
    return [...byPoint.values()].filter(({ seq }) => seq === null).slice(0, PACK_MOST);
  }

  /** The oldest that are not under way. */
  oldest() {
    const found = [];
    for (const entry of this.#entries) {
      if (found.length === PACK_MOST) break;
      if (entry.seq === null) found.push(entry);
    }
    return found;
  }

  acknowledged(seq) {
    this.#entries = this.#entries.filter((entry) => entry.seq !== seq);
    // acknowledged lines may stay in the file for a while: after a power cut they are only sent once more
    if (this.size === 0 || this.#lines > 2 * this.size + 5000) this.#compact();
  }

  /** No answer came to this pack, or (without a seq) the line is down: they wait again. */
  unanswered(seq) {
    for (const entry of this.#entries) if (seq === undefined || entry.seq === seq) entry.seq = null;
  }

  #compact() {
    replace(this.#file, this.#entries.map(({ record }) => `${JSON.stringify(record)}\n`).join(''));
    this.#lines = this.size;
  }
}

/** Small things in one file: the fallback, the rate it is counted in, and log lines that nobody acknowledged. */
export class Kept {
  #file;
  #kept;
  #logs;

  constructor(folder) {
    mkdirSync(folder, { recursive: true });
    this.#file = path.join(folder, 'kept.json');
    const [kept = {}] = parsed(textOf(this.#file));
    this.#kept = { rate: 1, fallback: { settings: {}, spent: [] }, ...kept };
    this.#logs = (kept.logs ?? []).map((log) => ({ log, seq: null }));
  }

  get rate() {
    return this.#kept.rate;
  }

  get fallback() {
    return this.#kept.fallback;
  }

  keep(part) {
    this.#kept = { ...this.#kept, ...part };
    this.#write();
  }

  addLog(log) {
    this.#logs = [...this.#logs, { log, seq: null }].slice(-LOGS_MOST);
    this.#write();
  }

  /** Log lines that are not under way, the oldest first, and few at once: readings must not wait behind them. */
  waitingLogs() {
    const underWay = this.#logs.filter(({ seq }) => seq !== null).length;
    return this.#logs.filter(({ seq }) => seq === null).slice(0, Math.max(0, 20 - underWay));
  }

  logAcknowledged(seq) {
    const left = this.#logs.filter((entry) => entry.seq !== seq);
    if (left.length === this.#logs.length) return;
    this.#logs = left;
    this.#write();
  }

  lineDown() {
    for (const entry of this.#logs) entry.seq = null;
  }

  #write() {
    replace(this.#file, JSON.stringify({ ...this.#kept, logs: this.#logs.map(({ log }) => log) }));
  }
}

function textOf(file) {
  try {
    return readFileSync(file, 'utf8');
  } catch {
    return '';
  }
}

/** A line that a power cut tore is passed over. */
function parsed(text) {
  try {
    return [JSON.parse(text)];
  } catch {
    return [];
  }
}

function append(file, text) {
  write(file, 'a', text);
}

/** Written beside and moved into place: a power cut in the middle leaves the former one. */
function replace(file, text) {
  const beside = `${file}.new`;
  if (write(beside, 'w', text)) renameSync(beside, file);
}

/** A full disk must not stop the relays: what cannot be written is kept in memory, and said. */
function write(file, how, text) {
  let open;
  try {
    open = openSync(file, how);
    writeFileSync(open, text);
    fsyncSync(open);
    return true;
  } catch (error) {
    console.error(`${file} cannot be written: ${error.message}`);
    return false;
  } finally {
    if (open !== undefined) closeSync(open);
  }
}
