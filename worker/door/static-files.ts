import { statSync } from 'node:fs';
import type { IncomingMessage, ServerResponse } from 'node:http';
import sirv from 'sirv';

/** Where browsers find what web's build made for them. Each name holds a hash, so what stands under it never changes. */
const AT = '/_next/static/';
const YEAR_S = 31_536_000;
/** As web names them; a browser would else guess how a text is written. */
const TEXTS: Record<string, string> = { js: 'text/javascript', css: 'text/css' };

/** Answers from the folder, or leaves the request as it was to `otherwise`. */
export type StaticFiles = (request: IncomingMessage, response: ServerResponse, otherwise: () => void) => void;

/**
 * Sends the scripts, styles and faces of the pages itself, compressed when they were built (scripts/compress.mjs):
 * brotli at its best is a seventh less than what web makes of them as it goes, and an open page gets its parts while web
 * restarts.
 * @param folder what is asked for under /_next/static/; read once, so that an address is only ever looked up in a list
 * @param isHttps whether people reach the program by https
 */
export function staticFiles(folder: string, isHttps: boolean): StaticFiles {
  if (statSync(folder, { throwIfNoEntry: false })?.isDirectory() !== true)
    throw new Error(`--static names ${folder}, and there is no such folder. Build the pages: npm run build.`);
  const headers = fixedHeaders(isHttps);
  const send = sirv(folder, {
    ...{ brotli: true, gzip: true, etag: true, extensions: [], dev: false },
    setHeaders(response, pathname) {
      const text = TEXTS[pathname.slice(pathname.lastIndexOf('.') + 1)];
      if (text !== undefined) response.setHeader('content-type', `${text}; charset=utf-8`);
      response.removeHeader('etag'); // it is the file's from here on
      response.once('pipe', (file) => {
        // without a listener the fault of a file that went from under us would be the door's, and its answer never end
        file.once('error', () => response.destroy());
        // a phone that goes in the middle would else leave the file open for good
        response.once('close', () => file.destroy());
      });
    },
  });
  return (request, response, otherwise) => {
    const { url } = request;
    if (url?.startsWith(AT) !== true || !isPlain(request)) return otherwise();
    // "304 Not Modified" tells them too, and the tag that it found to be the file's (RFC 9110, 15.4.5)
    const tag = request.headers['if-none-match'];
    const all = tag === undefined ? headers : [...headers, ['etag', tag] as const];
    for (const [name, value] of all) response.setHeader(name, value);
    request.url = url.slice(AT.length - 1);
    send(request, response, () => {
      request.url = url;
      for (const [name] of all) response.removeHeader(name);
      otherwise();
    });
  };
}

/** Parts of a file, and codings that are named to be refused, are understood by web; browsers ask for neither. */
function isPlain({ method, headers }: IncomingMessage): boolean {
  const refuses = /;\s*q=0(?:\.0*)?\s*(?:,|$)/.test(headers['accept-encoding'] ?? '');
  return (method === 'GET' || method === 'HEAD') && headers.range === undefined && !refuses;
}

/** Those that web sets on the same files (lib/server/security-headers.ts, which the door may not load; a test compares). */
function fixedHeaders(isHttps: boolean): [string, string][] {
  const always: [string, string][] = [
    ['cache-control', `public, max-age=${YEAR_S}, immutable`],
    ['vary', 'Accept-Encoding'],
    ['x-content-type-options', 'nosniff'],
    ['referrer-policy', 'same-origin'],
    ['cross-origin-opener-policy', 'same-origin'],
    ['cross-origin-resource-policy', 'same-origin'],
    ['permissions-policy', 'camera=(), microphone=(), geolocation=(), payment=(), usb=()'],
    ['x-frame-options', 'DENY'],
  ];
  return isHttps ? [...always, ['strict-transport-security', 'max-age=31536000']] : always;
}
