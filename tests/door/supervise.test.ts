import { afterEach, expect, it } from 'vitest';
import { systemClock, type Clock } from '@/worker/door/clock';
import { Supervisor } from '@/worker/door/supervise';
import { until } from '../support/until';

let part: Supervisor | undefined;
afterEach(() => part?.stop(0));

/** A clock on which pauses end at once, and which keeps how long they were to be. */
function impatient(): { clock: Clock; pauses: number[] } {
  const pauses: number[] = [];
  return {
    pauses,
    clock: {
      monotonicMs: () => 0,
      after: (ms, work) => {
        pauses.push(ms);
        return systemClock.after(0, work);
      },
    },
  };
}

function supervise(script: string, clock: Clock) {
  const lines: string[] = [];
  part = new Supervisor({
    name: 'worker',
    command: [process.execPath, '-e', script],
    clock,
    log: null,
    say: (line) => lines.push(line),
  });
  part.start();
  return { part, lines };
}

it('waits longer after each death, thirty seconds at most', async () => {
  const { clock, pauses } = impatient();
  supervise('process.exit(3)', clock);
  await until('seven deaths', () => pauses.length >= 7, 20_000);
  expect(pauses.slice(0, 7)).toEqual([1000, 2000, 4000, 8000, 16_000, 30_000, 30_000]);
});

it('says in one line what ended, how, and when it starts again', async () => {
  const { lines } = supervise('process.exit(3)', systemClock);
  await until('a line', () => lines.length > 0);
  expect(lines[0]).toBe('worker ended (exit code 3); starting it again in 1 s');
});

it('starts again what was killed', async () => {
  const { clock } = impatient();
  const supervised = supervise('setInterval(() => {}, 1000)', clock);
  const first = supervised.part.pid ?? 0;
  process.kill(first, 'SIGKILL');
  await until('another process', () => supervised.part.pid !== null && supervised.part.pid !== first);
  expect(supervised.lines[0]).toContain('SIGKILL');
});

it('kills a part that does not end when asked', async () => {
  const lines: string[] = [];
  let written = '';
  part = new Supervisor({
    name: 'worker',
    command: [
      process.execPath,
      '-e',
      "process.on('SIGTERM', () => {}); setInterval(() => {}, 1000); console.log('deaf')",
    ],
    clock: systemClock,
    log: {
      path: '',
      write: (chunk) => {
        written += chunk.toString();
      },
    },
    say: (line) => lines.push(line),
  });
  part.start();
  await until('it no longer hears TERM', () => written.includes('deaf'));
  const pid = part.pid ?? 0;
  await part.stop(100);
  expect(() => process.kill(pid, 0)).toThrow();
  expect(lines).toEqual(['worker does not end; it is killed']);
});

it('says so when a command cannot be started at all', async () => {
  const lines: string[] = [];
  part = new Supervisor({
    name: 'yard',
    command: ['/nowhere/yard'],
    clock: systemClock,
    log: null,
    say: (line) => lines.push(line),
  });
  part.start();
  await until('a line', () => lines.length > 0);
  expect(lines[0]).toContain('yard ended');
});
