import { describe, expect, it } from 'vitest';
import { fromLocal, toLocal } from '@/lib/units/local-time';

describe('a time typed into a field', () => {
  it('is the house’s time, wherever the browser stands', () => {
    expect(fromLocal('2026-11-26T23:05', 'Europe/Zurich')).toBe(Date.parse('2026-11-26T22:05:00Z'));
    expect(toLocal(Date.parse('2026-11-26T22:05:00Z'), 'Europe/Zurich')).toBe('2026-11-26T23:05');
  });

  it('that the clock skips in spring is read with the offset before', () => {
    expect(fromLocal('2026-03-29T02:30', 'Europe/Zurich')).toBe(Date.parse('2026-03-29T01:30:00Z'));
  });

  it('that comes twice in autumn is the first', () => {
    expect(fromLocal('2026-10-25T02:30', 'Europe/Zurich')).toBe(Date.parse('2026-10-25T00:30:00Z'));
  });

  it.each(['', 'yesterday', '2026-02-30T10:00', '2026-11-26'])('is none where it reads %j', (text) => {
    expect(fromLocal(text, 'Europe/London')).toBeNull();
  });
});
