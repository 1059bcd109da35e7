// What no form lets through, sent by a program: every field of wiring with what cannot be meant.
import { beforeAll, describe, expect, test } from 'vitest';
import { newHolding, personOf, type Asker, type Json } from './asker';
import { badBodies, fault } from './bad-values';
import { AT, makeLongHouse } from './long-house';
import * as shown from './shown';

let owner: Asker;
beforeAll(async () => {
  owner = await personOf(await newHolding('larkmoor'), 'owner', 'owner@larkmoor.example');
  await makeLongHouse(owner);
  await owner.make(`${AT}/nodes`, shown.board);
  await owner.make(`${AT}/channels`, shown.fan);
  await owner.make(`${AT}/channels`, shown.vent);
});

const free = { number: 9, relay: 8, key: 'free', runProof: null };
const fullFan = {
  ...shown.fan,
  ...free,
  longestOn: 3600,
  highLimit: { point: 'bench-1', above: 60 },
  runProof: shown.fan.runProof,
  protection: {
    ...{ contactor: true, fuseAmps: 6, cableMm2: 1.5, ip: 'IP65' },
    ...{ rcdMilliamps: 30, rcdTestedOn: '2026-11-01', rcdTestEveryMonths: 6 },
  },
};
const modbus = {
  ...shown.board,
  key: 'MB-9',
  modbus: { ...shown.board.modbus, watchdog: { address: 9, value: 1, within: 20 } },
};
const broker = { host: '127.0.0.1', port: 8883, tls: true, ca: null, user: 'middenward', password: 'sleet' };
const place = { at: 'thermometer', reference: 20, referenceSd: 0.1, raw: 20.4, rawSd: 0.02, readings: 12 };

const BODIES: [string, Json][] = [
  ['houses', { ...shown.house, name: 'Other house', lastResort: { below: 1, provedOn: '2026-11-01' } }],
  [`${AT}/nodes`, { ...shown.node, key: 'LH-9' }],
  [`${AT}/nodes`, modbus],
  [`${AT}/nodes`, { key: 'MQ-9', kind: 'mqtt', reportEvery: 30, channels: 4, mqtt: broker }],
  [`${AT}/test-reads`, { node: 'MB-1', ...shown.board.registers[0], point: undefined }],
  [`${AT}/points`, { ...shown.bench, key: 'new' }],
  [`${AT}/points`, { ...shown.lift, key: 'new', derived: { ...shown.lift.derived, window: 600 } }],
  [`${AT}/points/bench-1/calibrations`, { places: [place], note: 'in a bucket', acceptUnusual: false }],
  [`${AT}/points/bench-1/exchange`, { with: 'house-air' }],
  [`${AT}/sources`, { ...shown.source, name: 'Yew heap' }],
  [`${AT}/channels`, fullFan],
  [`${AT}/loops`, shown.loop],
  [`${AT}/interlocks`, shown.interlock],
  [`${AT}/lockouts`, { channel: 'ridge-vent', why: 'bearing' }],
  [
    `${AT}/reversing-vents`,
    {
      ...{ node: 'LH-1', key: 'side', label: 'Side vent', longestOn: 90, deadTime: 2, startsPerHour: 6 },
      ...{ open: { number: 11, relay: 5 }, shut: { number: 12, relay: 6 }, load: { watts: 40, volts: 24 } },
    },
  ],
];

const path = (list: string) => (list.startsWith('/') ? list : `/${list}`);

describe.each(BODIES)('A body for %s', (list, body) => {
  test('with a field that cannot be meant is refused, by its name and with what to give', async () => {
    const wrong: string[] = [];
    for (const { field, what, bad } of badBodies(body)) {
      const found = fault(await owner.ask('POST', path(list), bad), field);
      if (found !== null) wrong.push(`${field} ${what}: ${found}`);
    }
    expect(wrong).toEqual([]);
  });
});
