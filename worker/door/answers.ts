import type { IncomingMessage, ServerResponse } from 'node:http';
import type { Duplex } from 'node:stream';

/** What the door itself says when a part behind it does not answer. */
export interface Absence {
  status: 502 | 503;
  title: string;
  detail: string;
}

export const PAGES_ABSENT: Absence = {
  status: 503,
  title: 'The pages are restarting; control is not affected',
  detail: 'Field nodes stay connected and relays are driven. Try again in a few seconds.',
};

export const WORKER_ABSENT: Absence = {
  status: 503,
  title: 'Control is restarting',
  detail:
    'No worker leads at the moment. Relays drop to their safe states when their leases end; try again in a few seconds.',
};

const RETRY_AFTER_S = '2';

/** A page for a browser that asked for one, problem+json (RFC 9457) for everybody else. */
export function answerAbsence(request: IncomingMessage, response: ServerResponse, absence: Absence): void {
  if (response.headersSent) {
    response.destroy(); // a part of the answer is out; a cut connection says that it is not whole, a second answer would not
    return;
  }
  const asksForPage = (request.headers.accept ?? '').includes('text/html');
  const body = asksForPage ? page(absence) : problem(absence);
  response.writeHead(absence.status, {
    'content-type': asksForPage ? 'text/html; charset=utf-8' : 'application/problem+json',
    'content-length': Buffer.byteLength(body),
    'cache-control': 'no-store',
    'content-security-policy': "default-src 'none'; frame-ancestors 'none'",
    'x-content-type-options': 'nosniff',
    'retry-after': RETRY_AFTER_S,
  });
  response.end(request.method === 'HEAD' ? undefined : body);
}

/** An upgrade has no response object: the refusal is written on the socket. */
export function refuseUpgrade(socket: Duplex, absence: Absence): void {
  if (!socket.writable) return;
  const body = problem({ ...absence, status: 502 });
  socket.end(
    [
      'HTTP/1.1 502 Bad Gateway',
      'Connection: close',
      'Content-Type: application/problem+json',
      `Content-Length: ${Buffer.byteLength(body)}`,
      `Retry-After: ${RETRY_AFTER_S}`,
      '',
      body,
    ].join('\r\n'),
  );
}

function problem({ status, title, detail }: Absence): string {
  return JSON.stringify({ type: 'about:blank', title, status, detail });
}

function page({ title, detail }: Absence): string {
  return `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width">
<meta name="color-scheme" content="light dark">
<meta http-equiv="refresh" content="${RETRY_AFTER_S}">
<title>${title}</title>
</head>
<body>
<h1>${title}</h1>
<p>${detail}</p>
<p>This page looks again by itself.</p>
</body>
</html>
`;
}
