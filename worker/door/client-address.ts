import type { IncomingMessage } from 'node:http';

/** Headers by which a client could claim to be somebody or somewhere else. */
const CLAIMS = [
  'forwarded',
  'x-forwarded-for',
  'x-forwarded-host',
  'x-forwarded-proto',
  'x-forwarded-port',
  'x-real-ip',
];

/**
 * Sets the client's address from the socket, over whatever the client sent: limits by address count on it, and the pages
 * believe these headers. Behind a proxy of one's own (`trustProxy`) they are that proxy's, and stay.
 */
export function markClient(request: IncomingMessage, trustProxy: boolean): void {
  if (trustProxy && request.headers['x-forwarded-for'] !== undefined) return;
  for (const name of CLAIMS) delete request.headers[name];
  const address = (request.socket.remoteAddress ?? '').replace(/^::ffff:/, '');
  request.headers['x-forwarded-for'] = address;
  request.headers['x-real-ip'] = address;
  request.headers['x-forwarded-proto'] = 'http';
  if (request.headers.host !== undefined) request.headers['x-forwarded-host'] = request.headers.host;
}
