import { expect, it } from 'vitest';
import { changedWiring, wiringOf, type WiredChannel } from '@/lib/schema/wiring';

const fan: WiredChannel = {
  ...{ node: 'LH-1', relay: 1, contact: 'NO', highLimit: null, runProof: { point: 'fan-amps', above: 0.2 } },
  load: { kind: 'motor', watts: 12, volts: 24, supply: 'dc', contactAmps: 5 },
  fallback: { point: 'bench-1', below: 2, above: 5, onFor: 1200, offFor: 2400 },
};
const changed = (more: Partial<WiredChannel>) => changedWiring(wiringOf(fan), wiringOf({ ...fan, ...more }));

it('the same wiring is the same in whatever order its parts were written down', () => {
  const { kind, watts, ...rest } = fan.load;
  expect(changed({ load: { ...rest, watts, kind } })).toEqual([]);
});

it('a part that is left out is as one that was never there', () => {
  const without: WiredChannel['load'] = { kind: 'motor' };
  expect(
    changedWiring(
      wiringOf({ ...fan, load: without }),
      wiringOf({ ...fan, load: { ...without, watts: undefined } }),
    ),
  ).toEqual([]);
});

it.each<[Partial<WiredChannel>, string[]]>([
  [{ node: 'LH-2', relay: 3 }, ['node', 'relay']],
  [{ contact: 'NC' }, ['contact']],
  [{ load: { ...fan.load, watts: 22 } }, ['load']],
  [{ highLimit: { point: 'bench-1', above: 30 } }, ['highLimit']],
  [{ runProof: null }, ['runProof']],
  [{ fallback: null }, ['fallback']],
  [{ protection: { contactor: true, fuseAmps: 10 } }, ['contactor']],
])('%o is another wiring', (more, parts) => {
  expect(changed(more)).toEqual(parts);
});

it('a test of the residual-current device that is written down is no other wiring', () => {
  expect(changed({ protection: { contactor: false, fuseAmps: 10, rcdTestedOn: '2026-10-01' } })).toEqual([]);
});
