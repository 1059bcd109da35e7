import { describe, expect, it } from 'vitest';
import { USUAL } from '@/lib/units/preferences';
import { heapCautions, heapSentence, whatWent, type HeapEntry, type HeapStanding } from '@/lib/wording/heap';
import { plainText } from '@/lib/wording/phrase';

const entry = (kind: HeapEntry['kind'], at: string, more: Partial<HeapEntry> = {}): HeapEntry => ({
  ...{ kind, at, materials: [], litresOfWater: null, volume: null },
  ...more,
});
const standing: HeapStanding = {
  name: 'Gate heap',
  zone: 'Europe/London',
  now: Date.parse('2026-12-01T09:00:00Z'),
  core: { value: 45.4, at: Date.parse('2026-12-01T08:59:00Z') },
  coreFloor: 38,
  trend: { changeK: -4.1, days: 7, isLastingFall: true },
  entries: [
    entry('turned', '2026-11-12T10:00:00Z'),
    entry('built', '2026-10-28T18:00:00Z', { volume: 10.5 }),
  ],
};
const said = (change: Partial<HeapStanding> = {}, preferences = USUAL) =>
  plainText(heapSentence({ ...standing, ...change }, preferences)).replaceAll('\u00a0', ' ');

describe('the sentence over the heap book', () => {
  it('tells age, size, core and the last turning, and to probe before the fork', () => {
    expect(said()).toBe(
      'The gate heap is 34 days old and about 10.5 m³. Its core stands at 45.4 °C and has fallen 4.1 °C in 7 days, well beyond its day-to-day wander. It was last turned on 12 November. Probe and squeeze it first; then water it or feed it on a mild day, and turn it only if that does not help.',
    );
  });

  it('counts its age in the days of the house, not in full turns of the clock', () => {
    const entries = [entry('built', '2026-11-30T23:30:00Z')];
    expect(said({ entries })).toContain('The gate heap is 1 day old.');
  });

  it('gives no advice while the core goes no way for certain', () => {
    expect(said({ trend: { changeK: -1, days: 7, isLastingFall: false } })).toMatch(
      /has fallen 1.0 °C in 7 days. It was last turned on 12 November.$/,
    );
  });

  it('says that it is under its floor, and what follows', () => {
    expect(said({ core: { value: 37.2, at: 0 } })).toContain(
      'It is under its floor of 38.0 °C, so it is not drawn on',
    );
  });

  it('warns of a heap that may catch fire before anything else that could be advised', () => {
    // USDA NRCS practice standard 317, job sheet: watch over 165 °F, act over 185 °F
    expect(said({ core: { value: 76, at: 0 } })).toContain('It is hot: over 74 °C');
    expect(said({ core: { value: 86, at: 0 } })).toContain('It is dangerously hot: over 85 °C');
  });

  it('says that the core cannot be read rather than an old value', () => {
    expect(said({ core: null })).toContain('Its core has no good reading just now.');
  });

  it('says what to enter first in an empty book', () => {
    expect(said({ entries: [], trend: null })).toContain('The book of the gate heap is empty.');
  });

  it('reads in the reader’s degrees', () => {
    expect(said({}, { ...USUAL, temperature: 'F' })).toContain('113.7 °F and has fallen 7.4 °F');
  });
});

describe('words of an entry', () => {
  it('tell what went in, in the amounts that were given', () => {
    const fed = entry('fed', '', {
      materials: [
        { material: 'Horse bedding', kilograms: 2560 },
        { material: 'Dry leaves', litres: 7.5 },
        { material: 'Straw' },
      ],
      litresOfWater: 40,
    });
    expect(whatWent(fed).replaceAll('\u00a0', ' ')).toBe(
      '2560 kg horse bedding, 7.5 L dry leaves, straw; 40 L water',
    );
  });

  it('warn of gases, heat, lifting and dust where a heap is turned', () => {
    const cautions = heapCautions('turned').join(' ');
    for (const danger of [/carbon monoxide/, /scald/, /heavy/, /moulds/]) expect(cautions).toMatch(danger);
  });
});
