import { describe, expect, it } from 'vitest';
import { figuresOf } from '@/lib/wording/because-figures';
import { followedWords, whySentence, whyTitle } from '@/lib/wording/why';
import { american, at, scene, spaced } from './scene';

const fan = { key: 'gate-heap-fan', loadKind: 'motor' };
const rest = {
  ...{
    cause: 'credit-spent',
    source: 'gate-heap',
    credit: 0,
    restSince: at('05:36'),
    restUntil: at('06:06'),
  },
  ...{ restAtMostUntil: at('07:06'), frostBreaksBelow: 3, until: at('06:06') },
  recovery: { point: 'gate-base', value: 39.9, level: 43, good: true },
};

describe('the panel', () => {
  it.each([
    ['Why the gate-heap fan is resting', { channel: fan, state: 'off', claim: 'rest', at: null }],
    ['Why the gate-heap fan is locked out', { channel: fan, state: 'off', claim: 'lock-out', at: null }],
    [
      'Why the gate-heap fan was running at 02:00',
      { channel: fan, state: 'on', claim: 'band', at: at('02:00') },
    ],
    [
      'Why the ridge vent was shut at 02:00',
      { channel: { key: 'ridge-vent', loadKind: 'vent' }, state: 'off', claim: 'idle', at: at('02:00') },
    ],
  ] as const)('asks “%s”', (title, asked) => expect(spaced(whyTitle(asked, scene))).toBe(title));

  it('leaves what frost would do to what comes next', () =>
    expect(spaced(whySentence('rest', rest, scene))).toBe(
      'Rests till 06:06 at least, then until the heap beside the pipe is back to 43 °C (39.9 °C now), 07:06 at the latest.',
    ));

  it('says what ended a decision that is over', () => {
    const told = {
      state: 'off',
      claim: 'rest',
      next: [],
      ended: { at: '2026-11-27T02:14:00Z', state: 'on', claim: 'band' },
    } as const;
    expect(followedWords(told, scene)).toBe('It ended at 02:14: the band turned it on.');
    const idle = { ...told, ended: { ...told.ended, state: 'off', claim: 'idle' } } as const;
    expect(followedWords(idle, scene)).toBe('It ended at 02:14: it stayed off, for nothing wanted it on.');
    expect(followedWords({ ...told, state: 'on', ended: idle.ended }, american)).toContain(
      'at 2:14\u00a0am: it went off',
    );
  });

  it('does not say twice where a band starts, but what else would turn it', () => {
    const band = { kind: 'if', point: 'bench-1', side: 'below', value: 4, state: 'on', claim: 'band' };
    const frost = { ...band, point: null, value: 3, claim: 'frost' };
    const idle = { state: 'off', claim: 'idle', ended: null } as const;
    expect(followedWords({ ...idle, next: [band] }, scene)).toBe('');
    expect(spaced(followedWords({ ...idle, next: [band, frost] }, scene))).toBe(
      'Frost turns it on if the coldest sensor of the house falls under 3.0 °C.',
    );
  });

  it('tells what was read at the time as read then', () =>
    expect(spaced(whySentence('rest', rest, scene, true))).toContain('(39.9 °C then)'));
});

describe('the figures behind a reason', () => {
  const figures = (claim: string, because: object, to = scene) =>
    figuresOf(claim, because, to).map((one) =>
      spaced([one.name, one.value, ...(one.against === undefined ? [] : [one.against])].join(' | ')),
    );
  const rule = {
    rule: 'r',
    version: 1,
    point: 'bench-1',
    value: 3.6,
    low: 4,
    high: 7.5,
    latch: true,
    why: 'wants',
  };

  it('of a rest are what it waits for, since when, and what is left', () =>
    expect(figures('rest', rest)).toEqual([
      'The heap beside the pipe | 39.9 °C | back at 43.0 °C',
      'Rests since | 05:36',
      'Left of the longest draw | 0 %',
    ]));
  it('of a band are its point beside both thresholds, in °F too', () => {
    expect(figures('band', { ...rule, purpose: 'warm' })).toEqual([
      'Bench probe 1 | 3.6 °C | on below 4.0 °C, off above 7.5 °C',
    ]);
    expect(figures('idle', { rules: [{ ...rule, purpose: 'cool' }] }, american)).toEqual([
      'Bench probe 1 | 38.5 °F | on above 45.5 °F, off below 39.2 °F',
    ]);
  });
  it('of frost, guard and limit are the reading beside what it must pass', () => {
    expect(figures('frost', { point: 'bench-1', value: 2.9, limit: 3, endsAtOrAbove: 4 })).toEqual([
      'Bench probe 1 | 2.9 °C | under 3.0 °C, ends from 4.0 °C',
    ]);
    expect(
      figures('source-guard', { point: 'gate-core', value: 37.2, floor: 38, againAtOrAbove: 39 }),
    ).toEqual(['The heap’s core | 37.2 °C | floor 38.0 °C, again from 39.0 °C']);
    expect(figures('limit', { point: 'bench-3', value: 28.4, above: 28, againAtOrBelow: 27 })).toEqual([
      'Bench probe 3 | 28.4 °C | limit 28.0 °C, again from 27.0 °C down',
    ]);
  });
  it('of a day’s limit and of a start that is not worth it are times', () => {
    expect(figures('rest', { cause: 'daily-limit', drawnS: 28_800, limitS: 28_800 })).toEqual([
      'Drawn on in 24 h | 8 h | 8 h at most',
    ]);
    expect(figures('rest', { cause: 'not-worth-a-start', worthS: 10, leastOnS: 120 })).toEqual([
      'Minutes left | 10 s | 2 min at least',
    ]);
  });
  it('are none where nothing was kept', () => {
    for (const claim of ['rest', 'band', 'frost', 'limit', 'source-guard', 'short-cycle', 'whim'])
      expect(figures(claim, {})).toEqual([]);
  });
});
