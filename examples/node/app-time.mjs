// The time that readings are stamped with. A lease never looks at it: it may be set, and jump.

/** A clock of our own that is further off than this is not believed. */
const OFF_MOST_MS = 2000;

export class AppTime {
  rate = 1;
  #anchor = null;

  /** @param hasClock whether the machine knows the time by itself, and keeps it over a power cut */
  constructor(hasClock) {
    this.hasClock = hasClock;
  }

  /** Epoch ms; null while a node without a clock has not been told. */
  nowMs() {
    return this.atMs(performance.now());
  }

  /** The same at a moment of the monotonic clock. */
  atMs(monotonicMs) {
    if (this.#anchor !== null)
      return this.#anchor.appMs + (monotonicMs - this.#anchor.monotonicMs) * this.rate;
    return this.hasClock ? Date.now() - (performance.now() - monotonicMs) : null;
  }

  /** A welcome says the time. Our own clock, where it is right, is kept by the machine; else we keep this one. */
  welcome(appMs, rate) {
    this.rate = rate;
    const isRight = this.hasClock && rate === 1 && Math.abs(Date.now() - appMs) <= OFF_MOST_MS;
    this.#anchor = isRight ? null : { appMs, monotonicMs: performance.now() };
  }

  /** Real ms in which these seconds of app time pass. */
  realMs(seconds) {
    return (seconds * 1000) / this.rate;
  }
}
