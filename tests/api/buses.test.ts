// Nodes on buses by the interface: what is refused, what is never told, what goes into an archive.
import { beforeAll, describe, expect, test } from 'vitest';
import { sql } from 'drizzle-orm';
import { everyHolding } from '@/db/client';
import { answerTestRead, waitingTestReads } from '@/db/queries/test-read';
import { parseEnv } from '@/lib/server/env';
import { mayReach } from '@/lib/server/bus-hosts';
import { unseal } from '@/lib/server/seal';
import { type Asker, errorsOf, type Json, newHolding, personOf } from './asker';
import * as shown from './shown';

const CANARY = 'canary-of-the-broker';
const AT = '/houses/long-house';
let owner: Asker;
beforeAll(async () => {
  owner = await personOf(await newHolding('larkmoor'), 'owner', 'owner@larkmoor.example');
  await owner.make('/houses', shown.house);
});

const mqtt = { host: 'localhost', port: 8883, user: 'middenward', password: CANARY };
const secretOf = async (key: string) => {
  const { rows } = await everyHolding().execute<{ secret: string | null }>(
    sql`select bus_secret as secret from node where key = ${key}`,
  );
  return rows[0]?.secret ?? null;
};

describe('a broker’s password', () => {
  test('is kept sealed, told to nobody, and not in the audit log', async () => {
    const made = await owner.ask('POST', `${AT}/nodes`, { key: 'MQ-1', kind: 'mqtt', mqtt });
    expect(made.status).toBe(201);
    expect(made.body['mqtt']).toEqual({
      ...{ host: 'localhost', port: 8883, tls: true, ca: null, user: 'middenward', hasPassword: true },
    });
    const read = await owner.get(`${AT}/nodes/MQ-1`);
    const audit = await owner.get('/audit');
    for (const { text } of [made, read, audit]) expect(text).not.toContain(CANARY);
    const secret = await secretOf('MQ-1');
    expect(secret).not.toContain(CANARY);
    expect(unseal(secret ?? '', 'brokers')).toBe(CANARY);
    expect(() => unseal(secret ?? '')).toThrow();
  });

  test('stays when something else is changed, goes with null, and is asked for anew with another broker', async () => {
    await owner.make(`${AT}/nodes`, { key: 'MQ-2', kind: 'mqtt', mqtt });
    const path = `${AT}/nodes/MQ-2`;
    const { password, ...rest } = mqtt;
    expect(password).toBe(CANARY);
    expect(await owner.ask('PATCH', path, { reportEvery: 20 })).toMatchObject({
      ...{ status: 200, body: { mqtt: { hasPassword: true } } },
    });
    expect(await owner.ask('PATCH', path, { mqtt: { ...rest, user: 'other' } })).toMatchObject({
      ...{ status: 200, body: { mqtt: { hasPassword: true, user: 'other' } } },
    });
    const moved = await owner.ask('PATCH', path, { mqtt: { ...rest, host: '127.0.0.1' } });
    expect([moved.status, errorsOf(moved)]).toMatchObject([422, [{ path: 'mqtt.password' }]]);
    await owner.ask('PATCH', path, { mqtt: { ...rest, password: null } });
    expect(await secretOf('MQ-2')).toBeNull();
  });
});

describe('refused at its field', () => {
  const board = (more: object) => ({ key: 'MB-9', kind: 'modbus', modbus: { host: '127.0.0.1', ...more } });
  test.each([
    ['modbus.host', board({ host: '169.254.169.254' })],
    ['modbus.host', board({ host: 'http://127.0.0.1/' })],
    ['modbus.host', board({ host: '127.0.0.1\n' + 'x' })],
    ['modbus.host', board({ host: '' })],
    ['modbus.port', board({ port: 0 })],
    ['modbus.unit', board({ unit: 256 })],
    ['modbus.watchdog.within', board({ watchdog: { address: 1, within: 3600 } })],
    ['mqtt.host', { key: 'MQ-9', kind: 'mqtt', mqtt: { host: 'elsewhere.example' } }],
    ['mqtt.ca', { key: 'MQ-9', kind: 'mqtt', mqtt: { host: 'localhost', ca: 'not a certificate' } }],
    ['mqtt', { key: 'S-9', kind: 'socket', mqtt }],
    ['modbus', { key: 'S-9', kind: 'mqtt', modbus: { host: 'localhost' } }],
    ['registers', { key: 'S-9', kind: 'socket', registers: shown.board.registers }],
    [
      'registers.0.point',
      { ...shown.board, key: 'MB-9', registers: [{ ...shown.board.registers[0], point: '' }] },
    ],
  ])('%s', async (path, body) => {
    const told = await owner.ask('POST', `${AT}/nodes`, body);
    expect(told.status).toBe(422);
    expect((errorsOf(told) as Json[]).map((one) => one['path'])).toContain(path);
    expect(told.text).not.toContain(CANARY);
  });

  test('nothing is let in that the operator has not listed', () => {
    const list = parseEnv({
      ...process.env,
      BUS_HOSTS: '192.0.2.10:502, Broker.example , [2001:db8::1]:8883',
    }).BUS_HOSTS;
    const may = (host: string, port: number) => mayReach({ host, port }, list);
    expect([may('192.0.2.10', 502), may('BROKER.example', 1), may('2001:db8::1', 8883)]).toEqual([
      true,
      true,
      true,
    ]);
    expect([may('192.0.2.10', 503), may('x.broker.example', 1), may('192.0.2.1', 502)]).toEqual([
      false,
      false,
      false,
    ]);
    expect(
      mayReach({ host: 'localhost', port: 502 }, parseEnv({ ...process.env, BUS_HOSTS: '' }).BUS_HOSTS),
    ).toBe(false);
  });

  test.each(['http://a', 'a b', 'a:0', 'a:70000', '*'])(
    'a list of the operator with %s does not start',
    (list) => {
      expect(() => parseEnv({ ...process.env, BUS_HOSTS: list })).toThrow(/BUS_HOSTS/);
    },
  );
});

