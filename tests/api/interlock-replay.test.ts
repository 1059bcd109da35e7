// What a drafted interlock would have prevented, out of what the loads did.
import { v7 as uuid } from 'uuid';
import { beforeAll, expect, test } from 'vitest';
import { everyHolding, type Holding } from '@/db/client';
import { writeRunning } from '@/db/queries/running';
import { type Asker, errorsOf, type Json, newHolding, personOf } from './asker';
import * as shown from './shown';

const AT = '/houses/long-house';
let larkmoor: Holding;
let installer: Asker;
const ids = new Map<string, string>();
/** On a whole minute, an hour ago at least. */
const BEGIN = Math.floor((Date.now() - 2 * 3_600_000) / 60_000) * 60_000;

beforeAll(async () => {
  larkmoor = await newHolding('larkmoor');
  installer = await personOf(larkmoor, 'installer', 'installer@larkmoor.example');
  await installer.make('/houses', shown.house);
  await installer.make(`${AT}/nodes`, shown.node);
  for (const point of [...shown.otherPoints, shown.bench]) await installer.make(`${AT}/points`, point);
  await installer.make(`${AT}/sources`, shown.source);
  for (const channel of [shown.fan, shown.vent])
    ids.set(channel.key, String((await installer.make(`${AT}/channels`, channel))['id']));
  // the fan from minute 0 to 30, the vent from 20 to 40: ten minutes of both
  const report = (key: string, minute: number, state: 'on' | 'off') => ({
    id: uuid(),
    ...{ holdingId: larkmoor.id, channelId: ids.get(key) ?? '', state, number: 1 },
    at: new Date(BEGIN + minute * 60_000),
  });
  await writeRunning(everyHolding(), {
    ...{ switchings: [], decisions: [], memories: [] },
    reports: [
      report('gate-heap-fan', 0, 'on'),
      report('ridge-vent', 20, 'on'),
      report('gate-heap-fan', 30, 'off'),
      report('ridge-vent', 40, 'off'),
    ],
  });
});

const replay = (query: string) => installer.get(`${AT}/interlock-replay?${query}`);
const both = 'channel=ridge-vent&other=gate-heap-fan';

test('both at once is told with its time, night by night', async () => {
  const told = await replay(`${both}&kind=never-with`);
  expect(told).toMatchObject({ status: 200, body: { count: 1, seconds: 600 } });
  const longest = told.body['longest'] as Record<string, string>;
  expect(Date.parse(longest['from'] ?? '')).toBe(BEGIN + 20 * 60_000);
  expect(Date.parse(longest['to'] ?? '')).toBe(BEGIN + 30 * 60_000);
  const nights = told.body['nights'] as Json[];
  expect(nights).toHaveLength(7);
  expect(nights.reduce((sum, one) => sum + Number(one['seconds']), 0)).toBe(600);
});

test('a need counts the run without the other, and the wait', async () => {
  expect((await replay(`${both}&kind=needs`)).body).toMatchObject({ count: 1, seconds: 600 });
  expect((await replay(`channel=gate-heap-fan&other=ridge-vent&kind=needs&delay=60`)).body).toMatchObject({
    count: 1,
    seconds: 21 * 60,
  });
});

test.each([
  ['a channel that is not there', 'channel=nowhere&other=gate-heap-fan&kind=needs', 'channel'],
  ['another that is not there', 'channel=ridge-vent&other=nowhere&kind=needs', 'other'],
  ['no kind', both, 'kind'],
  ['an unknown kind', `${both}&kind=sometimes`, 'kind'],
  ['a wait that is no number', `${both}&kind=needs&delay=long`, 'delay'],
  ['a wait without end', `${both}&kind=needs&delay=1e9`, 'delay'],
  ['a key with a quote', `channel=a'b&other=c&kind=needs`, 'channel'],
])('%s is refused at its field', async (_, query, path) => {
  const told = await replay(query);
  expect(told.status).toBe(422);
  expect((errorsOf(told) as Json[]).map((one) => one['path'])).toContain(path);
});
