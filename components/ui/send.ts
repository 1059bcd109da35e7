/** A change, sent to the interface. Failure comes back as data, so that the form that sent it keeps what was typed. */
export interface Refused {
  ok: false;
  /** In words, what went wrong and what to do. */
  message: string;
  /** By dotted path of the body, for the fields. */
  fields: Record<string, string>;
  status: number;
}
export type Answer<Value> = { ok: true; value: Value } | Refused;

interface ProblemBody {
  detail?: unknown;
  title?: unknown;
  errors?: { path?: unknown; message?: unknown }[];
}

/**
 * @param path under /api/v1, such as `/houses/long-house/all-off`
 * @param etag of what was read, to be refused where somebody changed it meanwhile
 */
export async function send<Value = unknown>(
  method: 'POST' | 'PUT' | 'PATCH' | 'DELETE',
  path: string,
  body?: unknown,
  etag?: string,
): Promise<Answer<Value>> {
  let response: Response;
  try {
    response = await fetch(`/api/v1${path}`, {
      method,
      headers: {
        accept: 'application/json',
        ...(body === undefined ? {} : { 'content-type': 'application/json' }),
        ...(etag === undefined ? {} : { 'if-match': etag }),
      },
      ...(body === undefined ? {} : { body: JSON.stringify(body) }),
    });
  } catch {
    return refused(
      0,
      'The server does not answer, so nothing was changed. What you gave is still here; try again.',
    );
  }
  const text = await response.text();
  const parsed = readJson(text);
  // the one place where an answer's shape is taken on trust: it is our own interface, of the same release
  if (response.ok) return { ok: true, value: parsed as Value };
  const problem: ProblemBody = typeof parsed === 'object' && parsed !== null ? parsed : {};
  const fields: Record<string, string> = {};
  for (const one of Array.isArray(problem.errors) ? problem.errors : [])
    fields[String(one.path)] ??= String(one.message);
  const said = [problem.detail, problem.title].find((part) => typeof part === 'string' && part !== '');
  return refused(
    response.status,
    typeof said === 'string'
      ? said
      : 'The server could not do this just now, so nothing was changed. Try again in a minute.',
    fields,
  );
}

function refused(status: number, message: string, fields: Record<string, string> = {}): Refused {
  return { ok: false, status, message, fields };
}

function readJson(text: string): unknown {
  try {
    return text === '' ? null : JSON.parse(text);
  } catch {
    return null;
  }
}
