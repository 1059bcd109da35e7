import { describe, expect, it } from 'vitest';
import { reportWords, stateWord } from '@/lib/wording/channel-state';
import { ladderLines } from '@/lib/wording/ladder';
import { nextWords } from '@/lib/wording/next';
import { at, scene, spaced } from './scene';

describe('the ladder', () => {
  const lines = ladderLines(
    [
      { claim: 'lock-out', speaks: false },
      {
        claim: 'rest',
        speaks: true,
        because: { cause: 'credit-spent', restUntil: '2026-11-27T06:06:00Z', restAtMostUntil: null },
      },
      {
        claim: 'band',
        speaks: true,
        because: { point: 'bench-1', value: 3.6, low: 4, high: 7.5, purpose: 'warm' },
      },
    ],
    scene,
  );
  it('marks the first that speaks as the one that decided', () =>
    expect(lines.map((line) => [line.title, line.decides])).toEqual([
      ['Lock-out', false],
      ['Rest', true],
      ['Band', false],
    ]));
  it('lets what does not speak say why not', () => expect(lines[0]?.words).toBe('Nobody has locked it out.'));
  it('gives the reason of what does', () => expect(lines[1]?.words).toBe('Rests till 06:06.'));
  it('leaves out what this release does not know', () =>
    expect(ladderLines([{ claim: 'whim', speaks: true }], scene)).toEqual([]));
});

it('what comes next is told by the clock and by readings', () =>
  expect(
    nextWords(
      [
        { kind: 'then', at: at('06:06'), state: 'on', claim: 'band' },
        { kind: 'if', point: 'house-air', side: 'below', value: 3, state: 'on', claim: 'frost' },
        { kind: 'if', point: null, side: 'below', value: 3, state: 'on', claim: 'frost' },
        { kind: 'if', point: 'bench-1', side: 'above', value: 7.5, state: 'off', claim: 'idle' },
        { kind: 'riddle' },
      ],
      scene,
    ).map(spaced),
  ).toEqual([
    'At 06:06, if no reading changes: the band turns it on.',
    'If the house air falls under 3.0 °C: frost turns it on.',
    'If the coldest sensor of the house falls under 3.0 °C: frost turns it on.',
    'If bench probe 1 rises above 7.5 °C: it goes off.',
  ]));

describe('a load’s state in a word', () => {
  const off = { state: 'off', reported: 'off', claim: 'idle', lockedOut: false } as const;
  it.each([
    ['Running', { ...off, state: 'on', reported: 'on' }, 'motor'],
    ['Resting', { ...off, claim: 'rest' }, 'motor'],
    ['Off', off, 'heater'],
    ['Heating', { ...off, state: 'on' }, 'heater'],
    ['Shut', off, 'vent'],
    ['Locked out', { ...off, lockedOut: true }, 'motor'],
  ] as const)('%s', (word, channel, kind) => expect(stateWord(channel, kind)).toBe(word));
  it('says when its relay does not agree', () => {
    expect(reportWords(off)).toBeNull();
    expect(reportWords({ ...off, state: 'on' })).toBe('Its relay still says off.');
    expect(reportWords({ ...off, reported: null })).toBe('Its relay has not been heard.');
  });
});
