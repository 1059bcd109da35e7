import { describe, expect, it } from 'vitest';
import { isothermsOf } from '@/components/heap/isotherms';
import {
  FIRST_SECTION,
  gridOf,
  isWhole,
  judgeRound,
  nextPlace,
  pressed,
  sectionDraft,
  type RoundDraft,
} from '@/components/heap/round-draft';
import { USUAL } from '@/lib/units/preferences';

const typing = (keys: string) => Array.from(keys).reduce(pressed, '');
const draft = (change: Partial<RoundDraft> = {}): RoundDraft => ({
  ...{ section: sectionDraft(FIRST_SECTION), typed: {}, place: { column: 0, row: 0 }, text: '' },
  ...change,
});

describe('the big keys', () => {
  it.each([
    ['45.4', '45.4'],
    ['.5', '0.5'],
    ['4−5', '−45'],
    ['45⌫', '4'],
    ['45..4', '45.4'],
    ['45.47', '45.4'],
    ['113.7', '113.7'],
    ['99999', '9999'],
  ])('%s leave %s', (keys, text) => expect(typing(keys)).toBe(text));

  it('take a figure with its decimal as whole, so that the next place comes', () => {
    expect(['45.4', '−2.1', '45', '45.', ''].map(isWhole)).toEqual([true, true, false, false, false]);
  });
});

describe('the way through the section', () => {
  const grid = { columns: 2, rows: 2 };
  it('goes down a column, then on to the next, and ends behind the last', () => {
    const way = [];
    for (let place = { column: 0, row: 0 }; ;) {
      way.push(`${place.column} ${place.row}`);
      const next = nextPlace(place, grid);
      if (next === null) break;
      place = next;
    }
    expect(way).toEqual(['0 0', '0 1', '1 0', '1 1']);
  });

  it('has the size that is typed, within what a round holds', () => {
    expect(gridOf({ ...sectionDraft(FIRST_SECTION), columns: '99', rows: '' })).toEqual({
      columns: 8,
      rows: 1,
    });
  });
});

describe('a round that is typed', () => {
  it('becomes the body that the interface takes, places that were not probed left out', () => {
    const judged = judgeRound(
      draft({ typed: { '0 0': '14,8', '2 1': '−2.5', '3 1': '' } }),
      'gate-heap',
      USUAL,
    );
    expect(judged).toMatchObject({
      ok: true,
      body: {
        source: 'gate-heap',
        places: [
          { column: 0, row: 0, celsius: 14.8 },
          { column: 2, row: 1, celsius: -2.5 },
        ],
      },
    });
  });

  it('in °F is kept in °C', () => {
    const judged = judgeRound(draft({ typed: { '0 0': '131' } }), 'gate-heap', {
      ...USUAL,
      temperature: 'F',
    });
    expect(judged).toMatchObject({ body: { places: [{ celsius: 55 }] } });
  });

  it('leaves out places that a smaller section no longer has', () => {
    const section = { ...sectionDraft(FIRST_SECTION), columns: '1' };
    const judged = judgeRound(draft({ section, typed: { '0 0': '20', '3 2': '30' } }), 'gate-heap', USUAL);
    expect(judged).toMatchObject({ body: { places: [{ column: 0, row: 0 }] } });
  });

  it('is told where a figure cannot be one, and where nothing was probed', () => {
    expect(judgeRound(draft({ typed: { '1 2': '999.9' } }), 'gate-heap', USUAL)).toMatchObject({
      ok: false,
      places: ['1 2'],
    });
    expect(judgeRound(draft(), 'gate-heap', USUAL)).toMatchObject({
      ok: false,
      message: 'Probe one place at least.',
    });
  });

  it('is told at the section’s field what is wrong with it', () => {
    const section = { ...sectionDraft(FIRST_SECTION), widthM: 'wide' };
    const judged = judgeRound(draft({ section, typed: { '0 0': '20' } }), 'gate-heap', USUAL);
    expect(judged).toMatchObject({ ok: false, fields: { widthM: expect.any(String) as string } });
  });
});

describe('lines of equal temperature', () => {
  const same = (celsius: number) => celsius;
  const at = ({ x, y }: { x: number; y: number }): [number, number] => [100 * x, 100 * y];
  const places = [
    { column: 0, row: 0, celsius: 14 },
    { column: 3, row: 0, celsius: 31 },
    { column: 1, row: 1, celsius: 52 },
    { column: 0, row: 2, celsius: 30 },
    { column: 3, row: 2, celsius: 35 },
  ];

  it('stand every so many degrees between the coldest and the hottest probe, each one drawn', () => {
    const { lines } = isothermsOf(FIRST_SECTION, places, at, same, 5);
    expect(lines.map((line) => line.level)).toEqual([10, 15, 20, 25, 30, 35, 40, 45, 50]);
    for (const line of lines) expect(line.path).toMatch(/^M/);
  });

  it('are drawn within the probes’ hull only, and not at all where the places lie in a line', () => {
    const { hull } = isothermsOf(FIRST_SECTION, places, at, same, 5);
    expect(hull.match(/[ML]/g)).toHaveLength(4);
    const line = places.filter((place) => place.column === 3);
    expect(isothermsOf(FIRST_SECTION, line, at, same, 5)).toEqual({ lines: [], hull: '' });
  });
});
