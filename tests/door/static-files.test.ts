import { mkdirSync, mkdtempSync, readdirSync, readlinkSync, rmSync, writeFileSync } from 'node:fs';
import http from 'node:http';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { brotliDecompressSync, gunzipSync } from 'node:zlib';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { securityHeaders } from '@/lib/server/security-headers';
import { staticFiles } from '@/worker/door/static-files';
import { compressTexts } from '../../scripts/compress.mjs';
import { anyFree } from '../../scripts/ports.mjs';
import { until } from '../support/until';
import { frontOn, upstream, type Upstream } from './upstream';

// web's own headers are read beside the door's; nothing is connected to
process.env['DATABASE_URL'] = 'postgres://nobody@127.0.0.1:1/nothing';
process.env['AUTH_SECRET'] = 'only-for-tests-only-for-tests-only-for-tests';

const SCRIPT = 'const night = "noon to noon";\n'.repeat(4_000);
const STYLE = '.heap { color: #74352a }\n'.repeat(200);
/** Bytes that nothing makes smaller. */
const FACE = Buffer.from(Array.from({ length: 999 }, (_, at) => (at * at * 31) % 251));

let top: string;
let web: Upstream;
let port: number;
const closers: (() => unknown)[] = [];

/** A built folder beside things that are nobody's business, and a door that sends it. */
beforeEach(async () => {
  top = mkdtempSync(path.join(tmpdir(), 'middenward-static-'));
  const folder = path.join(top, 'static');
  mkdirSync(path.join(folder, 'chunks'), { recursive: true });
  mkdirSync(path.join(folder, '.kept'));
  const write = (name: string, body: string | Buffer) => writeFileSync(path.join(folder, name), body);
  write('chunks/a.js', SCRIPT);
  write('chunks/b.css', STYLE);
  write('chunks/tiny.js', '1');
  write('face.woff2', FACE);
  write('.kept/a.js', 'kept');
  write('.hidden.js', 'hidden');
  write('../secret.js', 'secret');
  await compressTexts(folder);
  web = await upstream('web');
  await openDoor(web.port);
  closers.push(web.close);
});

afterEach(async () => {
  for (const close of closers.splice(0)) await close();
  rmSync(top, { recursive: true, force: true });
});

async function openDoor(webPort: number, isHttps = false) {
  const files = staticFiles(path.join(top, 'static'), isHttps);
  const opened = await frontOn({ webPort, leaderPort: () => null, trustProxy: false, files });
  closers.push(opened.close);
  port = opened.port;
}

interface Answer {
  status: number;
  headers: http.IncomingHttpHeaders;
  body: Buffer;
}

/** As the bytes come: `fetch` would decode them, and tidy the address. */
function ask(at: string, headers: http.OutgoingHttpHeaders = {}, method = 'GET'): Promise<Answer> {
  return new Promise((resolve, reject) => {
    const request = http.request({ host: '127.0.0.1', port, path: at, method, headers, agent: false });
    request.on('error', reject);
    request.on('response', (response) => {
      const chunks: Buffer[] = [];
      response.on('data', (chunk: Buffer) => chunks.push(chunk));
      response.on('error', reject);
      response.on('end', () => {
        const { statusCode: status = 0, headers } = response;
        resolve({ status, headers, body: Buffer.concat(chunks) });
      });
    });
    request.end();
  });
}

/** What an open file is, or nothing: the one that lists them is closed by then. */
function linkOf(fd: string): string | null {
  try {
    return readlinkSync(`/proc/self/fd/${fd}`);
  } catch {
    return null;
  }
}

const A = '/_next/static/chunks/a.js';

