/** The field protocol frame by frame, by a node that is nothing but a socket. */
import { beforeEach, describe, expect, it } from 'vitest';
import { WebSocket } from 'ws';
import { listOf, OutsideApi, type Body } from '../support/outside-api';
import { makeHouse, type OutsideHouse } from '../support/outside-house';
import { sharedApp } from '../support/shared-app';
import { until } from '../support/until';

const { url, password } = sharedApp();
let api: OutsideApi;
let house: OutsideHouse;

beforeEach(async () => {
  api = await OutsideApi.signIn(url, 'owner@stonebeck.example', password);
  house = await makeHouse(api, {}, { staleAfter: 600 });
});

class Line {
  readonly frames: Body[] = [];
  closed: number | undefined;
  private readonly socket: WebSocket;
  private taken = 0;
  seq = 0;
  constructor(token: string) {
    const headers = { authorization: `Bearer ${token}` };
    this.socket = new WebSocket(`${url.replace('http', 'ws')}/field/v1`, { headers });
    this.socket.on('message', (raw: Buffer) => this.frames.push(JSON.parse(raw.toString()) as Body));
    this.socket.on('close', (code) => (this.closed = code));
    this.socket.on('error', () => undefined);
  }
  async opened(): Promise<this> {
    await until('the line is open', () => this.socket.readyState !== WebSocket.CONNECTING);
    return this;
  }
  async greeted(boot: string, channels = 4): Promise<this> {
    await this.opened();
    this.text(
      JSON.stringify({
        ...{ type: 'hello', node: house.nodeKey, firmware: '1' },
        channels,
        boot,
        clock: null,
      }),
    );
    expect(Object.keys(await this.take()).sort()).toEqual(['lease', 'now', 'rate', 'report', 'type']);
    return this;
  }
  text(text: string): void {
    this.socket.send(text);
  }
  /** Sends a frame with the next seq. @returns its seq */
  send(frame: object): number {
    this.text(JSON.stringify({ ...frame, seq: ++this.seq }));
    return this.seq;
  }
  /** The next frame that came. */
  async take(): Promise<Body> {
    await until('a frame comes', () => this.frames.length > this.taken);
    return this.frames[this.taken++] ?? {};
  }
  relays(channels: Record<string, string>, number: unknown = 0, trips = 0): number {
    return this.send({ type: 'relays', channels, number, trips });
  }
  close(): void {
    this.socket.close();
  }
}
const OFF = { 1: 'off', 2: 'off', 3: 'off', 4: 'off' };
const open = (token = house.token) => new Line(token).opened();
const cold = [{ n: 'bench-1', u: 'Cel', v: 3 }, { n: 'house-air', u: 'Cel', v: 5 }]; // prettier-ignore

describe('Commands', () => {
  it('answer each relays frame, keep their number on renewal, grow, and turn unwired relays off', async () => {
    const line = await (await open()).greeted('b1', 6);
    const first = line.relays({ ...OFF, 5: 'on', 6: 'off' });
    const command = await line.take();
    const off = { ...OFF, 5: 'off', 6: 'off' };
    expect(command).toEqual({
      ...{ type: 'command', number: expect.any(Number) as number, lease: 30, boot: 'b1', seen: first },
      channels: off,
    });
    expect(Number(command['number'])).toBeGreaterThan(2 ** 32);
    const second = line.relays(OFF, command['number']);
    expect(await line.take()).toEqual({ ...command, seen: second });
    const seq = line.send({ type: 'readings', pack: cold });
    const two = [await line.take(), await line.take()];
    const ack = two.find(({ type }) => type === 'ack');
    const on = two.find(({ type }) => type === 'command');
    expect(ack).toEqual({ type: 'ack', seq, stored: 2, duplicate: 0, refused: [] });
    expect(on).toMatchObject({ seen: second, channels: { ...off, 1: 'on' } });
    expect(Number(on?.['number'])).toBeGreaterThan(Number(command['number']));
    line.close();
  });

  it('answer a trip with a new number, and store it once as a fail-safe switching without one', async () => {
    const line = await (await open()).greeted('b1');
    line.relays(OFF);
    await line.take();
    line.send({ type: 'readings', pack: cold });
    const on = [await line.take(), await line.take()].find(({ type }) => type === 'command');
    line.relays({ ...OFF, 1: 'on' }, on?.['number']);
    await line.take();
    for (const more of [true, false]) {
      const seq = line.relays(OFF, on?.['number'], 1);
      const answer = await line.take();
      expect(answer).toMatchObject({ type: 'command', seen: seq, channels: { ...OFF, 1: 'on' } });
      if (more) expect(Number(answer['number'])).toBeGreaterThan(Number(on?.['number']));
    }
    const trips = async () =>
      listOf((await api.get(`/houses/${house.slug}/switchings`)).body).filter(
        ({ claim }) => claim === 'fail-safe',
      );
    await until('the trip is told', async () => (await trips()).length > 0);
    expect(await trips()).toMatchObject([{ channel: 1, from: 'on', to: 'off', number: null }]);
    line.close();
  });
});

