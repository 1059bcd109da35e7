// One connection of the node under test: every frame with when it came, and what the server says to it.
import { performance } from 'node:perf_hooks';
import { wrongWith } from './frames.mjs';

const PING_EVERY_MS = 10_000;

export class Connection {
  /** `{ at, frame }`, at: monotonic ms of receipt. */
  frames = [];
  /** What broke the form of a frame, in words. */
  wrong = [];
  closed = null;
  /** App time of its welcome, Unix seconds. */
  welcomedAt = null;
  pongs = 0;
  /** Whether packs and logs are acknowledged. */
  isAcking = true;
  /** Acknowledged records as `name time`, with when. */
  acked = new Map();
  /** The order that every `relays` frame is answered with; null: none is. */
  order = null;
  /** A silent server: it neither pings nor answers a ping. */
  isSilent = false;

  constructor(socket, { token, clock }) {
    Object.assign(this, { socket, token, clock, openedAt: performance.now() });
    socket.on('message', (data, isBinary) => this.#take(data, isBinary));
    socket.on('ping', (data) => this.isSilent || socket.pong(data));
    socket.on('pong', () => (this.pongs += 1));
    socket.on('error', () => undefined);
    socket.on('close', (code) => {
      this.closed = { at: performance.now(), code };
      clearInterval(this.pings);
    });
    this.pings = setInterval(() => this.isSilent || this.ping(), PING_EVERY_MS);
  }

  get hello() {
    return this.of('hello')[0]?.frame;
  }

  /** Frames of a type, the oldest first. */
  of(type) {
    return this.frames.filter(({ frame }) => frame.type === type);
  }

  get lastRelays() {
    return this.of('relays').at(-1);
  }

  send(frame) {
    if (this.closed === null) this.socket.send(typeof frame === 'string' ? frame : JSON.stringify(frame));
  }

  ping() {
    if (this.closed === null) this.socket.ping();
  }

  /** A command by what the node has told on this connection; `over` puts other things in their place. */
  command(order, over = {}) {
    const { number, channels, fallback } = order;
    this.send({
      ...{ type: 'command', number, lease: 30, boot: this.hello?.boot ?? '', channels },
      ...{ seen: this.lastRelays?.frame.seq ?? 0, ...(fallback && { fallback }), ...over },
    });
  }

  cut() {
    this.socket.terminate();
  }

  #take(data, isBinary) {
    const at = performance.now();
    const frame = isBinary ? undefined : parsed(data.toString('utf8'));
    const wrong = frame === undefined ? 'a message that is not a JSON object in text' : wrongWith(frame);
    if (wrong !== null) this.wrong.push(wrong);
    if (frame === undefined) return;
    this.frames.push({ at, frame });
    if (frame.type === 'relays' && this.order !== null) this.command(this.order);
    if (frame.type === 'log' && this.isAcking) this.send({ type: 'ack', seq: frame.seq });
    if (frame.type === 'readings' && this.isAcking) this.#acknowledge(frame, at);
  }

  #acknowledge({ seq, pack }, at) {
    const records = Array.isArray(pack) ? pack : [];
    this.send({ type: 'ack', seq, stored: records.length, duplicate: 0, refused: [] });
    for (const { n, t } of resolved(records, this.clock())) this.acked.set(`${n} ${t}`, at);
  }
}

/** Base fields added, times absolute (RFC 8428, 4.6; relative under 2^28, 4.5.3). */
export function resolved(pack, nowS) {
  let base = {};
  return pack.flatMap((record) => {
    if (typeof record !== 'object' || record === null) return [];
    base = {
      ...base,
      ...Object.fromEntries(Object.entries(record).filter(([name]) => name.startsWith('b'))),
    };
    const time = (base.bt ?? 0) + (record.t ?? 0);
    const hasValue = ['v', 'vb', 'vs'].some((name) => name in record);
    if (!hasValue) return [];
    return [
      {
        ...{ n: (base.bn ?? '') + (record.n ?? ''), u: record.u ?? base.bu },
        ...{ t: time < 2 ** 28 ? nowS + time : time, isRelative: time < 2 ** 28 },
        v: typeof record.v === 'number' ? (base.bv ?? 0) + record.v : (record.vb ?? record.vs),
      },
    ];
  });
}

function parsed(text) {
  try {
    const frame = JSON.parse(text);
    return typeof frame === 'object' && frame !== null && !Array.isArray(frame) ? frame : undefined;
  } catch {
    return undefined;
  }
}
