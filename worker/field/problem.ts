import type { ServerResponse } from 'node:http';
import type { Duplex } from 'node:stream';
import { STATUS_CODES } from 'node:http';

/** An answer by RFC 9457. */
export function answerProblem(
  response: ServerResponse,
  status: number,
  detail: string,
  headers: Record<string, string> = {},
): void {
  const body = JSON.stringify({
    type: 'about:blank',
    title: STATUS_CODES[status] ?? 'Error',
    status,
    detail,
  });
  response.writeHead(status, { ...headers, 'content-type': 'application/problem+json' });
  response.end(body);
}

/** The same to a request for an upgrade, which has no response yet. */
export function refuseUpgrade(socket: Duplex, status: number, detail: string): void {
  const title = STATUS_CODES[status] ?? 'Error';
  const body = JSON.stringify({ type: 'about:blank', title, status, detail });
  const extra = status === 401 ? 'WWW-Authenticate: Bearer\r\n' : status === 503 ? 'Retry-After: 2\r\n' : '';
  socket.end(
    `HTTP/1.1 ${status} ${title}\r\nConnection: close\r\n${extra}Content-Type: application/problem+json\r\n` +
      `Content-Length: ${Buffer.byteLength(body)}\r\n\r\n${body}`,
  );
}
