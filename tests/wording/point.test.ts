// A point in a sentence, and its calibration in words.
import { describe, expect, it } from 'vitest';
import { USUAL } from '@/lib/units/preferences';
import { correctionWords, steadyWords, unusualWords } from '@/lib/wording/calibration';
import { plainText } from '@/lib/wording/phrase';
import { pointSentence } from '@/lib/wording/point';

const NOW = Date.parse('2026-11-27T06:00:00Z');
const scene = { now: NOW, zone: 'Europe/London', preferences: USUAL };
const point = { name: 'Bench probe 1', unit: 'Cel', node: 'LH-1' };
const good = { value: 6.31, quality: 'good' as const, why: null };
const typed = {
  ...{ from: '2026-11-26T10:00:00Z', offset: 0, gain: 1, kind: 'typed' as const },
  by: 'installer@larkmoor.example',
};
const says = (newest: typeof typed | null, state: Parameters<typeof pointSentence>[0]['state'] = good) =>
  plainText(pointSentence({ point, state, newest }, scene)).replaceAll('\u00a0', ' ');

describe('a point', () => {
  it('says what it reads and by what it was calibrated', () => {
    expect(says({ ...typed, offset: -0.3 })).toBe(
      'Bench probe 1 reads 6.3 °C. It was calibrated on 26 Nov (typed in) by installer@larkmoor.example: −0.30.',
    );
  });
  it('is not said to be calibrated by what it was added with', () => {
    expect(says(typed)).toBe('Bench probe 1 reads 6.3 °C. It is not calibrated.');
    expect(says(null)).toContain('It is not calibrated.');
  });
  it('says that it is not trusted, and that it never spoke', () => {
    expect(says(null, { value: 6.3, quality: 'bad', why: 'silent' })).toContain(
      'reads 6.3 °C, not trusted: silent.',
    );
    expect(says(null, null)).toContain('has said nothing yet.');
  });
});

it('a correction is written as it is reckoned', () => {
  expect(correctionWords({ gain: 1, offset: -0.3 })).toBe('−0.30');
  expect(correctionWords({ gain: 1.005, offset: 0.2 })).toBe('× 1.0050 +0.20');
  expect(correctionWords({ gain: 1, offset: 0 })).toBe('none');
});

it('a probe that does not lie still is told what to do', () => {
  const steady = { readings: 6, seconds: 150, change: -2.4, sd: 0.4 };
  const words = (why: Parameters<typeof steadyWords>[0]['why']) =>
    steadyWords({ ...steady, why }, USUAL).replaceAll('\u00a0', ' ');
  expect(words(null)).toBe('It is steady: six readings over 3 min.');
  expect(words('moving')).toBe('It still moves: −2.4 °C in 3 min. Leave it where it is.');
  expect(words('scattered')).toContain('It scatters by 0.4 °C');
  expect(words('few')).toContain('five over two minutes are wanted');
  expect(words('silent')).toContain('It is silent.');
});

it('an unusual correction names the figure that is unusual', () => {
  expect(
    unusualWords([
      { what: 'far', kelvin: -4.2 },
      { what: 'gain', gain: 0.85 },
    ]).replaceAll('\u00a0', ' '),
  ).toContain('it moves what is read by −4.2 °C, and its gain would be 0.850');
});
