import { describe, expect, it } from 'vitest';
import { monthsAfter, protectionWords, ratingVerdict, rcdTest, rcdWords } from '@/lib/wording/protection';

const plain = (text: string) => text.replaceAll('\u00a0', ' ');
const fan = { kind: 'motor', watts: 12, volts: 24, supply: 'dc', contactAmps: 5 } as const;
const mat = { kind: 'heater', watts: 160, volts: 230, supply: 'ac', contactAmps: 10 } as const;
const guard = {
  ...{ contactor: true, fuseAmps: 10, cableMm2: 1.5, ip: 'IP65', rcdMilliamps: 30 },
  rcdTestedOn: '2026-04-01',
};

describe('the rating of a load', () => {
  it('is shown with its arithmetic', () => {
    const { isFit, words } = ratingVerdict(fan, null, false);
    expect(isFit).toBe(true);
    expect(plain(words)).toBe('12 W ÷ 24 V = 0.50 A of 1.67 A (a third of the contact’s 5 A).');
  });

  it('refuses what is over it, and says by how much', () => {
    const { isFit, words } = ratingVerdict({ ...fan, watts: 60 }, null, false);
    expect(isFit).toBe(false);
    expect(plain(words)).toMatch(/^60 W ÷ 24 V = 2\.50 A is over 1\.67 A \(a third of the contact’s 5 A\)/);
  });

  it('derates direct current over 30 V, a motor’s on top of that', () => {
    const { words } = ratingVerdict({ ...fan, volts: 48, contactAmps: 10 }, null, false);
    expect(plain(words)).toBe(
      '12 W ÷ 48 V = 0.25 A of 0.67 A (a third, and of that a fifth for direct current of the contact’s 10 A).',
    );
  });

  it.each([
    ['watts', { ...fan, watts: undefined }, /rated power/],
    ['contact', { ...fan, contactAmps: undefined }, /the contact’s rating/],
    ['high limit', mat, /needs a high limit/],
  ])('asks for what is missing: %s', (_, load, why) => {
    const { isFit, words } = ratingVerdict(load, null, false);
    expect(isFit).toBe(false);
    expect(words).toMatch(why);
  });

  it('wants to know what protects a mains circuit, part by part, and its fuse to hold', () => {
    expect(ratingVerdict(mat, null, true).words).toMatch(/mains circuit/);
    expect(ratingVerdict(mat, { contactor: true, fuseAmps: 10 }, true).words).toMatch(
      /the cable, the enclosure’s IP mark, the residual-current device, the date of its test/,
    );
    expect(ratingVerdict(mat, guard, true).isFit).toBe(true);
    // 160 W ÷ 230 V = 0.70 A
    expect(plain(ratingVerdict(mat, { ...guard, fuseAmps: 0.5 }, true).words)).toMatch(
      /more than its fuse of 0\.50 A/,
    );
  });
});

describe('a residual-current device', () => {
  it('is due once its months are over, by whoever set them', () => {
    expect(rcdTest(guard, '2026-10-01')).toEqual({ state: 'good', dueOn: '2026-10-01' });
    expect(rcdTest(guard, '2026-10-02').state).toBe('due');
    expect(rcdTest({ ...guard, rcdTestEveryMonths: 12 }, '2026-10-02').state).toBe('good');
    expect(rcdTest({ contactor: false, fuseAmps: 6, rcdMilliamps: 30 }, '2026-10-02').state).toBe('never');
    expect(rcdWords(guard, '2026-11-20')).toBe(
      'The residual-current device was last tested on 2026-04-01; a test is due since 2026-10-01 (6 months is common practice; local code decides).',
    );
  });

  it.each([
    ['2026-08-31', 6, '2027-02-28'],
    ['2023-08-31', 6, '2024-02-29'],
    ['2026-12-15', 1, '2027-01-15'],
  ])('%s and %i months is %s', (date, months, due) => {
    expect(monthsAfter(date, months)).toBe(due);
  });

  it('is told with all that stands before the load', () => {
    expect(plain(protectionWords(guard))).toBe(
      'behind an enclosed contactor, fuse 10 A, cable 1.5 mm², IP65, RCD 30 mA',
    );
  });
});
