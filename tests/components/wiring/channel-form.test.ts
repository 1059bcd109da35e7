import { expect, it } from 'vitest';
import { channelGroups } from '@/components/wiring/forms/channel';
import type { Yard } from '@/components/wiring/forms/options';
import { bodyOf, issuesOf, valuesOf } from '@/components/wiring/spec';
import { ChannelCreate } from '@/lib/schema/channel';
import { USUAL } from '@/lib/units/preferences';

const yard = { points: [], nodes: [], sources: [], channels: [] } as unknown as Yard;
const channel = {
  ...{ number: 1, node: 'LH-1', relay: 1, key: 'fan', label: 'Fan', source: null, frostHelp: true },
  ...{ contact: 'NO', load: { kind: 'motor', watts: 12 }, minOn: 120, minOff: 120 },
  ...{ startsPerHour: 6, longestOn: 5400 },
  highLimit: { point: 'bench', above: 28 },
  runProof: { point: 'fan-amps', above: 0.2 },
  fallback: { point: 'bench', below: 2, above: 5, onFor: 1200, offFor: 2400 },
  flow: { litresPerSecond: 42.5, from: 'measured', sd: 4 },
  protection: {
    ...{ contactor: true, fuseAmps: 10, cableMm2: 1.5, ip: 'IP65', rcdMilliamps: 30 },
    ...{ rcdTestedOn: '2026-10-02', rcdTestEveryMonths: 6 },
  },
};
const groups = channelGroups(yard);

it('the form of a channel holds all that the interface knows of one, and sends it back unchanged', () => {
  const { body, errors } = bodyOf(groups, valuesOf(groups, channel, USUAL), USUAL);
  expect(errors).toEqual({});
  expect(body).toEqual(channel);
  expect(Object.keys(body).sort()).toEqual(Object.keys(ChannelCreate.shape).sort());
});

it('a channel without limits and proofs is sent without any', () => {
  const bare = {
    longestOn: null,
    startsPerHour: null,
    highLimit: null,
    runProof: null,
    fallback: null,
    flow: null,
    protection: null,
  };
  const first = valuesOf(groups, { ...channel, ...bare }, USUAL);
  expect(bodyOf(groups, first, USUAL, first)).toMatchObject({ body: bare, errors: {} });
});

it('each limit and each proof says what it does', () => {
  const folded = groups.filter((group) => group.folded !== undefined);
  expect(folded.map((group) => group.title)).toHaveLength(6);
  for (const group of folded) expect(group.note).toMatch(/\w.*\.$/);
});

it('a refused day of a test stands at the field that asks for it', () => {
  const path = ['protection', 'rcdTestedOn'];
  expect(issuesOf([{ path, message: 'That day is yet to come.' }], groups)).toEqual({
    'protection.rcdTestedOn': 'That day is yet to come.',
  });
});
