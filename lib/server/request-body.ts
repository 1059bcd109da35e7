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
  // NUL and halves of a surrogate pair are valid JSON, and PostgreSQL takes neither in text. What turns the direction of
  // writing would turn other words of a page or a message with it.
  if (/[\0\p{Surrogate}\u202a-\u202e\u2066-\u2069]/u.test(everyText(value)))
    throw refuse('The body holds a character that cannot be kept.');
  return value;
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

function everyText(value: unknown): string {
  const texts: string[] = [];
  JSON.stringify(value, (key, inner: unknown) => {
    texts.push(key);
    if (typeof inner === 'string') texts.push(inner);
    return inner;
  });
  return texts.join('\n');
}

function refuse(message: string): Problem {
  return new Problem('not-valid', { errors: [{ path: '', message }] });
}
