import { describe, expect, it } from 'vitest';
import { fallbackText, readFallbackText, type FallbackEntry } from '@/lib/field/fallback-log';

const at = 1_764_554_404_500;

describe('The text of a fallback', () => {
  it.each<[string, FallbackEntry]>([
    ['fallback begun at=1764554404', { what: 'begun', at: 1_764_554_404_000 }],
    [
      'fallback on at=1764554404.5 relay=1 why=below point=bench-1 value=1.94',
      { what: 'on', at, relay: 1, why: 'below', point: 'bench-1', value: 1.94 },
    ],
    [
      'fallback off at=1764554404.5 relay=12 why=dead-point point=bench-1',
      { what: 'off', at, relay: 12, why: 'dead-point', point: 'bench-1', value: null },
    ],
    ['fallback ended at=1764554404.5', { what: 'ended', at }],
  ])('%s is written and read back', (text, entry) => {
    expect(fallbackText(entry)).toBe(text);
    expect(readFallbackText(text)).toEqual(entry);
  });

  it('may name its pairs in any order, and pairs that nobody here knows', () => {
    expect(readFallbackText('fallback off relay=2 battery=12.1 why=worn-out at=1764554404.5')).toEqual({
      ...{ what: 'off', at, relay: 2, why: null, point: null, value: null },
    });
  });

  it.each([
    'the lease ended: every coil dropped',
    'fallback on at=1764554404',
    'fallback on at=1764554404 relay=0',
    'fallback on at=1764554404 relay=1.5',
    'fallback begun',
    'fallback begun at=yesterday',
    'fallback begun at=-5',
    'fallback begun at=1764554404 and then some',
    'Fallback begun at=1764554404',
  ])('“%s” tells of none', (text) => {
    expect(readFallbackText(text)).toBeNull();
  });
});
