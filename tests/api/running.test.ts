// How a house stands and stood, and what people order.
import { beforeAll, expect, test } from 'vitest';
import { everyHolding, type Holding } from '@/db/client';
import { raiseAlarm } from '@/db/queries/alarm';
import { listPersonCommands } from '@/db/queries/person-command';
import { pointNumbers } from '@/db/queries/point';
import { writeRunning } from '@/db/queries/running';
import { emptyMemory, type Memory } from '@/lib/control/memory';
import { newChannel } from '@/lib/control/fit';
import { sql } from 'drizzle-orm';
import { type Asker, errorsOf, itemsOf, type Json, newHolding, personOf } from './asker';
import { AT, makeLongHouse } from './long-house';
import * as shown from './shown';

const FAN = `${AT}/channels/1`;
let larkmoor: Holding;
let owner: Asker;
let houseId: string;
const channelIds = new Map<string, string>();

beforeAll(async () => {
  larkmoor = await newHolding('larkmoor');
  owner = await personOf(larkmoor, 'owner', 'owner@larkmoor.example');
  houseId = await makeLongHouse(owner);
  const mat = {
    ...shown.vent,
    number: 3,
    relay: 3,
    key: 'mat',
    label: 'Bench mat',
    load: { kind: 'heater' },
  };
  for (const channel of [
    shown.fan,
    shown.vent,
    mat,
    { ...mat, number: 4, relay: 4, key: 'nc', contact: 'NC' },
  ]) {
    channelIds.set(channel.key, String((await owner.make(`${AT}/channels`, channel))['id']));
  }
});

const hand = (body: Json, channel = FAN) => owner.ask('POST', `${channel}/hand`, body);
const lastOrder = async () => (await listPersonCommands(larkmoor, houseId, 0)).at(-1);

/** What the worker would have kept. */
async function keepMemory(frost: boolean, channels: Memory['channels'] = []): Promise<void> {
  const memory = {
    ...{ ...emptyMemory(), channels },
    frost: { on: frost, since: null, blindSince: null, alarm: false },
  };
  const row = { holdingId: larkmoor.id, houseId, memory: { ...memory }, memoryAt: new Date(), taken: 1000 };
  await writeRunning(everyHolding(), { switchings: [], decisions: [], reports: [], memories: [row] });
}

test('a house that control has not looked at yet stands as its wiring lets it stand', async () => {
  const told = await owner.get(`${AT}/state`);
  expect(told.status).toBe(200);
  const channels = told.body['channels'] as Json[];
  expect(channels.map((one) => [one['key'], one['state'], one['claim'], one['mode']])).toContainEqual([
    'nc',
    'on',
    'fail-safe',
    'auto',
  ]);
  expect(told.body['points']).toContainEqual(
    expect.objectContaining({ key: 'bench-1', value: null, quality: 'bad', unit: 'Cel', role: 'bench' }),
  );
  expect(told.body['sources']).toMatchObject([
    { slug: 'gate-heap', credit: 1, restUntil: null, drawnToday: 0 },
  ]);
  expect(await owner.get(`${FAN}/why`)).toMatchObject({
    status: 200,
    body: { claim: 'fail-safe', version: null },
  });
});

test('an order by hand is numbered, and holds half an hour on, an hour off, unless it says', async () => {
  await keepMemory(false);
  const cases: [Json, number][] = [
    [{ state: 'on' }, 1800],
    [{ state: 'off' }, 3600],
    [{ state: 'off', seconds: 43_200, holdInFrost: true }, 43_200],
  ];
  for (const [body, seconds] of cases) {
    expect(await hand(body)).toMatchObject({ status: 200 });
    const order = await lastOrder();
    const { state } = body as { state: string };
    expect(order?.body).toMatchObject({
      kind: 'hand',
      channel: channelIds.get('gate-heap-fan'),
      state,
      seconds,
    });
    expect(order?.by).toBe('owner@larkmoor.example');
  }
});

const wrong: [string, Json, string, string][] = [
  ['no state', {}, 'state', FAN],
  ['a state that is none', { state: 'auto' }, 'state', FAN],
  ['longer than twelve hours', { state: 'off', seconds: 43_201 }, 'seconds', FAN],
  ['no time at all', { state: 'off', seconds: 0 }, 'seconds', FAN],
  ['on held in frost', { state: 'on', holdInFrost: true }, 'holdInFrost', FAN],
  ['a heater for longer than an hour', { state: 'on', seconds: 3601 }, 'seconds', `${AT}/channels/3`],
];
test.each(wrong)('by hand, %s is refused at its field', async (_what, body, path, channel) => {
  const told = await hand(body, channel);
  expect(told.status).toBe(422);
  expect(errorsOf(told)).toMatchObject([{ path }]);
});

