import { describe, expect, it } from 'vitest';
import type { Reasons } from '@/lib/control/because';
import type { Claim } from '@/lib/control/types';
import { becauseWords } from '@/lib/wording/because';
import { american, at, scene, spaced } from './scene';

function words<Name extends Claim>(claim: Name, because: Reasons[Name], to = scene): string {
  return spaced(becauseWords(claim, because, to));
}

const rest: Reasons['rest'] = {
  cause: 'credit-spent',
  source: 'gate-heap',
  credit: 0,
  restSince: at('05:36'),
  restUntil: at('06:06'),
  restAtMostUntil: at('07:06'),
  recovery: { point: 'gate-base', value: 39.9, level: 43, good: true },
  frostBreaksBelow: 3,
  until: at('06:06'),
};

describe('a rest says', () => {
  it('till when, what it waits for, and what would end it sooner', () =>
    expect(words('rest', rest)).toBe(
      'Rests till 06:06 at least, then until the heap beside the pipe is back to 43 °C (39.9 °C now), 07:06 at the latest. Sooner if the house falls under 3 °C.',
    ));
  it('the same in °F and twelve hours', () =>
    expect(words('rest', rest, american)).toBe(
      'Rests till 6:06 am at least, then until the heap beside the pipe is back to 109.4 °F (103.8 °F now), 7:06 am at the latest. Sooner if the house falls under 37.4 °F.',
    ));
  it('only its time when it waits for nothing else', () => {
    const { recovery: _recovery, frostBreaksBelow: _frost, ...plain } = rest;
    expect(words('rest', { ...plain, restAtMostUntil: null })).toBe('Rests till 06:06.');
  });
  it('that it begins anew while something draws', () =>
    expect(words('rest', { ...rest, restUntil: null })).toContain('the rest begins anew when nothing draws'));
  it('that what it waits for cannot be read', () =>
    expect(
      words('rest', { ...rest, recovery: { point: 'gate-base', value: null, level: 43, good: false } }),
    ).toContain('(no good reading now)'));
  it('how much of the day is used', () =>
    expect(
      words('rest', {
        cause: 'daily-limit',
        source: 'gate-heap',
        credit: 1,
        drawnS: 28_800,
        limitS: 28_800,
        until: at('06:40'),
      }),
    ).toBe(
      'The gate heap has been drawn on for 8 h in 24 h, and 8 h is its limit. Some of it comes back at 06:40.',
    ));
  it('that the loop brought too little', () =>
    expect(
      words('rest', {
        cause: 'no-gain',
        source: 'gate-heap',
        credit: 0.4,
        leastGainK: 3,
        until: at('06:20'),
      }),
    ).toBe('The loop brought less than 3.0 °C of warmth, so the draw was ended. Rests till 06:20.'));
  it('the same where the figure was not kept', () =>
    expect(words('rest', { cause: 'no-gain', source: 'gate-heap', credit: 0, until: at('06:20') })).toBe(
      'The loop brought too little warmth, so the draw was ended. Rests till 06:20.',
    ));
  it('that what is left is worth no start', () =>
    expect(
      words('rest', {
        cause: 'not-worth-a-start',
        source: 'gate-heap',
        credit: 0.004,
        worthS: 10,
        leastOnS: 120,
        until: null,
      }),
    ).toBe('10 s of draw are left, too little for its least run of 2 min, so it waits.'));
});

const band: Reasons['band'] = {
  ...{ rule: 'Gate-heap fan by the bench', version: 7, purpose: 'warm', point: 'bench-1', value: 3.6 },
  ...{ low: 4, high: 7.5, latch: true, why: 'wants', stops: { side: 'above', value: 7.5 } },
};

describe('a band says', () => {
  it('that the house is beyond it, and where it stops', () =>
    expect(words('band', band)).toBe('Bench probe 1 is at 3.6 °C, under 4.0 °C. Stops above 7.5 °C.'));
  it('that it began and has not ended, in between', () =>
    expect(words('band', { ...band, value: 5.2 })).toBe(
      'Bench probe 1 is at 5.2 °C; it was under 4.0 °C. Stops above 7.5 °C.',
    ));
  it('the other way round when it cools', () =>
    expect(
      words('band', {
        ...band,
        purpose: 'cool',
        value: 26,
        low: 20,
        high: 25,
        stops: { side: 'below', value: 20 },
      }),
    ).toBe('Bench probe 1 is at 26.0 °C, over 25.0 °C. Stops below 20.0 °C.'));
  it('for which point another stands in', () =>
    expect(words('band', { ...band, point: 'house-air', standInFor: 'bench-1' })).toBe(
      'The house air (for bench probe 1) is at 3.6 °C, under 4.0 °C. Stops above 7.5 °C.',
    ));
});

