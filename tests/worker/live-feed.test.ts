import { randomUUID } from 'node:crypto';
import { sql } from 'drizzle-orm';
import { WebSocket } from 'ws';
import { afterAll, beforeAll, describe, expect, it, onTestFinished } from 'vitest';
import { closePools, everyHolding } from '@/db/client';
import { account, member, user } from '@/db/schema/auth';
import { LIVE_CLOSE, LiveFrame } from '@/lib/live/frames';
import { auth, hashPassword } from '@/lib/server/auth';
import { ROLES } from '@/lib/server/permissions';
import { rawText } from '@/worker/raw-text';
import { makeScene, pack, type Scene } from '../support/field-scene';
import { OutsideNode } from '../support/outside-node';
import { ownWorker, type OwnWorker } from '../support/own-worker';
import { until } from '../support/until';

const PASSWORD = 'a long enough word for a test';
let worker: OwnWorker;
beforeAll(async () => {
  worker = await ownWorker();
});
afterAll(async () => {
  await worker.stop();
  await closePools();
});

/** A person of a scene's holding. @returns the cookie of their browser */
async function signIn(scene: Scene): Promise<string> {
  const db = everyHolding();
  const userId = randomUUID();
  const email = `${userId}@example.org`;
  await db.insert(user).values({ id: userId, name: 'Test', email, emailVerified: true });
  await db.insert(account).values({
    id: randomUUID(),
    accountId: userId,
    providerId: 'credential',
    userId,
    password: await hashPassword(PASSWORD),
  });
  await db
    .insert(member)
    .values({ id: randomUUID(), organizationId: scene.holding.id, userId, role: ROLES[0] });
  const { headers } = await auth().api.signInEmail({
    body: { email, password: PASSWORD },
    returnHeaders: true,
  });
  return (headers.get('set-cookie') ?? '').split(';')[0] ?? '';
}

interface Browser {
  frames: LiveFrame[];
  closed: number | undefined;
  refused: number | undefined;
  socket: WebSocket;
}

function open(house: string, cookie: string, origin = 'http://localhost:3000'): Browser {
  const socket = new WebSocket(`${worker.url.replace('http', 'ws')}/live?house=${house}`, {
    headers: { cookie },
    origin,
  });
  const browser: Browser = { frames: [], closed: undefined, refused: undefined, socket };
  socket.on('message', (data) => browser.frames.push(LiveFrame.parse(JSON.parse(rawText(data)))));
  socket.on('close', (code) => (browser.closed = code));
  socket.on('unexpected-response', (_request, response) => (browser.refused = response.statusCode));
  socket.on('error', () => undefined);
  onTestFinished(() => socket.terminate());
  return browser;
}

const stateOf = (browser: Browser) => browser.frames.findLast((frame) => frame.type === 'state');

describe('The live feed', () => {
  it('begins with how the house stands, and tells a switching as it happens', async () => {
    const scene = await makeScene();
    const browser = open(scene.houseId, await signIn(scene));
    await until('the first state', () => stateOf(browser) !== undefined);
    expect(browser.frames[0]?.type).toBe('state');
    const node = await OutsideNode.connect(worker.url, scene.token, 'N-1', 4);
    await node.readings(pack({ 'bench-1': 3, 'house-air': 5 }));
    await node.coil(1, 'on');
    await until('the relay is reported on', () => {
      const channel = stateOf(browser)?.state.channels[0];
      return channel?.state === 'on' && channel.reported === 'on' && channel.claim === 'band';
    });
    expect(browser.frames).toContainEqual(
      expect.objectContaining({ type: 'switching', channel: 1, to: 'on', claim: 'band' }),
    );
    node.close();
  });

  it('is found by the slug of a house too, within the holding', async () => {
    const scene = await makeScene();
    const browser = open(scene.slug, await signIn(scene));
    await until('the first state', () => stateOf(browser) !== undefined);
    expect(stateOf(browser)?.house).toBe(scene.houseId);
  });

  it('closes to somebody who is not signed in', async () => {
    const browser = open((await makeScene()).houseId, '');
    await until('it is closed', () => browser.closed !== undefined);
    expect(browser.closed).toBe(LIVE_CLOSE.signedOut);
  });

  it('closes to a member of another holding as if the house were not there', async () => {
    const [mine, others] = [await makeScene(), await makeScene()];
    const cookie = await signIn(mine);
    const browsers = [open(others.houseId, cookie), open(randomUUID(), cookie)];
    await until('both are closed', () => browsers.every((one) => one.closed !== undefined));
    expect(browsers.map((one) => one.closed)).toEqual([LIVE_CLOSE.notFound, LIVE_CLOSE.notFound]);
    expect(browsers.flatMap((one) => one.frames)).toEqual([]);
  });

  it('does not open to a page of another origin', async () => {
    const scene = await makeScene();
    const browser = open(scene.houseId, await signIn(scene), 'http://evil.example');
    await until('it is refused', () => browser.refused !== undefined);
    expect(browser.refused).toBe(403);
  });

  it('closes within five seconds or so when the session is ended', async () => {
    const scene = await makeScene();
    const browser = open(scene.houseId, await signIn(scene));
    await until('the first state', () => stateOf(browser) !== undefined);
    await everyHolding().execute(
      sql`delete from session where user_id in (select user_id from member where organization_id = ${scene.holding.id})`,
    );
    await until('it is closed', () => browser.closed !== undefined, 8000);
    expect(browser.closed).toBe(LIVE_CLOSE.signedOut);
  });

  it('tells what a node sends to whoever asked for it, and to nobody else', async () => {
    const scene = await makeScene();
    const cookie = await signIn(scene);
    const [asks, asksOther, silent] = [1, 2, 3].map(() => open(scene.houseId, cookie)) as [
      Browser,
      Browser,
      Browser,
    ];
    const all = [asks, asksOther, silent];
    await until('all have a state', () => all.every((one) => stateOf(one) !== undefined));
    asks.socket.send('{"type":"tail","node":"N-1"}');
    asksOther.socket.send('{"type":"tail","node":"N-2"}');
    const node = await OutsideNode.connect(worker.url, scene.token, 'N-1', 4);
    const tails = (one: Browser) => one.frames.filter((frame) => frame.type === 'tail');
    let sent = 3;
    await until('a pack is told', async () => {
      await node.readings(pack({ 'bench-1': (sent += 0.1), attic: 3 }));
      return tails(asks).length > 0;
    });
    expect(tails(asks)[0]?.records.map(({ name, unit, why }) => [name, unit, why])).toEqual([
      ['bench-1', 'Cel', null],
      ['attic', 'Cel', 'this node has no point of that name'],
    ]);
    expect([...tails(asksOther), ...tails(silent)]).toEqual([]);
    node.close();
  });

  it('closes to a browser that says anything but that it is there', async () => {
    const scene = await makeScene();
    const browser = open(scene.houseId, await signIn(scene));
    await until('the first state', () => stateOf(browser) !== undefined);
    browser.socket.send('{"type":"here"}');
    browser.socket.send('{"type":"hand"}');
    await until('it is closed', () => browser.closed !== undefined);
    expect(browser.closed).toBe(1008);
  });
});
