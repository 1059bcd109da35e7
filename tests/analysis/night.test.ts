import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { hoursBetween, nightBefore, nightNamed, nightOf, nightsBetween } from '@/lib/analysis/night';
import { nightLengths } from '../checks/nights';

const iso = (ms: number) => new Date(ms).toISOString().replace('.000', '');

describe('nights', () => {
  it.each(nightLengths)(
    'run from noon to noon in %s, %s, whatever the clock does',
    (zone, name, from, to, hours) => {
      const night = nightNamed(name, zone);
      expect([iso(night.from), iso(night.to), hoursBetween(night.from, night.to)]).toEqual([from, to, hours]);
    },
  );

  it('begin at noon sharp', () => {
    const noon = Date.parse('2026-11-26T12:00:00Z');
    expect(nightOf(noon, 'Europe/London').night).toBe('2026-11-26');
    expect(nightOf(noon - 1, 'Europe/London').night).toBe('2026-11-25');
  });

  it('are named by their evening, on the far side of midnight too', () => {
    expect(nightOf(Date.parse('2026-11-27T03:00:00Z'), 'Europe/London').night).toBe('2026-11-26');
  });

  it('follow one another without gap or overlap over both changes of the clock', () => {
    const nights = nightsBetween(
      Date.parse('2026-01-01T00:00:00Z'),
      Date.parse('2026-12-31T00:00:00Z'),
      'Australia/Lord_Howe',
    );
    expect(nights.length).toBe(365);
    for (const [i, night] of nights.entries()) if (i > 0) expect(night.from).toBe(nights[i - 1]?.to);
  });

  it('hold each instant in exactly the night that is named for it', () => {
    const instant = fc.integer({ min: Date.parse('1990-01-01'), max: Date.parse('2060-01-01') });
    const zone = fc.constantFrom(
      'Europe/London',
      'America/St_Johns',
      'Australia/Lord_Howe',
      'Asia/Kathmandu',
    );
    fc.assert(
      fc.property(instant, zone, (at, where) => {
        const night = nightOf(at, where);
        expect(night.from <= at && at < night.to).toBe(true);
        expect(nightNamed(night.night, where)).toEqual(night);
      }),
    );
  });

  it('are counted back by date, over the end of a month', () => {
    expect(nightBefore('2026-12-01', 34)).toBe('2026-10-28');
  });

  it.each(['2026-02-30', 'today', '2026-11-26T00:00'])('refuse %s as a name', (name) => {
    expect(() => nightNamed(name, 'Europe/London')).toThrow(RangeError);
  });
});
