/** The program as a whole, as outside tests may rely on it: its description, its health, and its limit on sign-ins. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startApp, type RunningApp } from '../support/app';
import { OutsideApi, type Body } from '../support/outside-api';
import { joinNode, makeHouse, pack, putIntoForce } from '../support/outside-house';
import { until } from '../support/until';

let app: RunningApp;

beforeAll(async () => {
  // without a limit of the test's own: the limit is what is looked at
  app = await startApp({ yard: false, seed: { nights: 0 }, env: { SIGN_IN_LIMIT: '' } });
}, 120_000);
afterAll(() => app.stop());

const signIn = (email: string, origin: string, password = app.password) =>
  fetch(`${app.url}/api/auth/sign-in/email`, {
    method: 'POST',
    headers: { 'content-type': 'application/json', origin },
    body: JSON.stringify({ email, password }),
  });

interface Described {
  openapi: string;
  info: Body;
  servers: { url: string }[];
  paths: Record<string, Record<string, { operationId: string; responses: Body; parameters?: Body[] }>>;
  components: { schemas: Record<string, unknown> };
}

describe('The interface describes itself', () => {
  it('as OpenAPI 3.1, with every route of the contract, unique names and no loose reference', async () => {
    const answer = await new OutsideApi(app.url).get('/openapi.json');
    const described = answer.body as unknown as Described;
    expect(described.openapi).toMatch(/^3\.1\.\d+$/);
    expect(described.info).toMatchObject({
      title: expect.any(String) as string,
      version: expect.any(String) as string,
    });
    const wanted: [string, string][] = [
      ...['houses', 'houses/{}/nodes', 'houses/{}/points', 'houses/{}/sources', 'houses/{}/channels', 'houses/{}/loops',
        'houses/{}/interlocks', 'houses/{}/rules', 'houses/{}/lockouts', 'rules/{}/force', 'rules/{}/check',
        'houses/{}/channels/{}/hand', 'houses/{}/all-off', 'api-keys'].map((path): [string, string] => ['post', path]), // prettier-ignore
      ...['houses/{}/state', 'houses/{}/readings', 'houses/{}/switchings', 'houses/{}/channels/{}/why', 'houses/{}/nights',
        'health', 'rules/{}', 'houses/{}'].map((path): [string, string] => ['get', path]), // prettier-ignore
      ...[['put', 'rules/{}/draft'], ['delete', 'houses/{}/channels/{}/hand'], ['delete', 'houses/{}/lockouts/{}']] as [string, string][], // prettier-ignore
    ];
    const told = Object.entries(described.paths).flatMap(([path, operations]) =>
      Object.keys(operations).map(
        (method) => `${method} ${path.replace(/^\//, '').replace(/\{[^}]*\}/g, '{}')}`,
      ),
    );
    for (const [method, path] of wanted) expect(told).toContain(`${method} ${path}`);
    const ids = Object.values(described.paths).flatMap((one) =>
      Object.values(one).map((op) => op.operationId),
    );
    expect(new Set(ids).size).toBe(ids.length);
    for (const [path, operations] of Object.entries(described.paths)) {
      for (const operation of Object.values(operations)) {
        expect(Object.keys(operation.responses).length).toBeGreaterThan(0);
        const inPath = (operation.parameters ?? [])
          .filter((one) => one['in'] === 'path')
          .map((one) => one['name']);
        expect(inPath.sort()).toEqual([...path.matchAll(/\{([^}]*)\}/g)].map(([, name]) => name).sort());
      }
    }
    for (const [, name] of JSON.stringify(described).matchAll(/"\$ref":"([^"]*)"/g)) {
      const parts = (name ?? '').replace(/^#\//, '').split('/');
      let place: unknown = described;
      for (const part of parts) place = (place as Record<string, unknown> | undefined)?.[part];
      expect(typeof place, name).toBe('object');
    }
  });
});

describe('A fallback', () => {
  it('is sent only for relays that have one, to nodes that can keep it', async () => {
    const api = await OutsideApi.signIn(app.url, 'owner@stonebeck.example', app.password);
    const house = await makeHouse(api, {}, { staleAfter: 600 });
    const fallback = { point: 'bench-1', below: 2, above: 5, onFor: 1200, offFor: 2400 };
    await api.call('PATCH', `/houses/${house.slug}/channels/1`, { fallback });
    const node = await joinNode(app.url, house);
    const command = await node.next(({ type }) => type === 'command');
    expect(command).not.toHaveProperty('fallback');
    node.close();
  });
});

describe('An NC contact', () => {
  it('runs its load while the coil is off, so its coil is on while the load is to be off', async () => {
    const api = await OutsideApi.signIn(app.url, 'owner@stonebeck.example', app.password);
    const house = await makeHouse(api, {}, { staleAfter: 600 });
    const at = `/houses/${house.slug}`;
    const lamp = { key: 'lamp', label: 'Lamp', contact: 'NC', load: { kind: 'lamp' }, minOn: 0, minOff: 0 };
    await api.make(`${at}/channels`, { ...lamp, number: 9, relay: 3, node: house.nodeKey });
    await putIntoForce(api, house.slug, 'lamp', {});
    const node = await joinNode(app.url, house);
    await node.readings(pack({ 'bench-1': 9, 'house-air': 9 }));
    await node.coil(3, 'on');
    await node.readings(pack({ 'bench-1': 3 }, Date.now() / 1000 + 1));
    await node.coil(3, 'off');
    node.close();
  });
});

describe('Sign-ins', () => {
  it('are taken from both names of this machine, ten a minute for one account, then 429 with Retry-After', async () => {
    const port = new URL(app.url).port;
    const answers: Response[] = [];
    for (let n = 0; n < 11; n++) {
      const origin = `http://${n % 2 === 0 ? 'localhost' : '127.0.0.1'}:${port}`;
      answers.push(await signIn('owner@larkmoor.example', origin));
    }
    // two before it from this address: the other holding's owner
    const tooMany = answers.findIndex(({ status }) => status === 429);
    expect(answers.slice(0, tooMany).every(({ status }) => status === 200)).toBe(true);
    expect(tooMany).toBe(8);
    expect(Number(answers[tooMany]?.headers.get('retry-after'))).toBeGreaterThan(0);
  });
});

describe('Health', () => {
  it('answers 503 and names the part that is away, then 200 again', async () => {
    const health = () => new OutsideApi(app.url).get('/health');
    const up = await health();
    expect([up.status, Object.keys(up.body).sort()]).toEqual([
      200,
      ['database', 'field', 'lastStep', 'now', 'rate', 'spool', 'web', 'worker'],
    ]);
    const pid = app.pid('worker');
    if (pid === null) throw new Error('no worker runs');
    // stopped, not killed: a killed one is back before anybody misses it
    process.kill(pid, 'SIGSTOP');
    let down = up;
    try {
      await until('503', async () => (down = await health()).status === 503, 20_000);
    } finally {
      process.kill(pid, 'SIGCONT');
    }
    expect(down.body).toMatchObject({ worker: { up: false }, field: { up: false }, web: { up: true } });
    await until('200', async () => (await health()).status === 200, 20_000);
  }, 60_000);
});
