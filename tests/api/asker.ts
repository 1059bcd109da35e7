// Asks the interface as the running app would be asked: the route file is found by its path, as Next finds it.
import { afterAll } from 'vitest';
import { closePools, everyHolding, type Holding } from '@/db/client';
import { addMember } from '@/db/queries/member';
import { createHolding, createUser } from '@/db/queries/people';
import { answerAuth } from '@/lib/server/auth-door';
import { hashPassword } from '@/lib/server/auth';

export type Json = Record<string, unknown>;
export interface Told {
  status: number;
  headers: Headers;
  body: Json;
  text: string;
  bytes: Buffer;
}
type Handler = (request: Request, context: { params: Promise<Record<string, string>> }) => Promise<Response>;
type Loader = () => Promise<Record<string, Handler>>;

const FILES = import.meta.glob('../../app/api/v1/**/route.ts') as Record<string, Loader>;

/** Route files by their path under /api/v1, with `{name}` for what a folder in brackets stands for. */
export const ROUTES = new Map(
  Object.entries(FILES).map(([file, load]) => [
    file
      .replace('../../app/api/v1', '')
      .replace('/route.ts', '')
      .replace(/\[(\w+)\]/g, '{$1}'),
    load,
  ]),
);

export const ORIGIN = 'http://localhost:3000';
export const PASSWORD = 'larch bench sleet kettle';

function match(path: string): { load: Loader; params: Record<string, string> } {
  const parts = path.split('/').slice(1);
  for (const [route, load] of [...ROUTES].sort(([a], [b]) => a.split('{').length - b.split('{').length)) {
    const wanted = route.split('/').slice(1);
    if (wanted.length !== parts.length || route.includes('...')) continue;
    const params: Record<string, string> = {};
    const fits = wanted.every((part, at) => {
      const name = /^\{(\w+)\}$/.exec(part)?.[1];
      if (name !== undefined) params[name] = parts[at] ?? '';
      return name !== undefined || part === parts[at];
    });
    if (fits) return { load, params };
  }
  throw new Error(`no route file answers ${path}`);
}

function asBody(body: unknown): string | Uint8Array<ArrayBuffer> {
  if (typeof body === 'string') return body;
  return body instanceof Uint8Array ? new Uint8Array(body) : JSON.stringify(body);
}

/** Somebody, or nobody, who asks; `headers` carry the session or the key. */
export class Asker {
  constructor(readonly headers: Record<string, string> = {}) {}

  async ask(method: string, path: string, body?: unknown, more: Record<string, string> = {}): Promise<Told> {
    const url = new URL(`${ORIGIN}/api/v1${path}`);
    const { load, params } = match(url.pathname.replace('/api/v1', ''));
    const handler = (await load())[method];
    if (handler === undefined) throw new Error(`${path} does not answer ${method}`);
    const request = new Request(url, {
      method,
      headers: { origin: ORIGIN, ...this.headers, ...more },
      ...(body === undefined ? {} : { body: asBody(body) }),
    });
    const response = await handler(request, { params: Promise.resolve(params) });
    const bytes = Buffer.from(await response.arrayBuffer());
    const text = bytes.toString('utf8');
    const isJson = /json/.test(response.headers.get('content-type') ?? '');
    return {
      status: response.status,
      headers: response.headers,
      body: isJson ? (JSON.parse(text) as Json) : {},
      text,
      bytes,
    };
  }

  get(path: string): Promise<Told> {
    return this.ask('GET', path);
  }

  /** POST that must make something; answers what was made. */
  async make(path: string, body: unknown): Promise<Json> {
    const told = await this.ask('POST', path, body);
    if (told.status !== 201) throw new Error(`POST ${path} answered ${told.status}: ${told.text}`);
    return told.body;
  }
}

export const NOBODY = new Asker();

afterAll(closePools);
// Letters of tests that read none go nowhere: nothing listens on this port.
process.env['MAIL_PORT'] ??= '1';

let hash: string | undefined;

export async function newHolding(slug: string): Promise<Holding> {
  return { id: await createHolding(slug, slug), db: everyHolding() };
}

/** A person of a holding, signed in. */
export async function personOf(holding: Holding, role: string, email: string): Promise<Asker> {
  hash ??= await hashPassword(PASSWORD);
  const userId = await createUser({ email, name: email, passwordHash: hash });
  await addMember(holding.id, userId, role);
  return signIn(email);
}

export async function signIn(email: string, password = PASSWORD): Promise<Asker> {
  const response = await tryToSignIn(email, password);
  if (response.status !== 200)
    throw new Error(`sign-in answered ${response.status}: ${await response.text()}`);
  const cookie = response.headers
    .getSetCookie()
    .map((line) => line.split(';')[0])
    .join('; ');
  return new Asker({ cookie });
}

let address = 0;

/** From another address each time, unless one is given: the limit by address is not what most tests are about. */
export function tryToSignIn(
  email: string,
  password: string,
  from = `10.0.${(address += 1) >> 8}.${address & 255}`,
) {
  return answerAuth(
    new Request(`${ORIGIN}/api/auth/sign-in/email`, {
      method: 'POST',
      headers: { 'content-type': 'application/json', origin: ORIGIN, 'x-forwarded-for': from },
      body: JSON.stringify({ email, password }),
    }),
  );
}

export const errorsOf = (told: Told) => told.body['errors'];
export const itemsOf = (told: Told) => told.body['items'] as Json[];