test('in frost a channel that helps is turned off only with holdInFrost', async () => {
  await keepMemory(true);
  expect(await hand({ state: 'off' })).toMatchObject({ status: 409 });
  expect(await hand({ state: 'off', holdInFrost: true })).toMatchObject({ status: 200 });
  expect(await hand({ state: 'off' }, `${AT}/channels/2`)).toMatchObject({ status: 200 });
  await keepMemory(false);
});

test('given back, and everything off, are orders too', async () => {
  expect(await owner.ask('DELETE', `${FAN}/hand`)).toMatchObject({ status: 204 });
  expect((await lastOrder())?.body).toMatchObject({ kind: 'auto' });
  expect(await owner.ask('POST', `${AT}/all-off`)).toMatchObject({ status: 200 });
  expect((await lastOrder())?.body).toMatchObject({ kind: 'all-off', seconds: 3600 });
});

test('a lock-out is kept, ordered and removed by an order; on an NC contact it is refused with its reason', async () => {
  const placed = await owner.make(`${AT}/lockouts`, { channel: 'ridge-vent', why: 'arm off' });
  expect((await lastOrder())?.body).toMatchObject({
    kind: 'lock-out',
    lockout: placed['id'],
    why: 'arm off',
  });
  expect(await owner.ask('POST', `${AT}/lockouts`, { channel: 'ridge-vent', why: 'b' })).toMatchObject({
    status: 409,
  });
  const path = `${AT}/lockouts/${String(placed['id'])}`;
  expect(await owner.ask('DELETE', path)).toMatchObject({ status: 204 });
  expect((await lastOrder())?.body).toMatchObject({ kind: 'unlock', lockout: placed['id'] });
  const refused = await owner.ask('POST', `${AT}/lockouts`, { channel: 'nc', why: 'a' });
  expect(refused).toMatchObject({ status: 409, body: { detail: expect.stringMatching(/isolator/) } });
});

test('readings come corrected by the calibration in force at their time', async () => {
  const number = (await pointNumbers(larkmoor, houseId)).get('bench-1')?.number ?? 0;
  const at = Date.now() - 3_600_000;
  await everyHolding().execute(sql`select make_reading_month(${new Date(at).toISOString()}::timestamptz)`);
  for (const [offset, value] of [
    [0, 4],
    [30, 5],
    [60, 6],
  ] as const) {
    const time = new Date(at + offset * 1000).toISOString();
    await everyHolding().execute(
      sql`insert into reading (point, at, value) values (${number}, ${time}::timestamptz, ${value})`,
    );
  }
  const raw = await owner.get(`${AT}/readings?points=bench-1,house-air`);
  expect(raw.body).toMatchObject({
    points: {
      'bench-1': { value: [4, 5, 6], quality: ['good', 'good', 'good'] },
      'house-air': { value: [] },
    },
  });
  await owner.ask('PATCH', `${AT}/points/bench-1`, { offset: 10 });
  const after = await owner.get(`${AT}/readings?points=bench-1`);
  expect(after.body).toMatchObject({ points: { 'bench-1': { value: [4, 5, 6] } } });
  const stepped = (await owner.get(`${AT}/readings?points=bench-1&step=1h`)).body['points'] as Record<
    string,
    Json
  >;
  expect(stepped['bench-1']).toMatchObject({ least: expect.any(Array), greatest: expect.any(Array) });
});

test('readings of a point that is none, or over a span turned round, are refused by name', async () => {
  const bad = ['points=no', 'points=', 'points=bench-1&step=2m', 'points=bench-1&from=yesterday'];
  const paths = ['points', 'points', 'step', 'from'];
  for (const [at, query] of bad.entries()) {
    const told = await owner.get(`${AT}/readings?${query}`);
    expect([told.status, (errorsOf(told) as Json[])[0]?.['path']]).toEqual([422, paths[at]]);
  }
  const turned = await owner.get(
    `${AT}/readings?points=bench-1&from=2026-01-02T00:00:00Z&to=2026-01-01T00:00:00Z`,
  );
  expect(turned.status).toBe(422);
});

