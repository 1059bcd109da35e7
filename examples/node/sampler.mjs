// When readings are taken: at whole multiples of the interval, so that stamps are even. A stamp is given once and never goes back.

/** A day of samples each 30 s that wait for a node to be told the time. */
const UNSTAMPED_MOST = 2880;

export class Sampler {
  #everyS = 30;
  #lastS = 0;
  #timer;
  #isTaking = false;
  /** Readings of a node that does not know the time yet, with the moment of its monotonic clock. */
  #unstamped = [];

  /** @param points `{ key, unit }` @param taken called with SenML records */
  constructor(points, hardware, time, taken) {
    Object.assign(this, { points, hardware, time, taken });
  }

  start() {
    this.#wait();
  }

  stop() {
    clearTimeout(this.#timer);
  }

  /** A welcome gives the interval, s of app time; and the time, to a node that has none. */
  every(seconds) {
    this.#everyS = seconds;
    this.#stampWaiting();
    if (this.#lastS === 0) void this.#take(this.time.nowMs());
    else this.#wait();
  }

  #wait() {
    const nowMs = this.time.nowMs();
    const everyMs = this.#everyS * 1000;
    const dueMs = nowMs === null ? null : (Math.floor(nowMs / everyMs) + 1) * everyMs;
    const waitS = dueMs === null ? this.#everyS : (dueMs - nowMs) / 1000;
    clearTimeout(this.#timer);
    this.#timer = setTimeout(() => void this.#take(dueMs), this.time.realMs(waitS));
  }

  async #take(dueMs) {
    if (this.#isTaking) return;
    this.#isTaking = true;
    const monotonicMs = performance.now();
    const t = dueMs === null ? null : Math.floor(dueMs / 1000);
    const records = [];
    // one after the other: the probes of a one-wire bus answer one at a time anyhow, some 0.75 s each
    for (const { key, unit } of this.points) {
      const value = await this.hardware.read(key);
      if (value !== null) records.push({ n: key, u: unit, v: value });
    }
    if (t === null) this.#unstamped = [...this.#unstamped, { records, monotonicMs }].slice(-UNSTAMPED_MOST);
    else this.#give(t, records);
    this.#isTaking = false;
    this.#wait();
  }

  #give(t, records) {
    if (t <= this.#lastS) return; // the clock was set back: these would overwrite what was sent
    this.#lastS = t;
    this.taken(records.map((record) => ({ ...record, t })));
  }

  #stampWaiting() {
    for (const { records, monotonicMs } of this.#unstamped.splice(0)) {
      this.#give(Math.floor(this.time.atMs(monotonicMs) / 1000), records);
    }
  }
}
