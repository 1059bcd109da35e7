import { env } from './env';

/**
 * Origins that may use a session: the public address, and the same port by its other loopback names, since a person on
 * the machine itself types either.
 */
export function trustedOrigins(publicUrl: string = env().PUBLIC_URL): string[] {
  const url = new URL(publicUrl);
  const port = url.port === '' ? '' : `:${url.port}`;
  return [...new Set([url.origin, `${url.protocol}//localhost${port}`, `${url.protocol}//127.0.0.1${port}`])];
}
