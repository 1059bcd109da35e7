/** POST /field/v1/readings, for nodes that only measure. */
import type { IncomingMessage, ServerResponse } from 'node:http';
import type { NodeWiring } from '@/db/queries/plan';
import { frameBytesMax, senmlMediaType } from '@/lib/field/frames';
import type { Base } from '../base';
import { pause } from '../clock';
import type { House } from '../control/house';
import type { Ingest } from './ingest';
import { takePack } from './intake';
import { answerProblem } from './problem';

/** A node that only measures waits no longer than this for the disk; it keeps the pack and sends it again. */
const DURABLE_LIMIT_MS = 8000;

export async function takePosted(
  deps: Base & { ingest: Ingest },
  request: IncomingMessage,
  response: ServerResponse,
  admitted: { house: House; node: NodeWiring } | null | 'away',
): Promise<void> {
  const problem = (status: number, detail: string, headers: Record<string, string> = {}) => {
    // What was not read would be taken for the next request.
    request.resume();
    answerProblem(response, status, detail, headers);
  };
  if (request.method !== 'POST') return problem(405, 'Readings are posted.', { allow: 'POST' });
  if (admitted === null) {
    return problem(401, 'This token opens nothing here.', { 'www-authenticate': 'Bearer' });
  }
  if (admitted === 'away') return problem(503, 'Not ready for nodes yet; try again.', { 'retry-after': '2' });
  const type = (request.headers['content-type'] ?? '').split(';')[0]?.trim().toLowerCase();
  if (type !== senmlMediaType && type !== 'application/json') {
    return problem(415, `Send ${senmlMediaType}.`, { accept: senmlMediaType });
  }
  const text = await readBody(request, frameBytesMax);
  if (text === null) {
    return problem(413, `A pack is at most ${frameBytesMax / 1024} KiB.`, { connection: 'close' });
  }
  const pack = parsePack(text);
  if (pack === null) return problem(400, 'A SenML pack is a JSON list of records.');
  try {
    const stored = takePack(deps, deps.ingest, admitted.house, admitted.node, pack);
    const taken = await Promise.race([stored, pause(deps.clock, DURABLE_LIMIT_MS).then(() => null)]);
    if (taken === null) {
      stored.catch(() => undefined);
      return problem(503, 'The readings could not be stored in time; keep them and send them again.', {
        'retry-after': '10',
      });
    }
    response.writeHead(200, { 'content-type': 'application/json' });
    response.end(JSON.stringify(taken));
  } catch (error) {
    deps.log.warn({ err: error, node: admitted.node.key }, 'a posted pack could not be stored');
    problem(503, 'The readings could not be stored; keep them and send them again.', { 'retry-after': '10' });
  }
}

/** @returns null where it is longer than `bytesMax` */
async function readBody(request: IncomingMessage, bytesMax: number): Promise<string | null> {
  const chunks: Buffer[] = [];
  let bytes = 0;
  for await (const chunk of request) {
    const part = Buffer.from(chunk as Uint8Array); // a request without an encoding yields bytes
    bytes += part.length;
    if (bytes > bytesMax) return null;
    chunks.push(part);
  }
  return Buffer.concat(chunks).toString('utf8');
}

function parsePack(text: string): unknown[] | null {
  try {
    const parsed: unknown = JSON.parse(text);
    return Array.isArray(parsed) ? parsed : null;
  } catch {
    return null;
  }
}
