// The line to the server: one WebSocket, dialled again for as long as the node runs. All times here are real time.
import WebSocket from 'ws';

const FRAME_BYTES_MOST = 64 * 1024;
const PING_EVERY_MS = 10_000;
const SILENCE_MS = 25_000;
const TAKEN_OVER = 4001;
const TAKEN_OVER_WAIT_MS = 60_000;
const BACK_OFF_LEAST_MS = 1000;
const BACK_OFF_MOST_MS = 30_000;

export class Line {
  #socket;
  #attempts = 0;
  #stopped = false;
  #dialTimer;

  /** @param events `opened()`, `frame(object)`, `closed(code, why, againInMs)` */
  constructor(server, token, events) {
    Object.assign(this, { url: new URL('/field/v1', server), token, events });
  }

  dial() {
    if (this.#stopped) return;
    const headers = { authorization: `Bearer ${this.token}` };
    const socket = new WebSocket(this.url, {
      ...{ headers, maxPayload: FRAME_BYTES_MOST, handshakeTimeout: 10_000, perMessageDeflate: false },
    });
    this.#socket = socket;
    let heardMs = performance.now();
    let trouble = '';
    const heard = () => (heardMs = performance.now());
    // a line that is cut in the middle of the net tells nobody: it is only silent
    const watch = setInterval(() => {
      if (performance.now() - heardMs > SILENCE_MS) socket.terminate();
    }, 1000);
    const ping = setInterval(() => socket.readyState === WebSocket.OPEN && socket.ping(), PING_EVERY_MS);
    socket.on('open', () => {
      heard();
      this.events.opened();
    });
    socket.on('message', (data, isBinary) => {
      heard();
      const frame = isBinary ? undefined : fromJson(data.toString('utf8'));
      if (frame !== undefined) this.events.frame(frame);
    });
    socket.on('ping', heard); // ws answers it with a pong by itself
    socket.on('pong', heard);
    socket.on('error', (error) => (trouble = error.message));
    socket.on('close', (code, reason) => {
      clearInterval(watch);
      clearInterval(ping);
      this.#socket = undefined;
      const againInMs = code === TAKEN_OVER ? TAKEN_OVER_WAIT_MS : this.#backOffMs();
      if (!this.#stopped) this.#dialTimer = setTimeout(() => this.dial(), againInMs);
      this.events.closed(code, trouble || String(reason), againInMs);
    });
  }

  /** The server has welcomed us: the next failure is a first one again. */
  welcomed() {
    this.#attempts = 0;
  }

  /** @returns whether the line was open */
  send(frame) {
    if (this.#socket?.readyState !== WebSocket.OPEN) return false;
    this.#socket.send(JSON.stringify(frame));
    return true;
  }

  stop() {
    this.#stopped = true;
    clearTimeout(this.#dialTimer);
    this.#socket?.close(1000);
  }

  /** 1 to 30 s, by chance under a bound that doubles: a thousand nodes must not come back at once. */
  #backOffMs() {
    const bound = Math.min(BACK_OFF_MOST_MS, 2 * BACK_OFF_LEAST_MS * 2 ** this.#attempts);
    this.#attempts += 1;
    return BACK_OFF_LEAST_MS + Math.random() * (bound - BACK_OFF_LEAST_MS);
  }
}

function fromJson(text) {
  try {
    const frame = JSON.parse(text);
    return typeof frame === 'object' && frame !== null ? frame : undefined;
  } catch {
    return undefined;
  }
}
