/** Clocks that change, years that end, and a sun that stays up or down, against another way of reckoning. */
import { describe, expect, it } from 'vitest';
import { compileCalendar, compileTimeFacts, place } from '@/lib/control/calendar';
import { dayNumber, wallInstant } from '@/lib/control/local-day';
import { CHANGES, POLAR } from '../checks/control';
import { body, H, MIN } from './house';

const at = (iso: string) => Date.parse(iso);
const zone = (name: string, latitude = 47, longitude = 8) => place({ zone: name, latitude, longitude });
const tromso = () => zone(POLAR.zone, POLAR.latitude, POLAR.longitude);

/** What a clock on the wall shows, by the browser's own calendar: `2026-03-29 02:30`. */
function wallClock(name: string): (instant: number) => string {
  const format = new Intl.DateTimeFormat('sv-SE', {
    timeZone: name,
    ...{ year: 'numeric', month: '2-digit', day: '2-digit', hour: '2-digit', minute: '2-digit' },
  });
  return (instant) => format.format(instant);
}

describe('every quarter of an hour of a day on which the clock changes', () => {
  it.each(CHANGES)(
    'in %s at %s begins at the first instant whose clock shows it, or more',
    (name, change) => {
      const where = zone(name);
      const shows = wallClock(name);
      const minutes = Array.from({ length: 50 * 60 }, (_, index) => at(change) - 25 * H + index * MIN);
      const shown = minutes.map(shows);
      const day = dayNumber(where, at(change));
      const date = new Date(day * 86_400_000).toISOString().slice(0, 10);
      for (let quarter = 0; quarter < 96; quarter += 1) {
        const clock = `${String(Math.floor(quarter / 4)).padStart(2, '0')}:${String((quarter % 4) * 15).padStart(2, '0')}`;
        const first = minutes[shown.findIndex((text) => text >= `${date} ${clock}`)];
        expect(wallInstant(where, day, quarter * 15), `${date} ${clock}`).toBe(first);
      }
    },
  );

  it.each(CHANGES)('in %s at %s the hour of the facts is the clock’s', (name, change) => {
    const facts = compileTimeFacts(zone(name));
    const shows = wallClock(name);
    for (let instant = at(change) - 4 * H; instant < at(change) + 4 * H; instant += 5 * MIN) {
      const now = facts(instant);
      expect(now.hour, new Date(instant).toISOString()).toBe(Number(shows(instant).slice(11, 13)));
      expect(now.until).toBeGreaterThan(instant);
    }
  });

  it.each(CHANGES)(
    'in %s at %s a period holds till the instant at which it says that it does',
    (name, change) => {
      const band = ['00:00', '01:45', '02:15', '02:30', '03:00', '18:00'].map((from, low) => ({
        ...{ from, low, high: low + 3 },
      }));
      const calendar = compileCalendar(body({ band }), zone(name));
      for (let instant = at(change) - 5 * H; instant < at(change) + 5 * H;) {
        const now = calendar(instant);
        const { until } = now;
        // asked anew, so that no remembered answer is asked twice
        const again = compileCalendar(body({ band }), zone(name));
        expect(again(until - 1).low).toBe(now.low);
        expect(until).toBeGreaterThan(instant);
        instant = until;
      }
    },
  );
});

it('of two periods that a skipped hour begins together the later holds', () => {
  const band = [
    { from: '00:00', low: 1, high: 4 },
    { from: '02:15', low: 2, high: 5 },
    { from: '02:30', low: 3, high: 6 },
  ];
  const calendar = compileCalendar(body({ band }), zone('Europe/Zurich'));
  expect([-1, 0, 3_600_000].map((ms) => calendar(at('2026-03-29T01:00:00Z') + ms).low)).toEqual([1, 3, 3]);
});

describe('seasons', () => {
  const inSeason = (from: string, to: string, instant: string) =>
    compileCalendar(body({ season: { from, to } }), zone('Europe/Zurich'))(at(instant)).inSeason;

  it.each([
    ['02-29', '03-05', '2028-02-29T12:00:00Z', true],
    ['02-29', '03-05', '2027-02-28T12:00:00Z', false],
    ['02-29', '03-05', '2027-03-01T12:00:00Z', true],
    ['01-01', '02-28', '2028-02-29T12:00:00Z', false],
    ['01-01', '02-29', '2027-02-28T22:59:59Z', true],
    ['01-01', '02-29', '2027-02-28T23:00:00Z', false],
    ['12-31', '01-01', '2026-12-30T22:59:59Z', false],
    ['12-31', '01-01', '2026-12-30T23:00:00Z', true],
    ['12-31', '01-01', '2027-01-01T22:59:59Z', true],
    ['12-31', '01-01', '2027-01-01T23:00:00Z', false],
    ['06-01', '06-01', '2026-06-01T12:00:00Z', true],
    ['06-01', '06-01', '2026-06-02T12:00:00Z', false],
  ])('from %s to %s: %s is within, %s', (from, to, instant, within) => {
    expect(inSeason(from, to, instant)).toBe(within);
  });
});

