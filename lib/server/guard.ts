import 'server-only';
import { createHash } from 'node:crypto';
import type { z } from 'zod';
import { inHolding, type Holding } from '@/db/client';
import { addAudit } from '@/db/queries/audit';
import { keepAnswer, takeKey, type Asked } from '@/db/queries/idempotency';
import { lockHolding } from '@/db/queries/lock';
import { appNow } from './app-clock';
import { identify, type Caller } from './caller';
import { check } from './check';
import { Problem, problemResponse } from './errors';
import { paramsOf, type Operation, type ParamsOf } from './operation';
import { may } from './permissions';
import { LARGEST_BODY, parseJson, readBytes } from './request-body';
import { seal, unseal } from './seal';
import { streamed } from './streamed';
import { FIND, isThingName, type Things } from './things';

/** What a handler is given: everything looked up, checked and parsed. */
export interface Asking<T extends Operation> {
  holding: Holding;
  caller: Caller;
  things: Pick<Things, ParamsOf<T['path']> & keyof Things>;
  body: T['body'] extends z.ZodType ? z.output<T['body']> : undefined;
  query: T['query'] extends z.ZodObject ? z.output<T['query']> : undefined;
  /** As they came, for a route that takes bytes; empty for any other. */
  bytes: Buffer;
  /** App time. */
  now: Date;
}

export interface Answer {
  status?: number;
  body?: unknown;
  /** An answer that is not JSON. */
  file?: { type: string; name: string; text: string };
  /** The same of any length, made while it is sent: it reads in transactions of its own, after this one has ended. */
  stream?: { type: string; name: string; parts: AsyncIterable<string | Uint8Array> };
  /** An answer to be shown where it stands, such as a picture. */
  inline?: { type: string; bytes: Uint8Array<ArrayBuffer> };
  headers?: Record<string, string>;
  /** What the audit row is about, where the path and the body do not say it. */
  subject?: string;
  /** The change had been made before under the same id, and was not made again. */
  isRepeat?: boolean;
  /** Runs once the change is committed, before the answer goes out. */
  after?: () => Promise<void>;
}

type Params = { params: Promise<Record<string, string>> };
export type RouteHandler = (request: Request, context: Params) => Promise<Response>;

/**
 * The one way into a route. In this order: session or key 401, the holding's things 404, role 403, body 422, If-Match
 * 412, then the handler; all in one transaction with its audit row and the answer kept for an Idempotency-Key.
 */
export function serve<const T extends Operation>(
  operation: T,
  handle: (asking: Asking<T>) => Promise<Answer> | Answer,
): RouteHandler {
  return async (request, context) => {
    let caller: Caller | undefined;
    try {
      caller = await identify(request);
      const who = caller;
      // Next gives a route without a name in its path no params at all
      const params = ((await context.params) as Record<string, string> | undefined) ?? {};
      const isChange = request.method !== 'GET';
      const bytes = isChange ? await readBytes(request, operation.takes?.mostBytes ?? LARGEST_BODY) : NOTHING;
      const text = operation.takes === undefined ? bytes.toString('utf8') : '';
      const now = await appNow();
      const { response, after } = await inHolding(who.holdingId, async (holding) => {
        // Changes of one holding go one after another: slugs, rings of interlocks and the last owner stay true.
        if (isChange) await lockHolding(holding);
        const asked = askedOf(operation, request, who, bytes);
        const kept = asked === null ? null : await takeKey(holding, asked);
        if (asked !== null && kept !== null)
          return { response: repeat(operation, asked, kept, who), after: null };
        const things = await findThings(holding, operation, params);
        if (operation.action !== null && !may(who.role, operation.action)) throw new Problem('not-allowed');
        const asking = { holding, caller: who, things, now, bytes, ...parse(operation, request, text) };
        refuseStale(request, things);
        // The shape that the types above promise is what findThings and parse have just made.
        const answer = await handle(asking as unknown as Asking<T>);
        if (isChange && operation.unrecorded !== true && answer.isRepeat !== true) {
          await addAudit(holding, {
            at: now,
            by: who.by,
            ...auditOf(operation, params, asking.body, answer),
          });
        }
        const status = answer.status ?? (isEmpty(answer) ? 204 : 200);
        if (asked !== null) await keepAnswer(holding, asked, status, { sealed: seal(answer.body ?? null) });
        return { response: respond(status, answer), after: answer.after ?? null };
      });
      await after?.();
      return response;
    } catch (error) {
      if (caller !== undefined && error instanceof Problem && error.code === 'not-allowed') {
        await recordRefusal(caller, operation);
      }
      return problemResponse(error);
    }
  };
}

async function findThings(
  holding: Holding,
  operation: Operation,
  params: Record<string, string>,
): Promise<Partial<Things>> {
  const things: Partial<Things> = {};
  for (const name of paramsOf(operation.path)) {
    const ref = decode(params[name]);
    if (!isThingName(name) || ref === null) throw new Problem('not-found');
    const thing = await FIND[name](holding, ref, things.house?.id ?? '');
    if (thing === null) throw new Problem('not-found');
    Object.assign(things, { [name]: thing });
  }
  return things;
}

