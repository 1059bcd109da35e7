// Calibration against worked figures and published points of boiling water.
import { describe, expect, it } from 'vitest';
import { correctionOf, residualOf, unusual, type CalibrationPlace } from '@/lib/analysis/calibrate';
import { boilingPoint, referenceOf } from '@/lib/analysis/reference-place';

const at = (reference: number, raw: number, more: Partial<CalibrationPlace> = {}): CalibrationPlace => ({
  ...{ at: 'thermometer', reference, raw, referenceSd: 0.1, rawSd: 0, readings: 10 },
  ...more,
});

describe('boiling water', () => {
  // SOURCE: IAPWS R7-97 (2012), table 35: T(0.1 MPa) = 372.755919 K. The Handbook’s formula differs from it by hundredths.
  it('at 0.1 MPa is at 99.606 °C', () => {
    expect(boilingPoint(100_000)).toBeCloseTo(99.606, 1);
  });
  // SOURCE: steam tables after IAPWS-IF97, from memory: 75 kPa 91.76 °C, 101.325 kPa 99.97 °C.
  it.each([
    [75_000, 91.76],
    [101_325, 99.97],
  ])('at %i Pa is at %d °C', (pressure, celsius) => {
    expect(Math.abs(boilingPoint(pressure) - celsius)).toBeLessThan(0.03);
  });
  it('at 310 m boils a degree lower than at the sea, and the weather moves it by some tenths', () => {
    const there = referenceOf('boiling', 310);
    // 3.6 kPa less air (ASHRAE eq. 3: 97.65 kPa) at 36.2 hPa/K: 1.03 K
    expect(there.reference).toBeCloseTo(98.95, 1);
    // 10 hPa at 35 hPa/K
    expect(there.referenceSd).toBeCloseTo(0.28, 1);
  });
  it('is no reference for ice, which holds nought at any height', () => {
    expect(referenceOf('ice', 3000)).toEqual({ reference: 0, referenceSd: 0.1 });
  });
});

describe('a correction', () => {
  it('through one place is an offset, and leaves the gain', () => {
    expect(correctionOf([at(0, 0.4)], 1)).toEqual({ gain: 1, offset: -0.4 });
    expect(correctionOf([at(0, 0.5)], 1.02)).toEqual({ gain: 1.02, offset: -0.51 });
  });
  it('through two places makes both read true', () => {
    // worked by hand: (40.2 − 0) ÷ (39.8 + 0.2) = 1.005; 0 + 0.2 × 1.005 = 0.201
    const { gain, offset } = correctionOf([at(0, -0.2), at(40.2, 39.8)], 1);
    expect(gain).toBeCloseTo(1.005, 12);
    expect(offset).toBeCloseTo(0.201, 12);
    expect(39.8 * gain + offset).toBeCloseTo(40.2, 12);
  });
  it('does not care which place came first', () => {
    const both = [at(0, -0.2), at(40.2, 39.8)];
    const [one, other] = [correctionOf(both, 1), correctionOf(both.toReversed(), 1)];
    expect(one.gain).toBeCloseTo(other.gain, 12);
    expect(one.offset).toBeCloseTo(other.offset, 12);
  });
  it('is refused through two places that lie close, by what is true or by what was read', () => {
    expect(() => correctionOf([at(0, 0), at(9, 9)], 1)).toThrow(RangeError);
    expect(() => correctionOf([at(0, 0), at(40, 0.5)], 1)).toThrow(RangeError);
    expect(() => correctionOf([], 1)).toThrow(RangeError);
  });
});

describe('what is left', () => {
  it('is the reference’s deviation and that of the mean, as the root of the sum of squares', () => {
    // √(0.1² + (0.24 ÷ √9)²) = √(0.01 + 0.0064) = 0.128062
    expect(residualOf([at(0, 0, { rawSd: 0.24, readings: 9 })], 1)).toBeCloseTo(0.128062, 6);
  });
  it('is that of the worse place', () => {
    expect(residualOf([at(0, 0), at(99, 99, { referenceSd: 0.28 })], 1)).toBeCloseTo(0.28, 12);
  });
});

describe('what is asked about', () => {
  it('is a correction over 3 K and a gain outside 0.9 to 1.1', () => {
    expect(unusual({ gain: 1, offset: -3 }, [at(0, 3)])).toEqual([]);
    expect(unusual({ gain: 1, offset: -3.1 }, [at(0, 3.1)])).toEqual([{ what: 'far', kelvin: -3.1 }]);
    expect(unusual({ gain: 1.1, offset: 0 }, [at(0, 0)])).toEqual([]);
    expect(unusual({ gain: 0.89, offset: 0 }, [at(0, 0)])).toEqual([{ what: 'gain', gain: 0.89 }]);
  });
  it('looks at the place where the correction is greatest', () => {
    expect(unusual({ gain: 1.05, offset: 0 }, [at(0, 0), at(84, 80)])).toEqual([{ what: 'far', kelvin: 4 }]);
  });
});