describe('over the end of a year', () => {
  it('hours over midnight, periods and facts go on', () => {
    const where = () => zone('America/Denver');
    const band = [
      { from: '08:00', low: 8, high: 11 },
      { from: '20:00', low: 5, high: 8 },
    ];
    const calendar = compileCalendar(body({ hours: { from: '22:00', to: '06:00' }, band }), where());
    const facts = compileTimeFacts(where());
    // midnight in Denver is 07:00 UTC
    const rows: [string, boolean, number, number, number][] = [
      ['2027-01-01T04:59:59Z', false, 5, 21, 12],
      ['2027-01-01T05:00:00Z', true, 5, 22, 12],
      ['2027-01-01T06:59:59Z', true, 5, 23, 12],
      ['2027-01-01T07:00:00Z', true, 5, 0, 1],
      ['2027-01-01T12:59:59Z', true, 5, 5, 1],
      ['2027-01-01T13:00:00Z', false, 5, 6, 1],
      ['2027-01-01T15:00:00Z', false, 8, 8, 1],
    ];
    for (const [instant, inHours, low, hour, month] of rows) {
      expect(calendar(at(instant)), instant).toMatchObject({ inHours, low });
      expect(facts(at(instant)), instant).toMatchObject({ hour, month });
    }
  });
});

describe('the sun', () => {
  it.each([
    ['Tromsø', tromso],
    ['Reykjavík', () => zone('Atlantic/Reykjavik', 64.1, -21.9)],
    ['Stonebeck', () => zone('Europe/London', 54.2, -2.3)],
    ['Lord Howe', () => zone('Australia/Lord_Howe', -31.5, 159)],
  ])('in %s every instant of a year is within its day or its night, and never in both', (_, where) => {
    const night = compileCalendar(body({ hours: { from: 'sunset', to: 'sunrise' } }), where());
    const day = compileCalendar(body({ hours: { from: 'sunrise', to: 'sunset' } }), where());
    const facts = compileTimeFacts(where());
    for (
      let instant = at('2026-01-01T00:00:00Z');
      instant < at('2027-01-01T00:00:00Z');
      instant += 67 * MIN
    ) {
      const isDay = day(instant).inHours;
      expect([night(instant).inHours, facts(instant).sunUp], new Date(instant).toISOString()).toEqual([
        !isDay,
        isDay,
      ]);
    }
  });

  it('that does not rise leaves the night’s period, one that does not set the day’s', () => {
    const band = [
      { from: 'sunrise+00:30', low: 4, high: 7 },
      { from: 'sunset-01:00', low: 6, high: 9 },
    ];
    const calendar = compileCalendar(body({ band }), tromso());
    for (let hour = 0; hour < 24; hour += 1) {
      expect(calendar(at('2026-12-21T00:00:00Z') + hour * H).low).toBe(6);
      expect(calendar(at('2026-06-21T00:00:00Z') + hour * H).low).toBe(4);
    }
  });
});

describe('hours whose ends meet or turn round', () => {
  const spans = (
    where: ReturnType<typeof zone>,
    hours: { from: string; to: string },
    from: string,
    h: number,
  ) => {
    const asked = compileCalendar(body({ hours }), where);
    const minutes = Array.from({ length: h * 60 }, (_, minute) => at(from) + minute * MIN);
    return minutes.filter((instant) => asked(instant).inHours).length;
  };
  const helsinki = () => zone('Europe/Helsinki', 60.17, 24.94);

  it.each([
    ['02:00', '03:00'],
    ['02:15', '02:45'],
  ])('are none where the change of the clock leaves them out: %s to %s', (from, to) => {
    expect(spans(zone('Europe/Zurich'), { from, to }, '2026-03-28T12:00Z', 36)).toBe(0);
    expect(spans(zone('Europe/Zurich'), { from, to }, '2026-03-29T12:00Z', 24)).toBeGreaterThan(0);
  });

  // the sun is up from about 09:24 to 15:13 there: three hours in from either end nothing is left
  it('of the day are none on a day shorter than what is cut off it', () => {
    expect(spans(helsinki(), { from: 'sunrise+03:00', to: 'sunset-03:00' }, '2026-12-20T22:00Z', 24)).toBe(0);
  });

  it('of the night are all of a day shorter than what is added to it', () => {
    expect(spans(helsinki(), { from: 'sunset-04:00', to: 'sunrise+03:00' }, '2026-12-20T22:00Z', 24)).toBe(
      24 * 60,
    );
  });

  it('that begin when they end are the whole day', () => {
    expect(spans(zone('Europe/Zurich'), { from: '06:00', to: '06:00' }, '2026-01-10T00:00Z', 24)).toBe(1440);
  });
});

it('of two periods that a gap of the clock begins together the later on the clock holds, however they are listed', () => {
  const band = [
    { from: '02:30', low: 2, high: 4 },
    { from: '02:15', low: 6, high: 8 },
  ];
  const asked = compileCalendar(body({ band }), zone('Europe/Zurich'));
  expect(asked(at('2026-03-29T02:00Z')).low).toBe(2);
});
