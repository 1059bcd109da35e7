import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { anyFree } from '../../scripts/ports.mjs';
import { until } from '../support/until';
import { frontOn, upgrade, upstream, type Upstream } from './upstream';

let web: Upstream;
let worker: Upstream;
let leaderPort: number | null;
const closers: (() => unknown)[] = [];

async function door(options: { webPort?: number; trustProxy?: boolean } = {}) {
  const opened = await frontOn({
    webPort: options.webPort ?? web.port,
    leaderPort: () => leaderPort,
    trustProxy: options.trustProxy ?? false,
  });
  closers.push(opened.close);
  return opened;
}

beforeEach(async () => {
  web = await upstream('web');
  worker = await upstream('worker');
  leaderPort = worker.port;
  closers.push(web.close, worker.close);
});

afterEach(async () => {
  for (const close of closers.splice(0)) await close();
});

describe('who gets a request', () => {
  it.each([
    ['/', 'web'],
    ['/fields', 'web'],
    ['/liveliness', 'web'],
    ['/api/v1/houses?x=/field', 'web'],
    ['/field/v1', 'worker'],
    ['/field/v1/readings?x=1', 'worker'],
    ['/live', 'worker'],
  ])('%s goes to %s', async (path, name) => {
    const { url } = await door();
    expect(await (await fetch(url + path)).text()).toBe(name);
  });
});

// RFC 9110, 7.6.1: Keep-Alive is of one connection and is not carried on
it('how long web keeps its connections is not said of the door’s', async () => {
  const { url } = await door();
  expect((await fetch(url)).headers.get('keep-alive')).not.toBe('timeout=3600');
});

describe('the client’s address', () => {
  const forged = {
    'x-forwarded-for': '6.6.6.6',
    'x-real-ip': '6.6.6.6',
    forwarded: 'for=6.6.6.6',
    'x-forwarded-proto': 'https',
    'x-forwarded-host': 'elsewhere.example',
  };

  it('is the socket’s, whatever the client claims', async () => {
    const { url, port } = await door();
    await fetch(url, { headers: forged });
    const headers = web.seen[0]?.headers;
    expect(headers?.['x-forwarded-for']).toBe('127.0.0.1');
    expect(headers?.['x-real-ip']).toBe('127.0.0.1');
    expect(headers?.['x-forwarded-proto']).toBe('http');
    expect(headers?.['x-forwarded-host']).toBe(`127.0.0.1:${port}`);
    expect(headers?.forwarded).toBeUndefined();
  });

  it('is the socket’s on an upgrade too', async () => {
    const { port } = await door();
    const { socket } = upgrade(port, '/live');
    await until('the worker is asked', () => worker.seen.length === 1);
    expect(worker.seen[0]?.headers['x-forwarded-for']).toBe('127.0.0.1');
    socket.destroy();
  });

  it('is what a trusted proxy says', async () => {
    const { url } = await door({ trustProxy: true });
    await fetch(url, { headers: forged });
    expect(web.seen[0]?.headers['x-forwarded-for']).toBe('6.6.6.6');
  });
});

describe('a part that is down', () => {
  it('web: a browser gets a page in words with 503', async () => {
    const { url } = await door({ webPort: await anyFree() });
    const answer = await fetch(url, { headers: { accept: 'text/html' } });
    expect(answer.status).toBe(503);
    expect(await answer.text()).toContain('The pages are restarting; control is not affected');
  });

  it('web: a program gets problem+json with Retry-After', async () => {
    const { url } = await door({ webPort: await anyFree() });
    const answer = await fetch(`${url}/api/v1/houses`, { method: 'POST', body: '{}' });
    expect(answer.headers.get('content-type')).toBe('application/problem+json');
    expect(answer.headers.get('retry-after')).toBe('2');
    expect(await answer.json()).toMatchObject({ status: 503, type: 'about:blank' });
  });

  it('web: a node keeps its pipe to the worker', async () => {
    const { url, port } = await door();
    const { socket, state } = upgrade(port, '/field/v1');
    await until('upgraded', () => state.text.includes('101'));
    await web.close();
    expect((await fetch(url)).status).toBe(503);
    socket.write('reading');
    await until('echoed', () => state.text.endsWith('worker:reading'));
    socket.destroy();
  });

  it('worker: plain HTTP gets 503 as problem+json', async () => {
    leaderPort = await anyFree();
    const { url } = await door();
    const answer = await fetch(`${url}/field/v1`, { method: 'POST', body: '[]' });
    expect(answer.status).toBe(503);
    expect(answer.headers.get('content-type')).toBe('application/problem+json');
  });

  it.each(['none leads', 'the leader is gone'])('worker: an upgrade gets 502 when %s', async (how) => {
    leaderPort = how === 'none leads' ? null : await anyFree();
    const { port } = await door();
    const { state } = upgrade(port, '/field/v1');
    await until('closed', () => state.closed);
    expect(state.text).toMatch(/^HTTP\/1\.1 502 /);
    expect(state.text.match(/HTTP\/1\.1/g)).toHaveLength(1);
  });

  it('worker: its death closes the node’s socket', async () => {
    const { port } = await door();
    const { state } = upgrade(port, '/field/v1');
    await until('upgraded', () => state.text.includes('101'));
    await worker.close();
    await until('closed', () => state.closed);
  });
});

describe('a client that resets its connection', () => {
  it('loses its pipe, and nobody else does', async () => {
    const { url, port } = await door();
    const rude = upgrade(port, '/field/v1');
    const other = upgrade(port, '/field/v1');
    await until(
      'both are upgraded',
      () => rude.state.text.includes('101') && other.state.text.includes('101'),
    );

    rude.socket.resetAndDestroy();

    await until('the worker sees one go', () => worker.sockets.some((socket) => socket.destroyed));
    other.socket.write('reading');
    await until('the other pipe carries', () => other.state.text.endsWith('worker:reading'));
    expect((await fetch(url)).status).toBe(200);
    other.socket.destroy();
  });
});

describe('a new leader', () => {
  it('cuts the pipes to every other worker and keeps its own', async () => {
    const { port, front } = await door();
    const old = upgrade(port, '/field/v1');
    await until('upgraded', () => old.state.text.includes('101'));
    const next = await upstream('next');
    closers.push(next.close);
    leaderPort = next.port;
    const fresh = upgrade(port, '/field/v1');
    await until('upgraded', () => fresh.state.text.includes('101'));

    front.cutAllBut(next.port);

    await until('the old pipe is cut', () => old.state.closed);
    await until('the old worker sees it', () => worker.sockets[0]?.destroyed === true);
    fresh.socket.write('reading');
    await until('the new pipe carries', () => fresh.state.text.endsWith('next:reading'));
    fresh.socket.destroy();
  });
});
