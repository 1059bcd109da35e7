// Resident MiB of each process with the demo holding, after a minute in which nobody looked; as Linux counts them.
import { readFileSync } from 'node:fs';
import { setTimeout as pause } from 'node:timers/promises';
import { round3, withApp } from './support';

const IDLE_MS = 60_000;

export function bench() {
  return withApp({ yard: true, seed: { nights: 3 } }, async (app) => {
    await pause(IDLE_MS);
    return {
      residentMiB: {
        door: residentMiB(app.doorPid),
        web: residentMiB(app.pid('web')),
        worker: residentMiB(app.pid('worker')),
        yard: residentMiB(app.pid('yard')),
      },
      afterS: IDLE_MS / 1000,
    };
  });
}

function residentMiB(pid: number | null): number | null {
  if (pid === null) return null;
  const kiB = /^VmRSS:\s+(\d+) kB$/m.exec(readFileSync(`/proc/${pid}/status`, 'utf8'))?.[1];
  return kiB === undefined ? null : round3(Number(kiB) / 1024);
}
