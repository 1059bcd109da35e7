import { describe, expect, it } from 'vitest';
import { addressOf, readAddress } from '@/components/duty/address';

describe('the address of Duty', () => {
  it('says nothing of what is as usual', () => {
    expect(addressOf('long-house', readAddress({}), {})).toBe('/long-house/duty');
  });

  it('comes back as it was read', () => {
    const given = { source: 'gate-heap', nights: '100', sort: 'heat', order: 'down', night: '2026-11-26' };
    const address = readAddress(given);
    const again = new URL(addressOf('long-house', address, {}), 'http://x').searchParams;
    expect(readAddress(Object.fromEntries(again))).toEqual(address);
  });

  it.each([
    { nights: '-1' },
    { nights: '1e9' },
    { sort: 'drop table' },
    { night: '<b>' },
    { order: ['up', 'x'] },
  ])('shows the usual page for what it cannot mean: %j', (given) => {
    expect(readAddress(given)).toEqual(readAddress({}));
  });
});
