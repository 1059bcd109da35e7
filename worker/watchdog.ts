/**
 * Ends the process when its event loop has been blocked for 10 s: then no lease is renewed, and the restart that follows
 * drives again sooner than a loop that may never return.
 */
import { Worker } from 'node:worker_threads';
import type { Cancel, Clock } from './clock';

const TICK_MS = 500;
const TICKS_MAX = 20;

// The thread counts its own ticks, not the time: a process that was stopped as a whole (SIGSTOP) has not been blocked.
const WATCH = `
const { workerData } = require('node:worker_threads');
const beats = new Int32Array(workerData.beats);
const never = new Int32Array(new SharedArrayBuffer(4));
for (let last = -1, still = 0; ; ) {
  Atomics.wait(never, 0, 0, ${TICK_MS});
  const now = Atomics.load(beats, 0);
  still = now === last ? still + 1 : 0;
  last = now;
  if (still >= ${TICKS_MAX}) {
    require('node:fs').writeSync(2, 'The worker was blocked for 10 s; it is ended, and its supervisor starts it again.\\n');
    process.kill(process.pid, 'SIGKILL');
  }
}`;

export function startWatchdog(clock: Clock): Cancel {
  const beats = new Int32Array(new SharedArrayBuffer(4));
  const thread = new Worker(WATCH, { eval: true, workerData: { beats: beats.buffer }, execArgv: [] });
  thread.unref();
  const cancel = clock.every(TICK_MS, () => {
    Atomics.add(beats, 0, 1);
  });
  return () => {
    cancel();
    void thread.terminate();
  };
}
