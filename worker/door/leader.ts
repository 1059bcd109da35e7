import http from 'node:http';
import type { Clock } from './clock';

const LOOK_EVERY_MS = 500;
const ANSWER_LIMIT_MS = 1_000;

export interface Health {
  leader: boolean;
  epoch: number;
}

/** Answers null when the worker does not answer, or not with its health. */
export type AskHealth = (port: number) => Promise<Health | null>;

/**
 * Knows which worker leads. A newer epoch wins; while none says that it leads, the last one stays, because a leader that is
 * cut off from the database goes on driving its relays until another leads.
 */
export class LeaderWatch {
  private leading: { port: number; epoch: number } | null = null;
  private stopped = false;

  constructor(
    private readonly ports: number[],
    private readonly clock: Clock,
    private readonly ask: AskHealth,
    private readonly onNewLeader: (port: number, epoch: number) => void,
  ) {}

  /** Port of the leading worker, or null while none has led yet. */
  get port(): number | null {
    return this.leading?.port ?? null;
  }

  start(): void {
    void this.look().finally(() => {
      if (!this.stopped) this.clock.after(LOOK_EVERY_MS, () => this.start());
    });
  }

  stop(): void {
    this.stopped = true;
  }

  async look(): Promise<void> {
    const answers = await Promise.all(
      this.ports.map(async (port) => ({ port, health: await this.ask(port) })),
    );
    for (const { port, health } of answers) {
      if (health === null || !health.leader) continue;
      if (this.leading !== null && health.epoch <= this.leading.epoch) continue;
      this.leading = { port, epoch: health.epoch };
      this.onNewLeader(port, health.epoch);
    }
  }
}

export const askHealth: AskHealth = (port) =>
  new Promise((resolve) => {
    const request = http.get(
      {
        host: '127.0.0.1',
        port,
        path: '/health',
        agent: false,
        signal: AbortSignal.timeout(ANSWER_LIMIT_MS),
      },
      (response) => {
        const chunks: Buffer[] = [];
        response.on('data', (chunk: Buffer) => chunks.push(chunk));
        response.on('error', () => resolve(null));
        response.on('end', () => resolve(parseHealth(Buffer.concat(chunks).toString('utf8'))));
      },
    );
    request.on('error', () => resolve(null));
  });

export function parseHealth(text: string): Health | null {
  let body: unknown;
  try {
    body = JSON.parse(text);
  } catch {
    return null;
  }
  if (typeof body !== 'object' || body === null || !('leader' in body) || !('epoch' in body)) return null;
  if (typeof body.leader !== 'boolean') return null;
  // a worker that has never led has no epoch yet
  return { leader: body.leader, epoch: typeof body.epoch === 'number' ? body.epoch : -1 };
}
