import { describe, expect, it } from 'vitest';
import { t95 } from '@/lib/analysis/student';

describe('Student’s t at 97.5 %', () => {
  // NIST/SEMATECH e-Handbook of Statistical Methods, 1.3.6.7.2, upper critical values of Student's t
  it.each([
    [1, 12.706],
    [2, 4.303],
    [3, 3.182],
    [4, 2.776],
    [5, 2.571],
    [10, 2.228],
    [20, 2.086],
    [30, 2.042],
    [60, 2.0],
    [100, 1.984],
  ])('with %i degrees of freedom is %f, as the table has it', (degrees, value) => {
    expect(t95(degrees)).toBeCloseTo(value, 3);
  });

  it('comes to the normal curve’s where there are many', () => {
    expect(t95(1e6)).toBeCloseTo(1.959964, 4);
  });

  it('takes the wider interval for a fraction', () => expect(t95(4.9)).toBe(t95(4)));
  it('has none under one degree', () => expect(() => t95(0.9)).toThrow(RangeError));
});