describe('a board without watchdog', () => {
  const heater = (node: string, relay: number) => ({
    ...{
      number: 20 + relay,
      node,
      relay,
      key: `${node}-h${relay}`,
      label: 'Propagator heater',
      contact: 'NO',
    },
    ...{ load: { kind: 'heater', watts: 500, volts: 230, supply: 'ac' }, minOn: 0, minOff: 0 },
  });

  test('takes no heater', async () => {
    await owner.make(`${AT}/nodes`, { ...shown.board, key: 'MB-2' });
    const told = await owner.ask('POST', `${AT}/channels`, heater('MB-2', 1));
    expect([told.status, errorsOf(told)]).toMatchObject([422, [{ path: 'load.kind' }]]);
    expect(told.text).toContain('keeps its last state when the network fails');
    const fan = { ...heater('MB-2', 2), load: { kind: 'motor' } };
    await owner.make(`${AT}/channels`, fan);
    const turned = await owner.ask('PATCH', `${AT}/channels/MB-2-h2`, { load: { kind: 'heater' } });
    expect(turned.status).toBe(422);
  });

  test('cannot be made of one with a heater', async () => {
    const watchdog = { address: 9, value: 1, within: 20 };
    await owner.make(`${AT}/nodes`, {
      ...shown.board,
      key: 'MB-3',
      modbus: { ...shown.board.modbus, watchdog },
    });
    await owner.make(`${AT}/channels`, heater('MB-3', 3));
    const told = await owner.ask('PATCH', `${AT}/nodes/MB-3`, { modbus: shown.board.modbus });
    expect([told.status, errorsOf(told)]).toMatchObject([422, [{ path: 'modbus.watchdog' }]]);
    expect((await owner.get(`${AT}/nodes/MB-3`)).body['modbus']).toMatchObject({ watchdog });
  });
});

describe('a test reading', () => {
  const ask = { table: 'input', address: 0, type: 's16', scale: 0.1, unit: 'Cel' };

  test('is asked by the pages and answered by the worker', async () => {
    await owner.make(`${AT}/nodes`, { ...shown.board, key: 'MB-4' });
    const made = await owner.make(`${AT}/test-reads`, { node: 'MB-4', ...ask });
    expect(made).toMatchObject({ state: 'asked', value: null, unit: 'Cel' });
    const [waiting] = await waitingTestReads(everyHolding());
    expect(waiting?.ask).toMatchObject({ ...ask, wordOrder: 'high-first', offset: 0 });
    if (waiting === undefined) return;
    await answerTestRead(everyHolding(), waiting, { words: [234], raw: 234, value: 23.4, why: null });
    const told = await owner.get(`${AT}/test-reads/${String(made['id'])}`);
    expect(told.body).toMatchObject({ state: 'answered', raw: 234, value: 23.4, why: null });
    expect(await waitingTestReads(everyHolding())).toEqual([]);
  });

  test('that nobody answers is over after a while, in words', async () => {
    const made = await owner.make(`${AT}/test-reads`, { node: 'MB-4', ...ask });
    await everyHolding().execute(sql`update test_read set asked_at = now() - interval '11 seconds'`);
    const told = await owner.get(`${AT}/test-reads/${String(made['id'])}`);
    expect(told.body).toMatchObject({ state: 'failed', value: null });
    expect(told.body['why']).toMatch(/No answer came/);
    expect(await waitingTestReads(everyHolding())).toEqual([]);
  });

  test('is of a board that is there', async () => {
    await owner.make(`${AT}/nodes`, shown.node);
    for (const node of ['LH-1', 'nobody']) {
      const told = await owner.ask('POST', `${AT}/test-reads`, { node, ...ask });
      expect([told.status, errorsOf(told)]).toMatchObject([422, [{ path: 'node' }]]);
    }
  });
});