describe('Lines', () => {
  it('are closed with 4001 when another opens with the same token', async () => {
    const first = await (await open()).greeted('b1');
    const second = await open();
    await until('the first is closed', () => first.closed !== undefined);
    expect([first.closed, second.closed]).toEqual([4001, undefined]);
    second.close();
  });

  it('answer ten malformed frames with error and are then closed with 1008; 64 KiB are the most', async () => {
    const line = await (await open()).greeted('b1');
    const bad = ['{', '[]', '{"type":"dance","seq":4}', '{"type":"relays","seq":5}', 'null'];
    for (const text of [...bad, ...bad]) line.text(text);
    await until('it is closed', () => line.closed !== undefined);
    expect(line.closed).toBe(1008);
    const errors = line.frames.filter(({ type }) => type === 'error');
    expect(errors).toHaveLength(10);
    expect(errors.map(({ seq }) => seq).slice(0, 4)).toEqual([undefined, undefined, 4, 5]);
    const big = await (await open()).greeted('b2');
    const bare = JSON.stringify({ type: 'log', level: 'info', text: '', seq: 1 }).length;
    const seq = big.send({ type: 'log', level: 'info', text: 'x'.repeat(65_536 - bare) });
    expect(await big.take()).toEqual({ type: 'ack', seq });
    big.send({ type: 'log', level: 'info', text: 'x'.repeat(65_537 - bare) });
    await until('it is closed', () => big.closed !== undefined);
    expect(big.closed).toBe(1009);
  });

  it('end with a revoked token; a replaced one is good for a day', async () => {
    const line = await (await open()).greeted('b1');
    const at = `/houses/${house.slug}/nodes/${house.nodeKey}/token`;
    const { token, formerTokenUntil } = await api.make(at, undefined);
    expect(Math.abs(Date.parse(String(formerTokenUntil)) - Date.now() - 86_400_000)).toBeLessThan(60_000);
    expect((await post('[]')).status).toBe(200);
    expect((await post('[]', { authorization: `Bearer ${String(token)}` })).status).toBe(200);
    await api.call('DELETE', at);
    await until('the line is cut', () => line.closed !== undefined);
    for (const one of [house.token, String(token)])
      expect((await post('[]', { authorization: `Bearer ${one}` })).status).toBe(401);
  });
});

async function post(body: string, headers: Record<string, string> = {}) {
  const response = await fetch(`${url}/field/v1/readings`, {
    method: 'POST',
    headers: {
      ...{ authorization: `Bearer ${house.token}`, 'content-type': 'application/senml+json' },
      ...headers,
    },
    body,
  });
  const type = response.headers.get('content-type');
  return { status: response.status, type, body: (await response.json()) as Body };
}

describe('Readings', () => {
  it('are resolved by SenML: base fields, relative times, other units; the doubtful are refused one by one', async () => {
    const now = Math.floor(Date.now() / 1000);
    const pack = [
      { bn: 'bench-', bt: now - 100, bu: 'Far', n: '1', v: 41 },
      { n: '1', t: 10, u: 'Cel', v: 6 },
      { bn: 'house-air', bt: -20, bu: 'Cel', bv: 1, v: 4 },
      { n: '', t: 20, v: null },
      { bv: 0, v: 9, t: 20 + 200 },
      { v: 9, u: 'K' },
      { bn: 'of-another-house', v: 1 },
    ];
    const sent = await post(JSON.stringify(pack));
    expect(sent).toMatchObject({ status: 200, body: { stored: 3, duplicate: 0 } });
    expect(listOf(sent.body, 'refused').map(({ index }) => index)).toEqual([3, 4, 5, 6]);
    const far = await post(`[{"n":"bench-1","u":"Cel","v":1e999},{"n":"core","v":50}]`);
    expect(far.body).toMatchObject({ stored: 1, refused: [{ index: 0, name: 'bench-1' }] });
    const series = await api.get(`/houses/${house.slug}/readings?points=bench-1,house-air`);
    expect(series.body).toMatchObject({
      points: { 'bench-1': { value: [5, 6] }, 'house-air': { value: [5] } },
    });
    const again = await post(JSON.stringify(pack.slice(0, 2)));
    expect(again.body).toEqual({ stored: 0, duplicate: 2, refused: [] });
  });

  it('posted wrongly are problems by RFC 9457', async () => {
    const bearer = { authorization: 'Bearer nobody' };
    const wrong = [await post('[]', bearer), await post('{'), await post('{}'), await post('[]', { 'content-type': 'text/plain' })]; // prettier-ignore
    expect(wrong.map(({ status }) => status)).toEqual([401, 400, 400, 415]);
    for (const { status, type, body } of wrong) {
      expect(type).toMatch(/^application\/problem\+json/);
      expect(body).toMatchObject({ status, title: expect.any(String) as string });
    }
  });
});
