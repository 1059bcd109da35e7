import { Problem } from './errors';

export const LARGEST_BODY = 1024 * 1024;

/** The body as bytes. @throws Problem `too-large` as soon as it is, without reading on */
export async function readBytes(request: Request, most: number): Promise<Buffer> {
  if (Number(request.headers.get('content-length') ?? 0) > most) throw tooLarge(most);
  if (request.body === null) return Buffer.alloc(0);
  const parts: Uint8Array[] = [];
  let size = 0;
  for await (const part of request.body) {
    size += part.byteLength;
    if (size > most) throw tooLarge(most);
    parts.push(part);
  }
  return Buffer.concat(parts);
}

function tooLarge(most: number): Problem {
  return new Problem(
    'too-large',
    most === LARGEST_BODY ? {} : { detail: `This is over ${Math.round(most / 1024 ** 2)} MiB.` },
  );
}

/** The body as text. @throws Problem `too-large` as soon as it is */
export async function readText(request: Request): Promise<string> {
  return (await readBytes(request, LARGEST_BODY)).toString('utf8');
}

/** @throws Problem `not-valid` at path '' for what is no JSON, and for text that no database keeps */
export function parseJson(text: string): unknown {
  if (depthOf(text) > DEEPEST) throw refuse('The body is nested too deeply.');
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch {
    throw refuse(text.trim() === '' ? 'This request needs a body in JSON.' : 'The body is not valid JSON.');
  }
  const at = unkeptAt(value);
  if (at !== null)
    throw refuse('This holds a character that is no text, and cannot be kept: type it anew.', at.join('.'));
  return value;
}

/**
 * NUL and halves of a surrogate pair are valid JSON, and PostgreSQL takes neither in text. The other control characters
 * nobody types, and some a terminal or a printer obeys. What turns the direction of writing would turn other words of a
 * page or a message with it.
 */
const UNKEPT = /[\0-\x08\v\f\x0e-\x1f\x7f-\x9f\p{Surrogate}\u202a-\u202e\u2066-\u2069]/u;

/** The way to the first text that cannot be kept, or to what has such a name; null where all can. */
function unkeptAt(value: unknown, way: string[] = []): string[] | null {
  if (typeof value === 'string') return UNKEPT.test(value) ? way : null;
  if (typeof value !== 'object' || value === null) return null;
  for (const [key, inner] of Object.entries(value)) {
    if (UNKEPT.test(key)) return way;
    const found = unkeptAt(inner, [...way, key]);
    if (found !== null) return found;
  }
  return null;
}

const DEEPEST = 60;

/** Nesting of a JSON text, told before anything walks it: a deep enough one would exhaust the stack. */
function depthOf(text: string): number {
  let depth = 0;
  let deepest = 0;
  for (const [mark] of text.matchAll(/"(?:[^"\\]|\\.)*"|[[{\]}]/g)) {
    if (mark === '{' || mark === '[') deepest = Math.max(deepest, (depth += 1));
    else if (mark === '}' || mark === ']') depth -= 1;
  }
  return deepest;
}

function refuse(message: string, path = ''): Problem {
  return new Problem('not-valid', { errors: [{ path, message }] });
}
