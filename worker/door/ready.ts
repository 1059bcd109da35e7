import http from 'node:http';
import { pause, type Clock } from './clock';

const LOOK_EVERY_MS = 200;
const PATIENCE_MS = 60_000;

/** What /api/v1/health said, as far as the door needs it. */
export type Answer = { status: number; body: unknown } | null;

/**
 * Waits until health, asked through the door, answers 200. After a minute it says what is missing, once, and goes on waiting:
 * a slow machine gets there, and a person has been told where to look.
 */
export async function waitUntilReady(
  ask: () => Promise<Answer>,
  clock: Clock,
  say: (line: string) => void,
  isStopping: () => boolean,
): Promise<boolean> {
  const startedMs = clock.monotonicMs();
  let told = false;
  while (!isStopping()) {
    const answer = await ask();
    if (answer?.status === 200) return true;
    if (!told && clock.monotonicMs() - startedMs > PATIENCE_MS) {
      told = true;
      say(`Not ready after ${PATIENCE_MS / 1000} s: ${missing(answer)}. Still waiting.`);
    }
    await pause(clock, LOOK_EVERY_MS);
  }
  return false;
}

/** The parts that health calls not up, by name. */
export function missing(answer: Answer): string {
  if (answer === null || typeof answer.body !== 'object' || answer.body === null)
    return 'web does not answer';
  const down = Object.entries(answer.body)
    .filter(([name, value]) => PARTS.has(name) && value !== true && value !== 'up' && value !== 'ok')
    .map(([name]) => name);
  return down.length === 0 ? `health answers ${answer.status}` : `not up: ${down.join(', ')}`;
}

const PARTS = new Set(['web', 'database', 'worker', 'field', 'spool']);

export function askThroughDoor(host: string, port: number): Promise<Answer> {
  return new Promise((resolve) => {
    const request = http.get(
      { host, port, path: '/api/v1/health', agent: false, signal: AbortSignal.timeout(5_000) },
      (response) => {
        const chunks: Buffer[] = [];
        response.on('data', (chunk: Buffer) => chunks.push(chunk));
        response.on('error', () => resolve(null));
        response.on('end', () => {
          resolve({ status: response.statusCode ?? 0, body: parse(Buffer.concat(chunks).toString('utf8')) });
        });
      },
    );
    request.on('error', () => resolve(null));
  });
}

function parse(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return null;
  }
}
