import { describe, expect, it } from 'vitest';
import { addressOf } from '@/components/duty/address';
import { againstText, readAgainst } from '@/components/duty/against';
import { readAddress } from '@/components/duty/read-address';

const again = (address: ReturnType<typeof readAddress>) =>
  readAddress(Object.fromEntries(new URL(addressOf('long-house', address, {}), 'http://x').searchParams));

describe('the address of Duty', () => {
  it('says nothing of what is as usual', () => {
    expect(addressOf('long-house', readAddress({}), {})).toBe('/long-house/duty');
  });

  it.each([
    { source: 'gate-heap', nights: '100', sort: 'heat', order: 'down', night: '2026-11-26' },
    { from: '2026-11-03', to: '2026-11-09', against: 'nights.2026-10-28.2026-11-02' },
    { against: 'source.prop-house.yew-heap' },
  ])('comes back as it was read: %j', (given) => {
    const address = readAddress(given);
    expect(again(address)).toEqual(address);
    expect(address).toMatchObject({ ...given, ...('nights' in given ? { nights: 100 } : {}) });
  });

  it.each([
    { nights: '-1' },
    { nights: '1e9' },
    { sort: 'drop table' },
    { night: '<b>' },
    { night: '2026-02-30' },
    { order: ['up', 'x'] },
    { from: '2026-11-03' },
    { from: '2026-11-09', to: '2026-11-03' },
    { from: '2026-11-31', to: '2026-12-03' },
    { against: 'everything' },
    { against: '' },
  ])('shows the usual page for what it cannot mean: %j', (given) => {
    expect(readAddress(given)).toEqual(readAddress({}));
  });
});

describe('what nights are compared with', () => {
  it.each([
    'before',
    'nights.2026-11-03.2026-11-09',
    'source.prop-house.yew-heap',
    'house.prop-house',
    'house.before',
  ])('reads %s and writes it again', (text) => {
    const read = readAgainst(text);
    expect(read === null ? null : againstText(read)).toBe(text);
  });

  it.each([
    'nights.2026-11-09.2026-11-03',
    'nights.2026-02-30.2026-03-01',
    'source.prop-house',
    'source.a.b.c',
    'house.Prop house',
    'before.x',
  ])('reads nothing in %s', (text) => expect(readAgainst(text)).toBeNull());
});
