import { describe, expect, it } from 'vitest';
import { plainText } from '@/lib/wording/phrase';
import { unknownSentence, watchSentence } from '@/lib/wording/watch';
import type { HouseStanding, StandingPoint } from '@/lib/wording/watch-standing';
import { american, at, scene, spaced } from './scene';

const point = (
  key: string,
  role: string,
  value: number | null,
  more: Partial<StandingPoint> = {},
): StandingPoint => ({
  ...{ key, role, value, at: '2026-11-27T05:44:50Z', quality: 'good', why: null },
  ...more,
});

const standing: HouseStanding = {
  houseName: 'Long house',
  frostLimit: 3,
  points: [
    point('bench-1', 'bench', 5.7),
    point('house-air', 'house-air', 6.1),
    point('outdoors', 'outdoors', -12.3),
    point('gate-base', 'heap-base', 39.9),
  ],
  channels: [
    {
      ...{ key: 'gate-heap-fan', label: 'Gate-heap fan', state: 'off', claim: 'rest', mode: 'auto' },
      because: { restUntil: at('06:06'), recovery: { point: 'gate-base' } },
    },
    { key: 'ground-fan', label: 'Ground fan', state: 'off', claim: 'idle', because: {}, mode: 'auto' },
  ],
  band: { point: 'bench-1', low: 4, high: 7.5 },
  draws: [{ channel: 'gate-heap-fan', base: 'gate-base' }],
  coldest: { value: -12.7, at: at('04:12') },
};
const say = (change: Partial<HouseStanding>, to = scene) =>
  spaced(plainText(watchSentence({ ...standing, ...change }, to)));
const withPoint = (key: string, change: Partial<StandingPoint>) =>
  standing.points.map((one) => (one.key === key ? { ...one, ...change } : one));
const withFan = (change: Partial<HouseStanding['channels'][number]>) =>
  standing.channels.map((one) => (one.key === 'gate-heap-fan' ? { ...one, ...change } : one));

describe('the sentence of Watch', () => {
  it('says how the house, the heap and the night stand', () =>
    expect(say({})).toBe(
      'The long house stands at 5.7 °C by bench probe 1, inside its band. The gate-heap fan rests until 06:06 at least; the heap beside the pipe is at 39.9 °C. Outdoors −12.3 °C, coldest was −12.7 °C at 04:12.',
    ));
  it('says the same in °F and twelve hours', () =>
    expect(say({}, american)).toBe(
      'The long house stands at 42.3 °F by bench probe 1, inside its band. The gate-heap fan rests until 6:06 am at least; the heap beside the pipe is at 103.8 °F. Outdoors 9.9 °F, coldest was 9.1 °F at 4:12 am.',
    ));
  it('speaks of the house itself when its air is what the band goes by', () =>
    expect(say({ band: { point: 'house-air', low: 4, high: 7.5 } })).toMatch(
      /^The long house stands at 6\.1 °C/,
    ));
  it.each([
    [3.9, 'under its band'],
    [4, 'inside its band'],
    [7.5, 'inside its band'],
    [7.6, 'above its band'],
  ])('at %d °C is %s', (value, words) =>
    expect(say({ points: withPoint('bench-1', { value }) })).toContain(words),
  );
  it('puts frost in words of its own, with its limit', () =>
    expect(say({ points: withPoint('bench-1', { value: 2.9 }) })).toContain(
      'stands at 2.9 °C by bench probe 1, under its band. Bench probe 1 is at 2.9 °C, under the frost limit of 3.0 °C.',
    ));
  it('says nothing of a band where none is in force', () =>
    expect(say({ band: null })).toMatch(/stands at 6\.1 °C\./));
});

describe('what is missing is said', () => {
  it('of the sensor that the band goes by, with the next one that answers', () =>
    expect(
      say({ points: withPoint('bench-1', { quality: 'bad', why: 'silent', at: '2026-11-27T05:31:00Z' }) }),
    ).toMatch(/^The long house stands at 6\.1 °C\. Bench probe 1 is silent since 05:31\./));
  it('when no sensor of the house answers', () =>
    expect(
      say({ points: standing.points.map((one) => ({ ...one, quality: 'bad', why: 'silent' })) }),
    ).toMatch(/^No sensor of the long house answers, so how warm it is cannot be said\./));
  it('of the cold outdoors', () =>
    expect(say({ points: withPoint('outdoors', { quality: 'bad', why: 'silent' }) })).toContain(
      'How cold it is outdoors is not known: the air outdoors is silent, coldest was −12.7 °C at 04:12.',
    ));
  it('of a value that is not sure', () =>
    expect(say({ points: withPoint('bench-1', { quality: 'uncertain', why: 'too-fast' }) })).toContain(
      '5.7 °C by bench probe 1 (not sure of it)',
    ));
  it('of a house that was never heard', () =>
    expect(plainText(unknownSentence('Long house'))).toBe(
      'Nothing is known of the long house yet: no reading has come from its nodes.',
    ));
});

describe('the heap’s fan', () => {
  it.each([
    ['runs', { state: 'on', claim: 'band' }],
    ['runs by hand until 08:00', { state: 'on', claim: 'hand', because: { until: '2026-11-27T08:00:00Z' } }],
    ['runs against frost', { state: 'on', claim: 'frost' }],
    ['is off: its sensor is missing', { state: 'off', claim: 'fail-safe' }],
    ['is off to spare the heap', { state: 'off', claim: 'source-guard' }],
    ['is locked out', { state: 'off', claim: 'lock-out', mode: 'locked' }],
    ['rests until 06:06', { state: 'off', claim: 'rest', because: { restUntil: at('06:06') } }],
    ['is off', { state: 'off', claim: 'idle' }],
  ] as const)('%s', (words, change) =>
    expect(say({ channels: withFan(change) })).toContain(`The gate-heap fan ${words}; the heap`),
  );
  it('says nothing of the heap beside the pipe without a reading of it', () =>
    expect(say({ points: withPoint('gate-base', { quality: 'bad', why: 'silent' }) })).toContain(
      'rests until 06:06 at least. Outdoors',
    ));
});

it('whatever else runs is said too', () =>
  expect(
    say({
      channels: standing.channels.map((one) => ({
        ...one,
        ...(one.key === 'ground-fan' ? { state: 'on' as const } : {}),
      })),
    }),
  ).toContain('The ground fan is on too.'));
