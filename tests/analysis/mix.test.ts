import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { COMMON_MATERIALS } from '@/lib/analysis/common-materials';
import { findMaterial, heapMix, ofCommon } from '@/lib/analysis/material-book';
import { addForCn, addForMoisture, adviseAddition, mixOf, mixSd, WATER, withAdded } from '@/lib/analysis/mix';
import { cornellCn, cornellMoisture } from '../checks/heap-book';

const { grass, leaves } = cornellMoisture;
const massOf = (addition: ReturnType<typeof addForCn>) => (addition.kind === 'add' ? addition.massKg : null);

describe('a mix', () => {
  it('is brought to a moisture as in Cornell’s worked example', () => {
    const added = massOf(addForMoisture(mixOf([grass]), cornellMoisture.target, leaves));
    expect(Math.abs((added ?? 0) - cornellMoisture.leavesKg)).toBeLessThan(0.05);
  });

  it('is brought to a C:N by the masses of carbon and nitrogen', () => {
    const added = massOf(addForCn(mixOf([grass]), cornellCn.target, leaves));
    expect(Math.abs((added ?? 0) - cornellCn.leavesKg)).toBeLessThan(0.005);
  });

  it('does not meet both goals with two materials, and says where the other comes out', () => {
    const advice = adviseAddition(mixOf([grass]), { cn: 30, moisture: 0.6 }, leaves);
    expect(advice.cnAtMoisture).toBeCloseTo(cornellCn.cnOfMoistureMix, 1);
    expect(advice.moistureAtCn).toBeCloseTo(cornellCn.moistureOfCnMix, 3);
    expect(advice.both).toBeNull();
  });

  it('meets both with water as a third where it comes out too dry', () => {
    const dry = mixOf([{ ...grass, massKg: 10, moisture: 0.4 }]);
    const both = adviseAddition(dry, { cn: 30, moisture: 0.6 }, leaves).both;
    const made = withAdded(dry, leaves, both?.massKg ?? 0, both?.waterL ?? 0);
    expect([made.cn, made.moisture].map((one) => one?.toFixed(6))).toEqual(['30.000000', '0.600000']);
  });

  it('is never an average of ratios', () => {
    const { correct, naive } = cornellCn.equalMasses;
    const cn = mixOf([grass, { ...leaves, massKg: 10 }]).cn ?? 0;
    expect(Math.abs(cn - correct)).toBeLessThan(0.02);
    expect(Math.abs(cn - naive)).toBeGreaterThan(1);
  });

  it('is what it is made of, in whatever order and by whatever steps', () => {
    const part = fc.record({
      massKg: fc.double({ min: 1, max: 5000, noNaN: true }),
      moisture: fc.double({ min: 0.05, max: 0.9, noNaN: true }),
      carbon: fc.double({ min: 0.2, max: 0.55, noNaN: true }),
      nitrogen: fc.double({ min: 0.001, max: 0.08, noNaN: true }),
    });
    fc.assert(
      fc.property(fc.array(part, { minLength: 1, maxLength: 6 }), part, (parts, more) => {
        const whole = mixOf([...parts, more]);
        const stepwise = withAdded(mixOf(parts), more, more.massKg);
        expect(stepwise.cn ?? 0).toBeCloseTo(whole.cn ?? 0, 6);
        const ratios = [...parts, more].map((one) => one.carbon / one.nitrogen);
        expect(whole.cn ?? 0).toBeGreaterThanOrEqual(Math.min(...ratios) - 1e-9);
        expect(whole.cn ?? 0).toBeLessThanOrEqual(Math.max(...ratios) + 1e-9);
        const reached = addForMoisture(whole, 0.6, WATER);
        if (reached.kind === 'add')
          expect(withAdded(whole, WATER, reached.massKg).moisture ?? 0).toBeCloseTo(0.6, 9);
      }),
    );
  });

  it('cannot be dried with water, nor brought up to a C:N by what is under it', () => {
    expect(addForMoisture(mixOf([grass]), 0.6, WATER)).toEqual({ kind: 'cannot' });
    expect(addForCn(mixOf([grass]), 30, { ...leaves, nitrogen: 0.05 })).toEqual({ kind: 'cannot' });
    expect(addForCn(mixOf([grass]), 30, WATER)).toEqual({ kind: 'cannot' });
  });

  it('is as uncertain as its materials, and surer of what is mixed of many', () => {
    const sd = { moisture: 0.05, carbon: 0.02, nitrogen: 0.004 };
    const one = mixSd([{ ...grass, sd }]);
    const four = mixSd([1, 2, 3, 4].map(() => ({ ...grass, sd })));
    expect(one.moisture).toBeCloseTo(0.05, 9);
    expect((four.moisture ?? 1) / (one.moisture ?? 1)).toBeCloseTo(0.5, 6);
    expect(four.cn ?? 0).toBeLessThan(one.cn ?? 0);
  });
});

describe('the materials', () => {
  it('keep their typical figures inside the ranges found, with carbon under what dry matter can hold', () => {
    for (const common of COMMON_MATERIALS) {
      for (const ranged of [
        common.nitrogen,
        common.cn,
        common.moisture,
        common.density ?? ([1, 1, 1] as const),
      ])
        expect([common.name, ranged[1] <= ranged[0] && ranged[0] <= ranged[2]]).toEqual([common.name, true]);
      const { carbon } = ofCommon(common);
      expect([common.name, carbon > 0.15 && carbon <= 0.6]).toEqual([common.name, true]);
    }
  });

  it('are found by any of their names, none of which is another’s', () => {
    const names = COMMON_MATERIALS.flatMap((one) => [one.name, ...one.also]);
    expect(new Set(names).size).toBe(names.length);
    expect(findMaterial(' Horse bedding ', [])?.name).toBe('horse manure with straw');
    expect(findMaterial('Brewers’ grains', [])?.name).toBe('brewers’ grains');
    expect(findMaterial('moon dust', [])).toBeNull();
  });

  it('of the holding go before the common ones of the same name', () => {
    const own = [{ name: 'Leaves', density: 90, moisture: 0.2, carbon: 0.48, nitrogen: 0.01 }];
    expect(findMaterial('leaves', own)).toMatchObject({ moisture: 0.2, source: 'own' });
  });
});

describe('what went into a heap', () => {
  it('adds up by name, makes masses of volumes by density, and counts the water', () => {
    const mix = heapMix(
      [
        { materials: [{ material: 'Leaves', litres: 1000 }], litresOfWater: 40 },
        { materials: [{ material: 'leaves', kilograms: 30 }], litresOfWater: null },
      ],
      [],
    );
    expect(mix.parts).toMatchObject([{ name: 'Leaves', massKg: 150, isFromVolume: true }]);
    expect(mix.mix.waterKg).toBeCloseTo(150 * 0.38 + 40, 9);
  });

  it('leaves out what nobody knows, and says so', () => {
    const materials = [
      { material: 'leaves', kilograms: 100 },
      { material: 'moon dust', kilograms: 300 },
      { material: 'straw' },
    ];
    const mix = heapMix([{ materials, litresOfWater: null }], []);
    expect(mix.left).toEqual(['moon dust', 'straw']);
    expect(mix.knownShare).toBe(0.25);
    expect(mix.mix.cn).toBeCloseTo(54, 6);
  });
});
