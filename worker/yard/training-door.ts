/**
 * Where faults for training are switched on and off: HTTP on loopback, for whoever runs this yard. A node is named by the
 * hash of its token, so that nobody takes a real node of the same key for one of the yard's.
 */
import { createHash } from 'node:crypto';
import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import { z } from 'zod';
import { faultKinds, type FaultKind } from './faults';

const bodyBytesMost = 4096;

const orderForm = z.strictObject({
  tokenHash: z.string().length(64),
  fault: z.enum(faultKinds),
  on: z.boolean(),
  point: z.string().nullable().default(null),
  other: z.string().nullable().default(null),
  relay: z.number().int().positive().nullable().default(null),
  /** app time */
  seconds: z.number().positive().default(600),
});
export type FaultOrder = z.infer<typeof orderForm>;

export interface TrainedNode {
  tokenHash: string;
  points: string[];
  relays: number;
  /** `leftS`: seconds of app time until it ends by itself. */
  faults: {
    fault: FaultKind;
    point: string | null;
    other: string | null;
    relay: number | null;
    leftS: number;
  }[];
}

export interface Trainer {
  nodes(): TrainedNode[];
  /** @returns why it cannot be done, or null once it is */
  order(order: FaultOrder): string | null;
}

export const hashOf = (token: string): string => createHash('sha256').update(token).digest('hex');

export function openTrainingDoor(port: number, trainer: Trainer): Server {
  const server = createServer((request, response) => {
    answer(request, response, trainer).catch(() => say(response, 500, { why: 'this failed' }));
  });
  server.listen(port, '127.0.0.1');
  return server;
}

async function answer(request: IncomingMessage, response: ServerResponse, trainer: Trainer): Promise<void> {
  // a page of another site must not reach it through a browser of this machine: JSON asks such a page's browser first
  const isJson = request.headers['content-type'] === 'application/json';
  if (request.url !== '/faults') return say(response, 404, { why: 'there is only /faults' });
  if (request.method === 'GET') return say(response, 200, { nodes: trainer.nodes() });
  if (request.method !== 'POST' || !isJson) return say(response, 405, { why: 'POST JSON' });
  const text = await bodyOf(request);
  const parsed = orderForm.safeParse(text === null ? null : fromJson(text));
  if (!parsed.success) return say(response, 422, { why: parsed.error.issues[0]?.message ?? 'not an order' });
  const why = trainer.order(parsed.data);
  return why === null ? say(response, 200, { nodes: trainer.nodes() }) : say(response, 422, { why });
}

async function bodyOf(request: IncomingMessage): Promise<string | null> {
  let text = '';
  for await (const chunk of request) {
    text += String(chunk);
    if (text.length > bodyBytesMost) return null;
  }
  return text;
}

function fromJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return null;
  }
}

function say(response: ServerResponse, status: number, body: object): void {
  if (response.headersSent) return;
  response.writeHead(status, { 'content-type': 'application/json' });
  response.end(JSON.stringify(body));
}
