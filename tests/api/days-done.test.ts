// A day on which something was done is no day yet to come, by the calendar of the house: two houses that never share a day.
import { DateTime } from 'luxon';
import { beforeAll, expect, test } from 'vitest';
import { type Asker, errorsOf, type Json, newHolding, personOf } from './asker';
import * as shown from './shown';

const EAST = { slug: 'long-house', heap: 'gate-heap', zone: 'Pacific/Kiritimati' }; // UTC+14
const WEST = { slug: 'far-house', heap: 'yew-heap', zone: 'Pacific/Pago_Pago' }; // UTC−11
type Where = typeof EAST;
const at = (house: Where) => `/houses/${house.slug}`;
const dayIn = (zone: string, plus = 0) => DateTime.now().setZone(zone).plus({ days: plus }).toISODate() ?? '';

let owner: Asker;
const costs = new Map<string, string>();
beforeAll(async () => {
  owner = await personOf(await newHolding('larkmoor'), 'owner', 'owner@larkmoor.example');
  await owner.make('/houses', { ...shown.house, zone: EAST.zone });
  await owner.make('/houses', { ...shown.house, name: 'Far house', zone: WEST.zone });
  for (const house of [EAST, WEST]) {
    await owner.make(`${at(house)}/nodes`, shown.node);
    await owner.make(`${at(house)}/sources`, { name: house.heap.replace('-', ' '), kind: 'heap' });
    await owner.make(`${at(house)}/channels`, bare(1, 1));
    const made = await owner.make(`${at(house)}/heap-costs`, costOn(house, '2026-10-03'));
    costs.set(house.slug, String(made['id']));
  }
});

const { node, contact, load, minOn, minOff } = shown.fan;
const bare = (number: number, relay: number) => ({
  ...{ node, contact, load, minOn, minOff, number, relay, key: `fan-${number}`, label: `Fan ${number}` },
});
const testedOn = (day: string) => ({ contactor: true, fuseAmps: 6, rcdMilliamps: 30, rcdTestedOn: day });
const seenOn = (day: string) => ({ lastResort: { below: 1, provedOn: day } });
const costOn = ({ heap }: Where, day: string) => ({ source: heap, kind: 'pipe', on: day, amount: '85' });

let next = 1;
type Ask = (house: Where, day: string) => [string, string, Json];
const bodies: [string, string, Ask][] = [
  [
    'a new channel’s residual-current device was tested',
    'protection.rcdTestedOn',
    (house, day) => {
      next += 1;
      const fan = { ...bare(next, (next % 3) + 2), protection: testedOn(day) };
      return ['POST', `${at(house)}/channels`, fan];
    },
  ],
  [
    'a channel’s residual-current device was tested',
    'protection.rcdTestedOn',
    (house, day) => ['PATCH', `${at(house)}/channels/1`, { protection: testedOn(day) }],
  ],
  [
    'the device of a reversing vent was tested',
    'protection.rcdTestedOn',
    (house, day) => [
      'POST',
      `${at(house)}/reversing-vents`,
      {
        ...{ node, key: 'side', label: 'Side vent', longestOn: 90, deadTime: 2, protection: testedOn(day) },
        ...{ open: { number: 11, relay: 5 }, shut: { number: 12, relay: 6 }, load: { watts: 40, volts: 24 } },
      },
    ],
  ],
  [
    'the thermostat of last resort was seen to work',
    'lastResort.provedOn',
    (house, day) => ['PATCH', at(house), seenOn(day)],
  ],
  ['a cost was paid', 'on', (house, day) => ['POST', `${at(house)}/heap-costs`, costOn(house, day)]],
  [
    'a cost that was entered wrong was paid',
    'on',
    (house, day) => ['PUT', `${at(house)}/heap-costs/${costs.get(house.slug) ?? ''}`, costOn(house, day)],
  ],
];

test.each(bodies)('the day on which %s has come where the house stands', async (_what, path, asks) => {
  const ask = async (house: Where, day: string) => owner.ask(...asks(house, day));
  for (const [house, day] of [
    [EAST, dayIn(EAST.zone, 2)],
    // the day that it is in the east is yet to come in the west
    [WEST, dayIn(EAST.zone)],
  ] as const) {
    const told = await ask(house, day);
    expect([told.status, errorsOf(told)]).toEqual([
      422,
      [{ path, message: expect.stringMatching(/^That day is yet to come: give the day on which .*\.$/) }],
    ]);
  }
  for (const house of [EAST, WEST]) expect((await ask(house, dayIn(house.zone))).status).toBeLessThan(300);
});

test('a refused day changes nothing', async () => {
  const fan = `${at(WEST)}/channels/1`;
  const before = (await owner.get(fan)).body;
  await owner.ask('PATCH', fan, { label: 'Another fan', protection: testedOn(dayIn(EAST.zone)) });
  expect((await owner.get(fan)).body).toEqual(before);
});
