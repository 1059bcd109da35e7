import { describe, expect, it } from 'vitest';
import { USUAL } from '@/lib/units/preferences';
import { plainText } from '@/lib/wording/phrase';
import {
  fellWords,
  firstWords,
  foundWords,
  gainWords,
  leftWords,
  provingSentence,
  unprovesWords,
  whyWords,
} from '@/lib/wording/proving';

const plain = (text: string | null) => text?.replaceAll('\u00a0', ' ') ?? null;
const fahrenheit = { ...USUAL, temperature: 'F' } as const;

describe('a proof in words', () => {
  it('says where it stands', () => {
    const channel = { number: 4, label: 'Ridge vent' };
    const standing = { channel, steps: { needed: 9, settled: 3 }, provedAt: null, lockedOut: false };
    expect(plainText(provingSentence(standing, null))).toBe(
      'Proving channel 4, the ridge vent. Three of nine steps are done.',
    );
    expect(plainText(provingSentence({ ...standing, steps: null }, null))).toBe(
      'Channel 4, the ridge vent has been wired but never proved.',
    );
    expect(plainText(provingSentence({ ...standing, steps: null, lockedOut: true }, '14 Oct'))).toBe(
      'Channel 4, the ridge vent was proved on 14 Oct. It is locked out, so nothing runs it from here.',
    );
  });

  it('tells what a draw brought with how far it may be out, in the reader’s degrees', () => {
    expect(plain(gainWords(6.2, 0.41, 300, USUAL))).toBe('return +6.2 ± 0.4 °C in 5 min');
    // 6.2 K are 11.2 °F, 0.41 K are 0.7 °F
    expect(plain(gainWords(6.2, 0.41, 300, fahrenheit))).toBe('return +11.2 ± 0.7 °F in 5 min');
    expect(gainWords(null, null, 300, USUAL)).toBeNull();
  });

  it('says how the coil was let go', () => {
    expect(plain(fellWords('lease', 47))).toBe(
      'The node went 47 s without a command and counted a lease that ended in it: it dropped the coil by itself.',
    );
    expect(fellWords('restart', null)).toMatch(/lost its power/);
    expect(fellWords(null, null)).toBeNull();
  });

  it('says that a heap’s fan blows into the pipe, and what a normally closed contact does', () => {
    const load = { kind: 'motor', contact: 'NO', isHeapFan: true } as const;
    expect(whyWords('seen', load)).toMatch(/blows INTO the heap’s pipe and never sucks/);
    expect(whyWords('unplugged', { ...load, contact: 'NC' })).toMatch(/unplugged, the load RUNS/);
  });

  it('names the step that has to come first, and counts the last second as one', () => {
    expect(firstWords('dead')).toBe('First: isolator off and locked, circuit dead at the board.');
    const left = [9400, 1, 0, -500].map((ms) => leftWords(ms, 10));
    expect(left).toEqual(['10', '1', '0', '0']);
  });

  it('never counts down from more than was ordered', () => {
    expect([60_001, 61_400, 60_000, 59_001].map((ms) => leftWords(ms, 60))).toEqual(['60', '60', '60', '60']);
  });

  it('tells what was found from the figures that were kept', () => {
    const record = { result: 'done', note: null } as const;
    const current = { point: 'fan-amps', greatest: 0.52, above: 0.2, unit: 'A' };
    expect(plain(foundWords({ ...record, step: 'current', figures: current }, USUAL))).toBe(
      'fan-amps showed 0.52 A, over 0.20 A.',
    );
    const resort = { below: 1, cameOnAt: 1.4 };
    expect(plain(foundWords({ ...record, step: 'last-resort', figures: resort }, USUAL))).toBe(
      'Set to 1.0 °C; it came on at 1.4 °C.',
    );
    expect(foundWords({ ...record, step: 'dead', figures: {} }, USUAL)).toBeNull();
  });

  it('says beforehand that another wiring is not proved', () => {
    expect(unprovesWords(['relay', 'load'])).toMatch(/^This changes its relay and its load\. .* not proved/);
    expect(unprovesWords([])).toBeNull();
  });
});
