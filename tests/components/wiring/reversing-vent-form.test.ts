import { expect, it } from 'vitest';
import type { Yard } from '@/components/wiring/forms/options';
import { KINDS } from '@/components/wiring/kinds';
import { bodyOf, valuesOf } from '@/components/wiring/spec';
import { ReversingVentCreate } from '@/lib/schema/reversing-vent';
import { USUAL } from '@/lib/units/preferences';

const yard = { nodes: [{ key: 'LH-1', channels: 8 }], channels: [{ number: 3 }] } as unknown as Yard;
const of = KINDS['reversing-vent'];
const groups = of.groups(yard, null);
const vent = {
  ...{ node: 'LH-1', key: 'north-vent', label: 'North vent' },
  ...{ open: { number: 4, relay: 5 }, shut: { number: 5, relay: 6 } },
  load: { watts: 60, volts: 230, supply: 'ac', contactAmps: 10 },
  ...{ longestOn: 200, deadTime: 2, startsPerHour: 12 },
  protection: { fuseAmps: 6, contactor: true, ip: 'IP65' },
};

it('the form of a reversing vent asks for all that the interface takes, and sends it as it was typed', () => {
  const { body, errors } = bodyOf(groups, valuesOf(groups, vent, USUAL), USUAL);
  expect(errors).toEqual({});
  expect(body).toEqual(vent);
  expect(Object.keys(body).sort()).toEqual(Object.keys(ReversingVentCreate.shape).sort());
});

it('a new form has the next two numbers, a node with two relays, and no relay or longest run guessed', () => {
  const first = valuesOf(groups, of.first(yard), USUAL);
  const { body, errors } = bodyOf(groups, first, USUAL, first);
  expect(body).toMatchObject({
    ...{ node: 'LH-1', open: { number: 4 }, shut: { number: 5 }, deadTime: 2 },
    ...{ startsPerHour: null, protection: null },
  });
  expect(Object.keys(errors).sort()).toEqual(['key', 'label', 'longestOn', 'open.relay', 'shut.relay']);
});
