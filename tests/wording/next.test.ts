import { describe, expect, it } from 'vitest';
import type { NextIf, NextReason } from '@/lib/control/next';
import type { State } from '@/lib/control/types';
import { nextSentence, nextWords } from '@/lib/wording/next';
import { american, at, scene, spaced } from './scene';

const words = (one: NextReason, present?: State, to = scene): string =>
  nextWords([one], to, present).map(spaced).join('|');
const restThen: NextReason = { kind: 'then', at: at('02:14'), state: 'on', claim: 'band' };
const frostIf: NextIf = {
  ...{ kind: 'if', point: null, side: 'below', value: 3, state: 'on', claim: 'frost' },
};

const reading = (more: Partial<NextIf>): NextIf => ({ ...frostIf, ...more });

describe('a line of what comes next says', () => {
  it.each<[string, NextReason, State]>([
    ['At 02:14, if no reading changes: the band turns it on.', restThen, 'off'],
    ['At 02:14, if no reading changes: it goes off.', { ...restThen, state: 'off', claim: 'idle' }, 'on'],
    ['At 02:14, if no reading changes: it stays off.', { ...restThen, state: 'off', claim: 'idle' }, 'off'],
    [
      'At 02:14, if no reading changes: a rest keeps it off.',
      { ...restThen, state: 'off', claim: 'rest' },
      'off',
    ],
    ['If the coldest sensor of the house falls under 3.0 °C: frost turns it on.', frostIf, 'off'],
    [
      'If the coldest sensor of the house rises to 4.0 °C: the band keeps it on.',
      reading({ side: 'above', value: 4, orAt: true, claim: 'band' }),
      'on',
    ],
    [
      'If the heap beside the pipe rises to 43.0 °C: the band turns it on, at 02:14 at the earliest.',
      reading({ point: 'gate-base', side: 'above', value: 43, orAt: true, at: at('02:14'), claim: 'band' }),
      'off',
    ],
    [
      'If bench probe 1 rises to exactly 5.0 °C: it goes off.',
      reading({
        ...{ point: 'bench-1', side: 'above', value: 5, orAt: true, exactly: true },
        ...{ state: 'off', claim: 'idle' },
      }),
      'on',
    ],
    [
      'If the heap beside the pipe falls under 43.0 °C: the band turns it on, but not before 03:00.',
      reading({ point: 'gate-base', value: 43, at: at('03:00'), later: true, claim: 'band' }),
      'off',
    ],
    [
      'If bench probe 1 rises above 7.5 °C: it stays off beyond 02:14.',
      reading({ point: 'bench-1', side: 'above', value: 7.5, at: at('02:14'), state: 'off', claim: 'idle' }),
      'off',
    ],
    [
      'When its lock-out is removed: the band turns it on.',
      { kind: 'when', what: 'unlocked', state: 'on', claim: 'band' },
      'off',
    ],
    [
      'When it is given back to auto: a rest keeps it off.',
      { kind: 'when', what: 'given-back', state: 'off', claim: 'rest' },
      'off',
    ],
    [
      'When the ridge vent is off: the band turns it on, at 05:46 at the earliest.',
      { kind: 'when', what: 'other-off', other: 'ridge-vent', at: at('05:46'), state: 'on', claim: 'band' },
      'off',
    ],
    [
      'When the ground fan is on: the band turns it on.',
      { kind: 'when', what: 'other-on', other: 'ground-fan', state: 'on', claim: 'band' },
      'off',
    ],
    [
      'When somebody says that the gate heap is ready: the band turns it on.',
      { kind: 'when', what: 'ready', source: 'gate-heap', state: 'on', claim: 'band' },
      'off',
    ],
    [
      'When bench probe 3 answers again: its rules are asked again.',
      { kind: 'when', what: 'answers', point: 'bench-3' },
      'off',
    ],
  ])('%s', (text, one, present) => expect(words(one, present)).toBe(text));

  it('the same in °F and twelve hours', () => {
    expect(words(restThen, 'off', american)).toBe('At 2:14 am, if no reading changes: the band turns it on.');
    expect(words(frostIf, 'off', american)).toBe(
      'If the coldest sensor of the house falls under 37.4 °F: frost turns it on.',
    );
  });

  it('a point’s own unit', () => {
    const humid = { ...scene, points: [{ key: 'rh', name: 'Humidity', role: 'humidity', unit: '%RH' }] };
    const one: NextIf = reading({ point: 'rh', side: 'above', value: 90, claim: 'band' });
    expect(words(one, 'off', humid)).toContain('rises above 90 % RH');
  });

  it('nothing of what this release does not know', () =>
    expect(nextWords([{ kind: 'riddle' }, { kind: 'when', what: 'whim' }, null, 3], scene)).toEqual([]));
});

describe('the nearest of it in one sentence', () => {
  const sentence = (next: NextReason[], present: State) => spaced(nextSentence(next, scene, present));

  it('is the clock, and what brings it sooner', () =>
    expect(sentence([restThen, frostIf], 'off')).toBe(
      'At 02:14 the band turns it on; sooner if the coldest sensor of the house falls under 3.0 °C.',
    ));
  it('leaves out what comes no sooner', () =>
    expect(sentence([restThen, reading({ at: at('03:00'), later: true })], 'off')).toBe(
      'At 02:14 the band turns it on, if no reading changes.',
    ));
  it('is a reading where the clock brings nothing', () =>
    expect(sentence([reading({ point: 'bench-1', value: 4, claim: 'band' })], 'off')).toBe(
      'The band turns it on if bench probe 1 falls under 4.0 °C.',
    ));
  it('is a deed where one is waited for', () =>
    expect(sentence([{ kind: 'when', what: 'unlocked', state: 'on', claim: 'band' }], 'off')).toBe(
      'The band turns it on when its lock-out is removed.',
    ));
  it('says so where nothing is foreseen', () =>
    expect(sentence([], 'off')).toBe(
      'Nothing is foreseen by the clock; a reading or a person may change it.',
    ));
});
