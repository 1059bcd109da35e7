import { describe, expect, it } from 'vitest';
import { coreTrend } from '@/lib/analysis/core';
import type { BookEntry, Dismissal, HeapFacts } from '@/lib/analysis/heap-facts';
import { heapFindings, ACT_C, WATCH_C } from '@/lib/analysis/heap-findings';
import { heapMix } from '@/lib/analysis/material-book';
import { recoverySlower } from '@/lib/analysis/slower-recovery';
import { selfHeating } from '../checks/heap-book';

const DAY = 86_400_000;
const now = Date.parse('2026-12-01T09:00:00Z');
const nothing: HeapFacts = {
  ...{ now, core: null, trend: null, dawns: [], recovery: null, mix: null, entries: [], probes: null },
};
const entry = (id: string, daysAgo: number, kind: string, more: Partial<BookEntry> = {}): BookEntry => ({
  ...{ id, at: now - daysAgo * DAY, kind, smell: null, squeeze: null },
  ...more,
});
const dawnsOf = (values: number[]) =>
  values.map((value, i) => ({ at: now - (values.length - 1 - i) * DAY, value }));
const falling = (values: number[]): Partial<HeapFacts> => {
  const dawns = dawnsOf(values);
  return { dawns, trend: coreTrend(dawns) };
};
const kinds = (facts: Partial<HeapFacts>, dismissals: Dismissal[] = []) =>
  heapFindings({ ...nothing, ...facts }, dismissals).open.map((one) => one.kind);
const FALL = [50, 49.4, 49, 48.2, 47.5, 47, 46.2];

describe('a heap of which nothing is known', () => {
  it('has no findings', () => expect(kinds({})).toEqual([]));
});

describe('a core that falls', () => {
  it('is found where the fall is beyond its wander', () => {
    expect(kinds(falling(FALL))).toEqual(['core-falls']);
    expect(kinds(falling([50, 48, 51, 47, 50, 46, 48.5]))).toEqual([]);
  });

  const set = (level: number, mark = 'since t'): Dismissal => ({
    ...{ id: 'd', kind: 'core-falls', mark, level, why: 'Cold week.', by: 'g', at: now },
  });
  const facts = { ...falling(FALL), entries: [entry('t', 20, 'turned')] };

  it('once set aside stays so, and is shown with who set it aside', () => {
    const found = heapFindings({ ...nothing, ...facts }, [set(-46.2)]);
    expect(found.open).toEqual([]);
    expect(found.dismissed).toMatchObject([{ dismissal: { by: 'g' }, finding: { kind: 'core-falls' } }]);
  });

  it('comes back when it has fallen by two degrees more, or falls again after the heap was worked', () => {
    expect(kinds(facts, [set(-48.2)])).toEqual(['core-falls']);
    expect(kinds(facts, [set(-48.1)])).toEqual([]);
    expect(kinds(facts, [set(-46.2, 'since an earlier turning')])).toEqual(['core-falls']);
  });
});

describe('nose and hand', () => {
  it.each([
    ['ammonia', { smell: 'ammonia' }, ['cn-low']],
    ['rotten egg', { smell: 'rotten-egg' }, ['wet']],
    ['sour', { smell: 'sour' }, ['wet']],
    ['water that runs', { squeeze: 'runs' }, ['wet']],
    ['stuff that crumbles', { squeeze: 'crumbles' }, ['dry']],
    ['earth and a few drops', { smell: 'earthy', squeeze: 'drops' }, []],
  ] as const)('%s', (_, found, expected) => {
    expect(kinds({ entries: [entry('n', 1, 'note', found)] })).toEqual(expected);
  });

  it('are believed until the heap is worked on, and for ten days', () => {
    const dry = { squeeze: 'crumbles' } as const;
    expect(kinds({ entries: [entry('w', 1, 'watered'), entry('n', 2, 'note', dry)] })).toEqual([]);
    expect(kinds({ entries: [entry('n', 11, 'note', dry)] })).toEqual([]);
  });

  it('what was found last counts', () => {
    const entries = [entry('b', 1, 'note', { squeeze: 'drops' }), entry('a', 2, 'note', { squeeze: 'runs' })];
    expect(kinds({ entries })).toEqual([]);
  });
});

