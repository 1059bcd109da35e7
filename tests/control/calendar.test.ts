import { describe, expect, it } from 'vitest';
import { compileCalendar, compileTimeFacts, place, withinSeason } from '@/lib/control/calendar';
import { dayNumber, sunOn, wallAt, wallInstant } from '@/lib/control/local-day';
import { CHANGES, NIGHT_PERIODS, POLAR, SUN } from '../checks/control';
import { body } from './house';

const at = (iso: string) => Date.parse(iso);
const iso = (instant: number) => new Date(instant).toISOString().replace('.000Z', 'Z');
const zone = (name: string, latitude = 47, longitude = 8) => place({ zone: name, latitude, longitude });

describe('changes of the clock', () => {
  it.each(CHANGES)('%s changes at %s from %i to %i s', (name, instant, before, after) => {
    const where = zone(name);
    expect((wallAt(where, at(instant) - 1) - at(instant) + 1) / 1000).toBe(before);
    expect((wallAt(where, at(instant)) - at(instant)) / 1000).toBe(after);
  });

  it('a time that is skipped begins at the first instant that reads at least it (F-TZ-GAP)', () => {
    const where = zone('Europe/Zurich');
    const day = dayNumber(where, at('2026-03-29T10:00:00Z'));
    expect(iso(wallInstant(where, day, 150))).toBe('2026-03-29T01:00:00Z');
  });

  it('a time that comes twice is its first (F-TZ-FOLD, F-TZ-RFC)', () => {
    const zurich = zone('Europe/Zurich');
    expect(iso(wallInstant(zurich, dayNumber(zurich, at('2026-10-25T10:00:00Z')), 150))).toBe(
      '2026-10-25T00:30:00Z',
    );
    const york = zone('America/New_York');
    expect(iso(wallInstant(york, dayNumber(york, at('2007-11-04T17:00:00Z')), 90))).toBe(
      '2007-11-04T05:30:00Z',
    );
  });

  it.each(NIGHT_PERIODS)('hours 18:00 to 07:00 in %s from %s to %s last %i h', (name, from, to, hours) => {
    const calendar = compileCalendar(body({ hours: { from: '18:00', to: '07:00' } }), zone(name));
    expect(calendar(at(from) - 1).inHours).toBe(false);
    expect(calendar(at(from)).inHours).toBe(true);
    expect(calendar(at(to) - 1).inHours).toBe(true);
    expect(calendar(at(to)).inHours).toBe(false);
    expect((at(to) - at(from)) / 3_600_000).toBe(hours);
  });
});

describe('the sun', () => {
  it.each(SUN)('%s on %s', (_, date, latitude, longitude, name, rise, set) => {
    const where = zone(name, latitude, longitude);
    const sun = sunOn(where, Date.parse(date) / 86_400_000);
    expect(Math.abs((sun.sunrise ?? 0) - at(rise))).toBeLessThan(60_000);
    expect(Math.abs((sun.sunset ?? 0) - at(set))).toBeLessThan(60_000);
  });

  const tromso = zone(POLAR.zone, POLAR.latitude, POLAR.longitude);
  const nightHours = compileCalendar(body({ hours: { from: 'sunset-01:00', to: 'sunrise+01:00' } }), tromso);
  const dayHours = compileCalendar(body({ hours: { from: 'sunrise', to: 'sunset' } }), tromso);

  it('polar night is always within the hours of the night, never of the day', () => {
    for (let hour = 0; hour < 24; hour += 1) {
      const instant = at('2026-12-21T00:30:00Z') + hour * 3_600_000;
      expect([nightHours(instant).inHours, dayHours(instant).inHours]).toEqual([true, false]);
    }
  });

  it('polar day is never within the hours of the night, always of the day', () => {
    for (let hour = 0; hour < 24; hour += 1) {
      const instant = at('2026-06-20T22:30:00Z') + hour * 3_600_000;
      expect([nightHours(instant).inHours, dayHours(instant).inHours]).toEqual([false, true]);
    }
  });

  it('an hour before sunset the period of the evening begins, and holds till the morning one', () => {
    const where = zone('Europe/Zurich', 47.3769, 8.5417);
    const band = [
      { from: 'sunset-01:00', low: 6, high: 9 },
      { from: 'sunrise+00:30', low: 4, high: 7 },
    ];
    const calendar = compileCalendar(body({ band }), where);
    expect(calendar(at('2026-12-21T14:35:00Z')).low).toBe(4);
    expect(calendar(at('2026-12-21T14:40:00Z')).low).toBe(6);
    expect(calendar(at('2026-12-22T07:38:00Z')).low).toBe(6);
    expect(calendar(at('2026-12-22T07:43:00Z')).low).toBe(4);
  });
});

describe('periods, seasons and facts of time', () => {
  it('before the first period of a day the last one holds', () => {
    const band = [
      { from: '06:00', low: 5, high: 8 },
      { from: '20:00', low: 3, high: 6 },
    ];
    const calendar = compileCalendar(body({ band }), zone('Europe/London', 54, -2));
    expect([1, 6, 19, 20].map((hour) => calendar(Date.UTC(2027, 0, 10, hour)).low)).toEqual([3, 5, 5, 3]);
    expect(calendar(Date.UTC(2027, 0, 10, 1)).until).toBe(Date.UTC(2027, 0, 10, 6));
  });

  it('a season over new year holds both its days and leaves out the day after', () => {
    const season = { from: '10-01', to: '04-30' };
    expect(
      ['09-30', '10-01', '12-31', '02-29', '04-30', '05-01'].map((day) => withinSeason(day, season)),
    ).toEqual([false, true, true, true, true, false]);
  });

  it('the last night of a season ends at its midnight', () => {
    const calendar = compileCalendar(body({ season: { from: '10-01', to: '04-30' } }), zone('Europe/Zurich'));
    expect(calendar(at('2027-04-30T21:59:59Z')).inSeason).toBe(true);
    expect(calendar(at('2027-04-30T22:00:00Z')).inSeason).toBe(false);
  });

  it('hour, month and weekday are the house’s own, in a zone of half an hour too', () => {
    const facts = compileTimeFacts(zone('Australia/Lord_Howe', -31.5, 159));
    // 2026-12-31 13:00 UTC is 00:00 of New Year's Day there, a Friday
    expect(facts(at('2026-12-31T13:00:00Z'))).toMatchObject({ hour: 0, month: 1, weekday: 5, sunUp: false });
    expect(facts(at('2026-12-31T12:59:59Z'))).toMatchObject({ hour: 23, month: 12, weekday: 4 });
  });

  it('facts hold till the clock shows another hour, or the sun rises or sets', () => {
    const facts = compileTimeFacts(zone('Europe/Zurich'));
    const untils = ['2026-12-01T10:07:00Z', '2026-03-29T00:20:00Z', '2026-10-25T00:20:00Z'].map((from) =>
      new Date(facts(at(from)).until).toISOString(),
    );
    // at the end of October the clock there shows two o'clock for two hours, at the end of March not at all
    expect(untils).toEqual([
      '2026-12-01T11:00:00.000Z',
      '2026-03-29T01:00:00.000Z',
      '2026-10-25T02:00:00.000Z',
    ]);
  });

  it('the sun is up between sunrise and sunset, after a local midnight too', () => {
    const reykjavik = compileTimeFacts(zone('Atlantic/Reykjavik', 64.1, -21.9));
    expect(reykjavik(at('2026-06-22T00:00:30Z')).sunUp).toBe(true);
    expect(reykjavik(at('2026-06-22T01:30:00Z')).sunUp).toBe(false);
  });
});
