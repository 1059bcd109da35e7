import { describe, expect, it } from 'vitest';
import { suggestPoint } from '@/components/wiring/suggest-point';
import { PointCreate } from '@/lib/schema/point';

describe('a name that a node sends is offered as a point', () => {
  it.each([
    ['bench-2', 'Cel', 'bench', 'Bench 2', 'Cel'],
    ['yew-core', 'Cel', 'heap-core', 'Yew core', 'Cel'],
    ['loop_return', 'Cel', 'loop-return', 'Loop return', 'Cel'],
    ['outdoors', 'Far', 'outdoors', 'Outdoors', 'Cel'],
    ['rh.1', '%RH', 'humidity', 'Rh 1', '%RH'],
    ['fan-amps', 'mA', 'current', 'Fan amps', 'A'],
    ['door', '/', 'contact', 'Door', '/'],
    ['co2', 'ppm', 'gas-co2', 'Co2', 'ppm'],
    ['t7', null, 'other', 'T7', 'Cel'],
  ])('%s in %s as %s', (name, unit, role, said, kept) => {
    expect(suggestPoint(name, unit)).toEqual({ key: name, name: said, role, unit: kept });
  });

  it('in a form that the interface takes as it stands', () => {
    const given = { ...suggestPoint('bench-2', 'Cel'), node: 'LH-1' };
    expect(PointCreate.safeParse(given).success).toBe(true);
  });
});