test('switchings and why of the past are told from what was stored', async () => {
  const channelId = channelIds.get('gate-heap-fan') ?? '';
  const at = Date.now() - 600_000;
  const head = { holdingId: larkmoor.id, houseId, channelId, at: new Date(at) };
  const id = '018f3f3f-0000-7000-8000-00000000000a';
  await writeRunning(everyHolding(), {
    ...{ decisions: [{ ...head, id, state: 'on', claim: 'band' }], reports: [], memories: [] },
    switchings: [
      {
        ...{ ...head, id, from: 'off', to: 'on', claim: 'band', number: 4_294_967_297, version: 7 },
        explanation: {
          ...{ channel: channelId, at, state: 'on', claim: 'band', until: null, rule: null, next: [] },
          ladder: [
            { claim: 'lock-out', speaks: false },
            { claim: 'band', speaks: true, wants: 'on', because: { point: 'bench-1', latchedAt: at } },
          ],
        },
      },
    ],
  });
  const [told] = itemsOf(await owner.get(`${AT}/switchings?channel=1`));
  expect(told).toMatchObject({
    channel: 1,
    from: 'off',
    to: 'on',
    claim: 'band',
    number: 4_294_967_297,
    version: 7,
  });
  const why = await owner.get(`${FAN}/why?at=${encodeURIComponent(new Date(at + 1000).toISOString())}`);
  const latched = { because: { latchedAt: expect.stringMatching(/^\d{4}-.*(Z|[+-]\d\d:\d\d)$/) } };
  expect(why.body).toMatchObject({ state: 'on', version: 7, ladder: [{ speaks: false }, latched] });
  const before = await owner.get(`${FAN}/why?at=2020-01-01T00:00:00Z`);
  expect(before.status).toBe(404);
});

test('an alarm is acknowledged once, by the first who says so, and stands in the state', async () => {
  const raise = {
    houseId,
    key: 'frost',
    kind: 'frost',
    about: { point: 'bench-1' },
    data: {},
    at: Date.now(),
  };
  await raiseAlarm(larkmoor, raise);
  const [alarm] = itemsOf(await owner.get(`${AT}/alarms`));
  expect((await owner.get(`${AT}/state`)).body['alarms']).toEqual([alarm]);
  const grower = await personOf(larkmoor, 'grower', 'grower@larkmoor.example');
  const path = `/alarms/${String(alarm?.['id'])}/acknowledge`;
  expect(await grower.ask('POST', path, { note: 'on my way' })).toMatchObject({ status: 200 });
  const second = await owner.ask('POST', path, {});
  expect(second.body).toMatchObject({
    acknowledgedBy: 'grower@larkmoor.example',
    events: [{ kind: 'raised' }, { kind: 'acknowledged', note: 'on my way' }],
  });
});

test('nights come as JSON and as a file for a spreadsheet', async () => {
  expect(await owner.get(`${AT}/nights`)).toMatchObject({ status: 200, body: { next: null } });
  const file = await owner.get(`${AT}/nights?format=csv`);
  expect(file.headers.get('content-type')).toMatch(/^text\/csv/);
  expect(file.text).toContain('night,source,');
  expect(await owner.get(`${AT}/nights?source=none`)).toMatchObject({ status: 422 });
});

test('a heater whose sensor is dead is not turned on by hand, and may be turned off', async () => {
  const mat = { ...newChannel(channelIds.get('mat') ?? '', 'off'), pointDeadSince: Date.now() };
  await keepMemory(false, [mat]);
  const told = await hand({ state: 'on' }, `${AT}/channels/3`);
  expect([told.status, told.body['detail']]).toEqual([409, expect.stringContaining('mend the sensor')]);
  expect((await hand({ state: 'off' }, `${AT}/channels/3`)).status).toBe(200);
  await keepMemory(false);
});

test('a vent that is opened in frost is answered with the half an hour that the core gives it', async () => {
  await keepMemory(true);
  const told = await hand({ state: 'on', seconds: 3600 }, `${AT}/channels/2`);
  const [at, until] = [told.body['at'], told.body['until']].map((one) => Date.parse(String(one)));
  expect([told.status, (until ?? 0) - (at ?? 0)]).toEqual([200, 1_800_000]);
  await keepMemory(false);
});