/** Null for what can be no name: the database refuses these outright. */
function decode(param: string | undefined): string | null {
  if (param === undefined) return null;
  try {
    const ref = decodeURIComponent(param);
    return ref.length > 200 || /[\0\p{Surrogate}]/u.test(ref) ? null : ref;
  } catch {
    return null;
  }
}

function parse(operation: Operation, request: Request, text: string): { body: unknown; query: unknown } {
  let query: unknown;
  if (operation.query !== undefined) {
    const given = Object.fromEntries(new URL(request.url).searchParams);
    query = check(operation.query, given);
  }
  if (operation.body === undefined) return { body: undefined, query };
  // A body of which nothing is required may be left out.
  const given = text.trim() === '' && operation.body.safeParse({}).success ? {} : parseJson(text);
  return { body: check(operation.body, given), query };
}

/** `If-Match` speaks of the last thing that the path names. */
function refuseStale(request: Request, things: Partial<Things>): void {
  const wanted = request.headers.get('if-match');
  const last = Object.values(things).at(-1);
  if (wanted === null || wanted.trim() === '*' || last === undefined || !('revision' in last)) return;
  const tags = wanted.split(',').map((tag) => tag.trim());
  if (!tags.includes(etag(last.revision))) throw new Problem('changed-meanwhile');
}

function etag(revision: number): string {
  return `"${revision}"`;
}

function askedOf(operation: Operation, request: Request, caller: Caller, bytes: Buffer): Asked | null {
  const key = request.headers.get('idempotency-key');
  if (key === null || operation.method === 'GET') return null;
  if (!/^[\x21-\x7e]{1,200}$/.test(key)) {
    throw new Problem('not-valid', {
      errors: [{ path: 'Idempotency-Key', message: 'At most 200 plain characters, without spaces.' }],
    });
  }
  const asked = createHash('sha256').update(`${request.method} ${new URL(request.url).pathname}\n`);
  return { key, caller: caller.id, requestHash: asked.update(bytes).digest('hex') };
}

function repeat(
  operation: Operation,
  asked: Asked,
  kept: { requestHash: string; status: number; body: unknown },
  caller: Caller,
): Response {
  // Whoever lost the role meanwhile is not told again what they were told while they had it.
  if (operation.action !== null && !may(caller.role, operation.action)) throw new Problem('not-allowed');
  if (kept.requestHash !== asked.requestHash) {
    throw new Problem('not-valid', {
      errors: [{ path: 'Idempotency-Key', message: 'This key was used for another request.' }],
    });
  }
  const { body } = kept;
  const sealed = typeof body === 'object' && body !== null && 'sealed' in body ? body.sealed : null;
  const opened = typeof sealed === 'string' ? unseal(sealed) : null;
  return respond(kept.status, opened === null ? {} : { body: opened });
}

const NOTHING = Buffer.alloc(0);

const isEmpty = ({ body, file, inline, stream }: Answer) =>
  body === undefined && file === undefined && inline === undefined && stream === undefined;

function respond(status: number, answer: Answer): Response {
  const headers = new Headers({ 'cache-control': 'no-store', ...answer.headers });
  const { body, file, inline, stream } = answer;
  if (inline !== undefined) {
    headers.set('content-type', inline.type);
    headers.set('content-disposition', 'inline');
    return new Response(inline.bytes, { status, headers });
  }
  if (file !== undefined) {
    headers.set('content-type', `${file.type}; charset=utf-8`);
    headers.set('content-disposition', `attachment; filename="${file.name}"`);
    return new Response(file.text, { status, headers });
  }
  if (stream !== undefined) {
    const isText = stream.type.startsWith('text/');
    headers.set('content-type', isText ? `${stream.type}; charset=utf-8` : stream.type);
    headers.set('content-disposition', `attachment; filename="${stream.name}"`);
    return new Response(streamed(stream.parts), { status, headers });
  }
  if (body === undefined) return new Response(null, { status, headers });
  if (typeof body === 'object' && body !== null && 'revision' in body && typeof body.revision === 'number') {
    headers.set('etag', etag(body.revision));
  }
  return Response.json(body, { status, headers });
}

function auditOf(operation: Operation, params: Record<string, string>, body: unknown, answer: Answer) {
  const named = Object.values(params).map((param) => decode(param) ?? '');
  const made = answer.body;
  const isNew = answer.status === 201 && typeof made === 'object' && made !== null;
  const last =
    isNew && 'slug' in made ? made.slug : isNew && 'key' in made && !operation.secret ? made.key : null;
  const subject = answer.subject ?? [...named, ...(typeof last === 'string' ? [last] : [])].join('/');
  return { action: operation.id, subject, detail: body === undefined ? {} : { given: withoutSecrets(body) } };
}

const SECRET = new Set(['password', 'newPassword', 'token']);

function withoutSecrets(value: unknown): unknown {
  return JSON.parse(
    JSON.stringify(value, (name, inner: unknown) => (SECRET.has(name) ? '(cut out)' : inner)),
  );
}

/** In a transaction of its own, since the one that was refused is rolled back. */
async function recordRefusal(caller: Caller, operation: Operation): Promise<void> {
  const { holdingId, by, role } = caller;
  await inHolding(holdingId, async (holding) =>
    addAudit(holding, {
      at: await appNow(),
      by,
      action: 'refused',
      subject: operation.id,
      detail: { role },
    }),
  ).catch(() => undefined);
}
