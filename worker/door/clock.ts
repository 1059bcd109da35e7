/** The door's only clock and timers; durations are monotonic. */
export interface Clock {
  /** Monotonic milliseconds. */
  monotonicMs: () => number;
  /** Runs `work` once after `ms`; the answer calls it off. */
  after: (ms: number, work: () => void) => () => void;
}

export const systemClock: Clock = {
  monotonicMs: () => performance.now(),
  after: (ms, work) => {
    const timer = setTimeout(work, ms);
    return () => clearTimeout(timer);
  },
};

export function pause(clock: Clock, ms: number): Promise<void> {
  return new Promise((resolve) => {
    clock.after(ms, resolve);
  });
}