describe('nothing at all says', () => {
  const { stops: _stops, ...rule } = band;
  it('where it would start', () =>
    expect(words('idle', { rules: [{ ...rule, value: 8.2, why: 'satisfied', latch: false }] })).toBe(
      'Bench probe 1 is at 8.2 °C. Starts under 4.0 °C.',
    ));
  it.each([
    ['out-of-season', 'Out of season.'],
    ['out-of-hours', 'Outside its hours.'],
    ['condition-not-met', 'One of its conditions does not hold.'],
  ] as const)('when a rule is %s', (why, text) =>
    expect(words('idle', { rules: [{ ...rule, why }] })).toBe(text),
  );
  it('which sensor leaves a condition open', () =>
    expect(words('idle', { rules: [{ ...rule, why: 'condition-unknown', unknown: ['gate-core'] }] })).toBe(
      'A condition is open: no good reading of the heap’s core.',
    ));
  it('that no rule is there', () =>
    expect(words('idle', { rules: [] })).toBe('No rule in force turns it on; by hand it can be.'));
});

describe('a person’s word says', () => {
  it('who, since when and till when', () =>
    expect(
      words('hand', {
        state: 'off',
        by: 'grower@larkmoor.example',
        givenAt: at('05:10'),
        until: at('08:00'),
        holdInFrost: true,
      }),
    ).toBe('Turned off by grower@larkmoor.example at 05:10; back to auto at 08:00. Not even frost ends it.'));
  it('why it is locked out', () =>
    expect(
      words('lock-out', {
        lockouts: [{ id: '1', why: 'New fan being fitted.', by: 'the installer', placedAt: at('05:00') }],
      }),
    ).toBe('Locked out by the installer since 05:00: New fan being fitted. Only a person removes it.'));
});

const frost: Reasons['frost'] = {
  ...{ point: 'bench-1', value: 2.9, limit: 3, endsAtOrAbove: 4, frostSince: at('05:33') },
  ...{ part: 'helps', borrows: 'rest' },
};

describe('frost says', () => {
  it('where, since when, and that a rest was cut short', () =>
    expect(words('frost', frost)).toBe(
      'Helps against frost since 05:33: bench probe 1 is at 2.9 °C, and the frost limit is 3 °C. Its rest was cut short. Ends from 4 °C.',
    ));
  it('that it goes on blind for a while', () =>
    expect(words('frost', { ...frost, point: null, value: null, borrows: null, until: at('06:03') })).toBe(
      'Helps against frost since 05:33: no sensor of the house answers, so it goes on till 06:03.',
    ));
});

describe('what holds a load says', () => {
  it('which sensor is missing since when', () =>
    expect(
      words('fail-safe', { safe: 'off', points: [{ point: 'bench-3', why: 'silent', lastAt: at('05:31') }] }),
    ).toBe('Its sensor is missing: bench probe 3, silent since 05:31.'));
  it('how far the core is under its floor', () =>
    expect(
      words('source-guard', {
        cause: 'core-floor',
        source: 'gate-heap',
        point: 'gate-core',
        value: 37.2,
        floor: 38,
        againAtOrAbove: 39,
      }),
    ).toBe('The core of the gate heap is at 37.2 °C, under its floor of 38 °C. Drawn on again from 39 °C.'));
  it('when a new heap may be drawn on', () =>
    expect(
      words('source-guard', {
        ...{
          cause: 'not-ready',
          source: 'gate-heap',
          point: 'gate-core',
          value: 51,
          level: 50,
          forS: 259_200,
        },
        ...{ aboveSince: at('05:00'), until: Date.parse('2026-11-30T05:00:00Z') },
      }),
    ).toBe(
      'The gate heap is not ready yet: its core must stay above 50 °C for 3 days. It has been since 05:00, so it is ready 30 Nov, 05:00 at the earliest.',
    ));
  it('what it may never run with', () =>
    expect(
      words('interlock', {
        kind: 'never-with',
        other: 'ridge-vent',
        otherState: 'on',
        delayS: 5,
        until: null,
      }),
    ).toBe('Never together with the ridge vent, which runs.'));
  it('how long it is kept, and what then', () =>
    expect(
      words('short-cycle', {
        holds: 'on',
        holdsSince: at('05:43'),
        leastS: 120,
        until: at('05:45'),
        wanted: 'off',
        wantedBy: 'rest',
      }),
    ).toBe('Kept on for at least 2 min, till 05:45; then a rest turns it off.'));
  it('which limit is passed', () =>
    expect(
      words('limit', { cause: 'high-limit', point: 'bench-3', value: 28.4, above: 28, againAtOrBelow: 27 }),
    ).toBe('Bench probe 3 is at 28.4 °C, over the limit of 28 °C. Again from 27 °C down.'));
});

it('a reason reads the same off the wire, where its instants are ISO', () => {
  const wire = {
    ...rest,
    restSince: '2026-11-27T05:36:00Z',
    restUntil: '2026-11-27T06:06:00Z',
    restAtMostUntil: '2026-11-27T07:06:00Z',
  };
  expect(spaced(becauseWords('rest', wire, scene))).toBe(words('rest', rest));
});
it('a reason that lacks its fields still makes a sentence', () =>
  expect(
    ['rest', 'band', 'hand', 'frost', 'limit'].every((claim) => becauseWords(claim, {}, scene).endsWith('.')),
  ).toBe(true));
it('a claim that nobody knows says nothing', () => expect(becauseWords('whim', {}, scene)).toBe(''));
