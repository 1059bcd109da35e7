import { describe, expect, it } from 'vitest';
import { draftOf, emptyMaterial, judge, type EntryDraft } from '@/components/heap/entry-draft';
import type { HeapEntry } from '@/lib/schema/heap-view';

const zone = 'Europe/London';
const now = Date.parse('2026-12-01T09:00:30Z');
const target = { heap: 'gate-heap', kind: 'fed', zone, isAmended: false } as const;
const draft = (change: Partial<EntryDraft> = {}): EntryDraft => ({
  ...draftOf(undefined, now, zone),
  ...change,
});
const entry: HeapEntry = {
  ...{
    id: 'x',
    revision: 1,
    source: 'gate-heap',
    kind: 'fed',
    at: '2026-11-26T09:00:00.000Z',
    text: 'Leaves.',
  },
  materials: [
    { material: 'Dry leaves', litres: 400 },
    { material: 'Straw', kilograms: 12.5 },
  ],
  ...{ litresOfWater: 40, volume: null, smell: null, squeeze: null, photographs: [] },
  ...{ by: 'g', enteredAt: '', amendedBy: null, amendedAt: null },
};

describe('an entry that is typed', () => {
  it('becomes the body that the interface takes, empty rows left out', () => {
    const materials = [{ id: 0, material: 'Straw', amount: '12,5', unit: 'kg' } as const, emptyMaterial(1)];
    expect(judge(draft({ materials, water: '40' }), target, now)).toEqual({
      ok: true,
      body: {
        ...{ source: 'gate-heap', kind: 'fed', at: '2026-12-01T09:00:00.000Z', text: '' },
        materials: [{ material: 'Straw', kilograms: 12.5 }],
        litresOfWater: 40,
      },
    });
  });

  it.each([
    ['volume', { volume: 'large' }, 'Give a number'],
    ['litresOfWater', { water: '-5' }, 'At least 0 L'],
    ['at', { at: '' }, 'Give date and time'],
    ['at', { at: '2026-12-02T09:00' }, 'still to come'],
    ['text', { text: 'x'.repeat(4001) }, 'At most 4000'],
  ])('is told at %s what is wrong with it', (field, change, words) => {
    const judged = judge(draft(change), target, now);
    expect(judged.ok ? {} : judged.fields).toHaveProperty([field], expect.stringContaining(words));
  });

  it('is told at its material where an amount has no name', () => {
    const materials = [{ id: 0, material: ' ', amount: '5', unit: 'kg' } as const];
    const judged = judge(draft({ materials }), target, now);
    expect(judged.ok ? {} : judged.fields).toEqual({ 'materials.0.material': 'Name the material.' });
  });

  it('is as it was when it is opened to be amended', () => {
    const judged = judge(draftOf(entry, now, zone), { ...target, isAmended: true }, now);
    expect(judged.ok && judged.body).toEqual({
      ...{ kind: 'fed', at: entry.at, text: 'Leaves.', materials: entry.materials },
      ...{ litresOfWater: 40, volume: null, smell: null, squeeze: null },
    });
  });

  it('clears a quantity that is taken out while amending', () => {
    const judged = judge({ ...draftOf(entry, now, zone), water: '' }, { ...target, isAmended: true }, now);
    expect(judged.ok && judged.body['litresOfWater']).toBeNull();
  });

  it('carries what nose and hand found, and takes it out again while amending', () => {
    const felt = judge(draft({ smell: 'ammonia', squeeze: 'drops' }), target, now);
    expect(felt).toMatchObject({ ok: true, body: { smell: 'ammonia', squeeze: 'drops' } });
    const opened = draftOf({ ...entry, smell: 'sour' }, now, zone);
    const cleared = judge({ ...opened, smell: null }, { ...target, isAmended: true }, now);
    expect(cleared).toMatchObject({ ok: true, body: { smell: null } });
  });
});
