import { describe, expect, it } from 'vitest';
import { yardFacts } from '@/components/watch/yard-facts';
import { loopWords, yardWords } from '@/components/watch/yard-words';
import type { HouseState } from '@/lib/schema/house-state';
import { USUAL } from '@/lib/units/preferences';

const point = (key: string, role: string, value: number | null, quality: 'good' | 'bad' = 'good') => ({
  ...{ key, name: key, role, value, unit: 'Cel', at: '2026-11-27T05:45:00Z', quality, why: null },
});
const channel = (state: 'on' | 'off', reported: 'on' | 'off' | null) => ({
  ...{ number: 1, key: 'gate-heap-fan', label: 'Gate-heap fan', claim: 'band', because: {}, until: null },
  ...{ mode: 'auto' as const, proved: true, lockedOut: false, state, reported },
});
const state = (fan: ReturnType<typeof channel>, back: number | null = 26.2): HouseState => ({
  at: '2026-11-27T05:45:00Z',
  points: [
    point('house-air', 'house-air', 5.7),
    point('outdoors', 'outdoors', -12.3),
    point('intake', 'loop-intake', 6.2),
    point('return', 'loop-return', back, back === null ? 'bad' : 'good'),
    point('core', 'heap-core', 48),
    point('base', 'heap-base', 39.9),
  ],
  channels: [fan],
  sources: [],
  nodes: [],
});
const parts = {
  points: [],
  channels: [
    {
      ...{
        number: 1,
        key: 'gate-heap-fan',
        label: 'Gate-heap fan',
        loadKind: 'motor',
        watts: 12,
        contact: 'NO' as const,
      },
      ...{ source: 'gate-heap', frostHelp: true, minOnS: 120 },
    },
  ],
  sources: [
    { slug: 'gate-heap', name: 'Gate heap', kind: 'heap', core: 'core', base: 'base', coreFloor: 38 },
  ],
  loops: [
    { source: 'gate-heap', channel: 'gate-heap-fan', intake: 'intake', return: 'return', wattPerK: 51 },
  ],
};
const loop = (fan: ReturnType<typeof channel>, back?: number | null) => {
  const found = yardFacts(parts, state(fan, back)).heap?.loop;
  return found === undefined ? 'none' : loopWords(found, USUAL).replaceAll('\u00a0', ' ');
};

describe('the yard drawing', () => {
  it('says what a running loop brings, from its two ends', () =>
    expect(loop(channel('on', 'on'))).toBe('brings 1020 W, 6.2 °C to 26.2 °C'));
  it('says that a loop takes heat when it comes back colder', () =>
    expect(loop(channel('on', 'on'), 4.2)).toBe('takes 102 W, 6.2 °C to 4.2 °C'));
  it('draws no air moving before the relay says so', () =>
    expect(loop(channel('on', 'off'))).toBe('loop ordered on, not yet reported'));
  it('knows no heat where an end is not read', () =>
    expect(loop(channel('on', 'on'), null)).toBe('air moves; its heat is not known'));
  it('is grey at rest', () => expect(loop(channel('off', 'off'))).toBe('loop at rest'));
  it('is told in words, with what is not known', () =>
    expect(yardWords(yardFacts(parts, state(channel('off', 'off'))), USUAL).replaceAll('\u00a0', ' ')).toBe(
      'House 5.7 °C. Outdoors −12.3 °C. Gate heap: core 48.0 °C, beside the pipe 39.9 °C; loop at rest.',
    ));
});
