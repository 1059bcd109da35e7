import { describe, expect, it } from 'vitest';
import { aloneSentence, fallbackDoubt, fallbackReason, fallbackWords } from '@/lib/wording/alone';
import { plainText } from '@/lib/wording/phrase';
import { american, scene, spaced } from './scene';

const from = Date.UTC(2026, 11, 1, 2, 10);
const to = Date.UTC(2026, 11, 1, 3, 40);
const said = (facts: Partial<Parameters<typeof aloneSentence>[0]>, many = false) =>
  spaced(
    plainText(aloneSentence({ node: 'LH-1', from, to, ran: [], ...facts }, 'UTC', scene.preferences, many)),
  );
const fallback = { point: 'Bench probe 1', below: 2, above: 5, onFor: 1200, offFor: 2400 };

describe('What a field box did by itself', () => {
  it('is said with its times and what ran', () => {
    expect(said({ ran: [{ label: 'Gate-heap fan', seconds: 2400 }] })).toBe(
      'The field box kept the house by itself from 02:10 to 03:40: the gate-heap fan ran for 40 min.',
    );
    expect(said({})).toBe('The field box kept the house by itself from 02:10 to 03:40: no load ran.');
  });

  it('names the box where there are several, and says no end that nobody told', () => {
    expect(said({ to: null }, true)).toBe(
      'The field box LH-1 has kept the house by itself since 02:10, as far as it has told: no load ran.',
    );
  });
});

describe('A fallback in words', () => {
  it('says its band, its run and its rest, in °C and °F', () => {
    expect(spaced(fallbackWords(fallback, scene.preferences))).toBe(
      'On below 2 °C at bench probe 1, off over 5 °C; 20 min at a time, then 40 min off.',
    );
    expect(spaced(fallbackWords(fallback, american.preferences))).toBe(
      'On below 35.6 °F at bench probe 1, off over 41 °F; 20 min at a time, then 40 min off.',
    );
  });

  it('says where it would not be run', () => {
    expect(fallbackDoubt('can', 'LH-1')).toBeNull();
    expect(fallbackDoubt('cannot', 'LH-1')).toMatch(/^Field box LH-1 cannot run it/);
    expect(fallbackDoubt('not-told', 'LH-1')).toMatch(/has not yet said/);
  });
});

describe('A switching of a fallback', () => {
  const reason = { point: 'bench-1', value: 1.94, why: 'below', below: 2, above: 5 };
  const said = (more: Partial<typeof reason> | { value: null; why: null }, on: boolean) =>
    spaced(fallbackReason({ ...reason, ...more }, on, () => 'the bench', scene.preferences));

  it.each([
    [{}, true, 'ran it by itself, while nobody commanded it: the bench at 1.9 °C was under 2 °C.'],
    [
      { why: 'above', value: 5.1 },
      false,
      'stopped it by itself, while nobody commanded it: the bench at 5.1 °C was over 5 °C.',
    ],
    [
      { why: 'longest' },
      false,
      'stopped it by itself, while nobody commanded it: it had run for as long as it may, and rests.',
    ],
    [
      { why: 'dead-point' },
      false,
      'stopped it by itself, while nobody commanded it: the bench could not be read.',
    ],
    [{ why: 'command' }, false, 'stopped it by itself, while nobody commanded it: it is commanded again.'],
    [{ why: null, value: null }, true, 'ran it by itself, while nobody commanded it.'],
  ] as const)('%o', (more, on, words) => expect(said(more, on)).toBe(`The field box ${words}`));
});
