// The worker as it runs in earnest: a process of its own, from the bundle.
import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import path from 'node:path';
import { build } from '../../scripts/build.mjs';
import { BUILD, ROOT } from '../../scripts/places.mjs';
import { severalFree } from '../../scripts/ports.mjs';
import { until } from './until';

export interface WorkerHealth {
  leader: boolean;
  epoch: number | null;
  database: boolean;
  /** Seconds since it last renewed its lead. */
  heartbeat: number | null;
}

export class WorkerProcess {
  output = '';

  private constructor(
    private readonly child: ChildProcess,
    readonly url: string,
  ) {
    for (const stream of [child.stdout, child.stderr]) {
      stream?.on('data', (chunk: Buffer) => {
        this.output += chunk.toString();
      });
    }
  }

  /** @param more environment over that of the test file, which names its database and data folder */
  static async start(more: Record<string, string> = {}): Promise<WorkerProcess> {
    await build(['worker']);
    const [port = 0, mailPort = 0] = await severalFree(2);
    const env = {
      ...process.env,
      WORKER_PORT: String(port),
      MAIL_PORT: String(mailPort),
      LOG_LEVEL: 'info',
      ...more,
    };
    const child = spawn(process.execPath, [path.join(BUILD, 'worker.mjs')], { cwd: ROOT, env });
    return new WorkerProcess(child, `http://127.0.0.1:${port}`);
  }

  async untilItLeads(): Promise<void> {
    await until(
      'the worker leads',
      async () => {
        if (this.exitCode !== null) throw new Error(`The worker ended.\n${this.output.slice(-2000)}`);
        return (await this.health())?.leader === true;
      },
      15_000,
    );
  }

  get pid(): number {
    return this.child.pid ?? 0;
  }

  get exitCode(): number | null {
    return this.child.exitCode;
  }

  async health(): Promise<WorkerHealth | null> {
    return fetch(`${this.url}/health`).then(
      (response) => response.json() as Promise<WorkerHealth>,
      () => null,
    );
  }

  signal(signal: NodeJS.Signals): void {
    this.child.kill(signal);
  }

  async end(signal: NodeJS.Signals): Promise<void> {
    if (this.child.exitCode !== null || this.child.signalCode !== null) return;
    const gone = once(this.child, 'exit');
    this.child.kill(signal);
    await gone;
  }
}