describe('the mix as it went in', () => {
  const built = [entry('b', 12, 'built')];
  const mixOf = (...materials: [string, number][]) =>
    heapMix(
      [{ materials: materials.map(([material, kilograms]) => ({ material, kilograms })), litresOfWater: 0 }],
      [],
    );

  it('is found dry or low in carbon only beyond its uncertainty', () => {
    expect(kinds({ entries: built, mix: mixOf(['straw', 500], ['hen manure', 50]) })).toContain('dry');
    expect(kinds({ entries: built, mix: mixOf(['hen manure', 900], ['leaves', 20]) })).toContain('cn-low');
    expect(kinds({ entries: built, mix: mixOf(['horse manure with straw', 500]) })).toEqual([]);
  });

  it('gives way to a squeeze that says otherwise', () => {
    const entries = [entry('n', 1, 'note', { squeeze: 'drops' }), ...built];
    expect(kinds({ entries, mix: mixOf(['straw', 500], ['hen manure', 50]) })).not.toContain('dry');
  });

  it('says nothing where much of it is unknown', () => {
    expect(kinds({ entries: built, mix: mixOf(['straw', 500], ['moon dust', 500]) })).toEqual([]);
  });
});

describe('a heap that heats itself towards fire', () => {
  it('is watched over 165 °F and acted on over 185 °F', () => {
    expect(WATCH_C).toBeCloseTo(selfHeating.watchC, 2);
    expect(ACT_C).toBe(selfHeating.actC);
    const at = (value: number) => heapFindings({ ...nothing, core: { value, at: now } }, []).open[0]?.urgency;
    expect([73.8, 74, 85, 85.1].map(at)).toEqual([undefined, 'soon', 'soon', 'act']);
  });

  it('is found by a probe round too, and once it is acute a former dismissal does not hide it', () => {
    const probes = { id: 'p', at: now - DAY, hottestC: 86, coldestC: 70 };
    const earlier = { id: 'd', kind: 'too-hot', mark: 'over 165 °F', level: 86, why: '', by: 'g', at: now };
    expect(kinds({ core: { value: 60, at: now }, probes }, [earlier])).toEqual(['too-hot']);
  });
});

it('a round with 25 degrees between its places is uneven, until the heap is turned', () => {
  const probes = { id: 'p', at: now - DAY, hottestC: 46, coldestC: 20 };
  expect(kinds({ probes })).toEqual(['uneven']);
  expect(kinds({ probes, entries: [entry('t', 0.5, 'turned')] })).toEqual([]);
});

describe('coming back more slowly', () => {
  const history = (low: number, value: number, ...tau: number[]) => ({
    weeks: tau.map((tauS, i) => ({ at: now + i * 7 * DAY, tauS, tauSdS: 120 })),
    ratioPerWeek: { value, low, high: 2 * value - low },
  });

  it('is found where the interval of the weeks’ trend leaves out no change', () => {
    const slower = history(1.03, 1.08, 1700, 1850, 1980, 2150, 2310);
    expect(recoverySlower(slower)?.body).toMatchObject({ fromS: 1700, toS: 2310, weeks: 5 });
    expect(kinds({ recovery: slower })).toEqual(['recovery-slower']);
  });

  it.each([
    ['an interval that holds no change', history(0.99, 1.08, 1700, 1850, 1980, 2150, 2310)],
    ['a rise that nobody would feel', history(1.005, 1.01, 1700, 1720, 1740, 1760, 1780)],
    ['too few weeks for a trend', { ...history(1, 1, 1700, 2400), ratioPerWeek: null }],
    ['no weeks', history(1.1, 1.2)],
  ])('is not found in %s', (_, of) => expect(recoverySlower(of)).toBeNull());
});
