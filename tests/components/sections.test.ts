import { describe, expect, it } from 'vitest';
import {
  badgeOf,
  hrefInHouse,
  hrefOf,
  SECTIONS,
  whereIs,
  type ShellHouse,
} from '@/components/shell/sections';

const long: ShellHouse = { slug: 'long-house', name: 'Long house', alarms: 1, rules: 4 };
const prop: ShellHouse = { slug: 'prop-house', name: 'Prop house', alarms: 0, rules: 1 };
const houses = [long, prop];
const section = (key: string) => SECTIONS.find((one) => one.key === key) ?? SECTIONS[0];

describe('an address', () => {
  it('tells its house and page', () =>
    expect(whereIs('/prop-house/rules/bench-mat', houses)).toEqual({ house: prop, section: 'rules' }));
  it('of the holding keeps to the first house', () =>
    expect(whereIs('/people', houses)).toEqual({ house: long, section: 'people' }));
  it('before any house is there has none', () => expect(whereIs('/people', []).house).toBeNull());
});

describe('a menu', () => {
  it('goes to the same page of another house, but never to a single thing of it', () => {
    expect(hrefInHouse(prop, 'duty')).toBe('/prop-house/duty');
    expect(hrefInHouse(prop, 'people')).toBe('/prop-house/watch');
  });
  it('has no link to a house’s page while there is no house', () => {
    const watch = section('watch');
    expect(watch && hrefOf(watch, null)).toBeNull();
  });
  it('says what its counts count', () => {
    const [alarms, rules] = [section('alarms'), section('rules')];
    expect(alarms && badgeOf(alarms, long)).toEqual({ count: 1, words: '1 open' });
    expect(rules && badgeOf(rules, prop)).toEqual({ count: 1, words: '1 in force' });
    expect(alarms && badgeOf(alarms, prop)).toBeNull();
  });
});
