import type { z } from 'zod';
import { Refusal } from '@/db/queries/refusal';
import { bodyErrors, type BodyError } from './body-errors';
import { log } from './log';

/** Everything that can go wrong for an asker: a closed list, so that a screen can say what to do about each. */
const PROBLEMS = {
  'not-signed-in': [401, 'Not signed in', 'Sign in, or send the key of a program as x-api-key.'],
  'not-allowed': [403, 'Not allowed', 'Your role may not do this; an owner of the holding can.'],
  'wrong-origin': [403, 'Wrong origin', 'This request came from another site and was not carried out.'],
  'not-found': [404, 'Not found', 'There is no such thing here.'],
  conflict: [409, 'Conflict', 'The present state does not allow this.'],
  'changed-meanwhile': [412, 'Changed meanwhile', 'Somebody changed this since you read it; read it again.'],
  'too-large': [413, 'Too large', 'The body is over 1 MiB.'],
  'not-valid': [422, 'Not valid', 'Some fields need another look.'],
  'too-many': [429, 'Too many tries', 'Wait a little, then try again.'],
  internal: [
    500,
    'Something failed here',
    'It was written down; try again, and tell who runs this if it stays.',
  ],
  'not-available': [503, 'Not available now', 'The database does not answer; try again in a moment.'],
} as const satisfies Record<string, readonly [number, string, string]>;
export type ProblemCode = keyof typeof PROBLEMS;

export class Problem extends Error {
  override readonly name = 'Problem';
  constructor(
    readonly code: ProblemCode,
    readonly more: { detail?: string; errors?: BodyError[]; headers?: Record<string, string> } = {},
  ) {
    super(more.detail ?? PROBLEMS[code][2]);
  }

  get status(): number {
    return PROBLEMS[this.code][0];
  }
}

/** A body or query that its schema refused. */
export function notValid(error: z.ZodError): Problem {
  return new Problem('not-valid', { errors: bodyErrors(error) });
}

/** RFC 9457. The cause of what failed here is logged, never sent. */
export function problemResponse(error: unknown): Response {
  const problem = toProblem(error);
  const [status, title, detail] = PROBLEMS[problem.code];
  const { errors } = problem.more;
  return Response.json(
    {
      type: 'about:blank',
      title,
      status,
      code: problem.code,
      detail: problem.more.detail ?? detail,
      ...(errors === undefined ? {} : { errors }),
    },
    {
      status,
      headers: {
        ...problem.more.headers,
        'content-type': 'application/problem+json',
        'cache-control': 'no-store',
      },
    },
  );
}

function toProblem(error: unknown): Problem {
  if (error instanceof Problem) return error;
  if (error instanceof Refusal) {
    return error.path === null
      ? new Problem('conflict', { detail: error.message })
      : new Problem('not-valid', { errors: [{ path: error.path, message: error.message }] });
  }
  const codes = codesOf(error);
  if (codes.some((code) => UNIQUE.has(code))) {
    return new Problem('conflict', { detail: 'Something with this name, number or relay is already there.' });
  }
  log().error({ err: error }, 'a request failed');
  if (codes.some((code) => AWAY.has(code)))
    return new Problem('not-available', { headers: { 'retry-after': '5' } });
  return new Problem('internal');
}

const UNIQUE = new Set(['23505']);
const AWAY = new Set([
  'ECONNREFUSED',
  'ECONNRESET',
  'ENOENT',
  'ETIMEDOUT',
  '57P01',
  '57P02',
  '57P03',
  '08006',
  '08001',
  'AWAY',
]);

/** The codes of an error and of what caused it: the query layer wraps the driver's errors. */
function codesOf(error: unknown): string[] {
  const codes: string[] = [];
  for (let at = error; at instanceof Error; at = at.cause) {
    if ('code' in at && typeof at.code === 'string') codes.push(at.code);
    // the driver's own time-outs carry no code
    if (/timeout|Connection terminated/i.test(at.message)) codes.push('AWAY');
  }
  return codes;
}