describe('a built file', () => {
  it('comes in brotli to who takes it, and is the same once it is read', async () => {
    const { status, headers, body } = await ask(A, { 'accept-encoding': 'gzip, deflate, br, zstd' });
    expect([status, headers['content-encoding']]).toEqual([200, 'br']);
    expect(headers['content-length']).toBe(String(body.length));
    expect(brotliDecompressSync(body).toString()).toBe(SCRIPT);
  });

  it('comes in gzip to who takes that alone', async () => {
    const { headers, body } = await ask(A, { 'accept-encoding': 'gzip' });
    expect(headers['content-encoding']).toBe('gzip');
    expect(gunzipSync(body).toString()).toBe(SCRIPT);
  });

  it.each(['identity', undefined])('comes as it is to who takes neither (%s)', async (coding) => {
    const { headers, body } = await ask(A, coding === undefined ? {} : { 'accept-encoding': coding });
    expect(headers['content-encoding']).toBeUndefined();
    expect(body.toString()).toBe(SCRIPT);
  });

  it.each(['chunks/tiny.js', 'face.woff2'])(
    '%s comes as it is, since nothing makes it smaller',
    async (name) => {
      const { status, headers, body } = await ask(`/_next/static/${name}`, { 'accept-encoding': 'gzip, br' });
      expect([status, headers['content-encoding']]).toEqual([200, undefined]);
      expect(body.equals(name === 'face.woff2' ? FACE : Buffer.from('1'))).toBe(true);
    },
  );

  it.each([
    [A, 'text/javascript; charset=utf-8'],
    ['/_next/static/chunks/b.css', 'text/css; charset=utf-8'],
    ['/_next/static/face.woff2', 'font/woff2'],
  ])('%s says that it is %s, however it is sent', async (at, type) => {
    for (const coding of ['br', 'gzip', 'identity'])
      expect((await ask(at, { 'accept-encoding': coding })).headers['content-type']).toBe(type);
  });

  it('may be kept for good, by coding', async () => {
    const { headers } = await ask(A, { 'accept-encoding': 'br' });
    expect(headers['cache-control']).toBe('public, max-age=31536000, immutable');
    expect(headers.vary).toBe('Accept-Encoding');
  });

  it('has the headers that web sets on it', async () => {
    const { headers } = await ask(A, { 'accept-encoding': 'br' });
    expect(headers).toMatchObject(Object.fromEntries(securityHeaders()));
    expect(headers['strict-transport-security']).toBeUndefined();
  });

  it('asks for https where people come by it', async () => {
    await openDoor(web.port, true);
    expect((await ask(A)).headers['strict-transport-security']).toBe('max-age=31536000');
  });

  it('is told about without its bytes', async () => {
    const { status, headers, body } = await ask(A, { 'accept-encoding': 'br' }, 'HEAD');
    expect([status, headers['content-encoding'], body.length]).toEqual([200, 'br', 0]);
    expect(Number(headers['content-length'])).toBeGreaterThan(0);
  });

  // RFC 9110, 15.4.5: what a 200 would say of keeping it, and its tag
  it('is not sent again to who has it', async () => {
    const had = await ask(A, { 'accept-encoding': 'br' });
    const tag = had.headers.etag ?? '';
    const { status, headers, body } = await ask(A, { 'accept-encoding': 'br', 'if-none-match': tag });
    expect([status, body.length]).toEqual([304, 0]);
    const { etag, vary, 'cache-control': kept } = had.headers;
    expect(headers).toMatchObject({ etag, vary, 'cache-control': kept, 'x-content-type-options': 'nosniff' });
  });

  it('is sent, with its own tag, to who has another', async () => {
    const { status, headers, body } = await ask(A, { 'if-none-match': 'W/"1-1"' });
    expect([status, body.toString()]).toEqual([200, SCRIPT]);
    expect(headers.etag).not.toBe('W/"1-1"');
  });

  it('is sent while web is down', async () => {
    await openDoor(await anyFree());
    expect((await ask(A)).body.toString()).toBe(SCRIPT);
    expect((await ask('/')).status).toBe(503);
  });

  it('that went from the folder ends its own answer and nothing else', async () => {
    rmSync(path.join(top, 'static', 'chunks', 'a.js'));
    await expect(ask(A)).rejects.toThrow();
    expect((await ask('/_next/static/face.woff2')).status).toBe(200);
  });

  it('is closed when its reader goes in the middle', async () => {
    const big = path.join(top, 'static', 'big.bin');
    writeFileSync(big, Buffer.alloc(32 * 1024 * 1024, 1));
    await openDoor(web.port);
    const open = () => readdirSync('/proc/self/fd').filter((fd) => linkOf(fd) === big).length;
    const request = http.get({ host: '127.0.0.1', port, path: '/_next/static/big.bin', agent: false });
    request.on('error', () => {});
    await new Promise((resolve) => request.on('response', resolve));
    expect(open()).toBe(1);
    request.destroy();
    await until('the file is closed', () => open() === 0);
  });
});

describe('web still answers', () => {
  async function bareDoor() {
    const bare = await frontOn({ webPort: web.port, leaderPort: () => null, trustProxy: false });
    closers.push(bare.close);
    return bare;
  }

  it.each([
    ['a file that is not there', '/_next/static/chunks/gone.js?v=1', {}],
    ['the folder itself', '/_next/static/chunks/', {}],
    ['a name that is no property of a list', '/_next/static/__proto__', {}],
    ['what is outside the folder', '/_next/static/../secret.js', {}],
    ['the same, hidden in the address', '/_next/static/%2e%2e/secret.js', {}],
    ['the same, hidden twice', '/_next/static/..%2fsecret.js', {}],
    ['a name that cannot be read', '/_next/static/%E0%A4%A', {}],
    ['a hidden file', '/_next/static/.hidden.js', {}],
    ['a file of a hidden folder', '/_next/static/.kept/a.js', {}],
    ['another place of the same name', '/static/chunks/a.js', {}],
    ['a part of a file', A, { range: 'bytes=10-5' }],
    ['who refuses a coding', A, { 'accept-encoding': 'br;q=0, gzip' }],
  ])('%s', async (_what, at, headers) => {
    const answer = await ask(at, headers);
    expect(answer.body.toString()).toBe('web');
    // as a door carries it that has no files
    ({ port } = await bareDoor());
    await ask(at, headers);
    const [here, bare] = web.seen.map((request) => [
      request.url,
      request.headers['accept-encoding'],
      request.headers.range,
    ]);
    expect(here).toEqual(bare);
    // what web says of keeping it stands, not what the door says of its own files
    expect(answer.headers['cache-control']).toBeUndefined();
    expect(answer.headers['x-frame-options']).toBeUndefined();
  });

  it.each(['POST', 'PUT', 'DELETE', 'OPTIONS'])('a %s', async (method) => {
    expect((await ask(A, {}, method)).body.toString()).toBe('web');
  });

  it('all, to a door that was given no folder', async () => {
    expect(await (await fetch((await bareDoor()).url + A)).text()).toBe('web');
  });
});

it('a folder that is not there is named, with the remedy', () => {
  const gone = path.join(top, 'gone');
  expect(() => staticFiles(gone, false)).toThrow(`--static names ${gone}, and there is no such folder.`);
});
