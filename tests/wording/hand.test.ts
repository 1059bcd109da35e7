import { describe, expect, it } from 'vitest';
import { handChoicesS, handWords, longestHandS, type HandAsk } from '@/lib/wording/hand';
import { american, scene, spaced } from './scene';

const ask: HandAsk = {
  channel: { key: 'gate-heap-fan', loadKind: 'motor', frostHelp: true },
  ...{ state: 'off', seconds: 3600, holdInFrost: false, inFrost: false, frostLimit: 3, coreUnderFloor: null },
};
const words = (change: Partial<HandAsk>, to = scene) =>
  spaced(handWords({ ...ask, ...change }, to).join(' '));

describe('a hand command says before it is given', () => {
  it('what happens, till when, and that frost ends it', () =>
    expect(words({})).toBe(
      'The gate-heap fan stands still till 06:45 (1 h), whatever its rule and its rest say; then it goes back to auto. Frost ends this: when the house falls under 3 °C it helps again by itself.',
    ));
  it('what it means to hold it in frost', () => {
    expect(words({ holdInFrost: true })).toContain('It stays off even when the house falls under 3 °C.');
    expect(words({ holdInFrost: true, inFrost: true })).toContain(
      'There is frost now, and it will not help.',
    );
  });
  it('what drawing on a cold heap risks, in the reader’s degrees', () =>
    expect(words({ state: 'on', coreUnderFloor: { value: 36.5, floor: 38 } }, american)).toContain(
      'The heap’s core is at 97.7 °F, under its floor of 100.4 °F: drawing on it now may cool it so far that it stops working.',
    ));
  it('what a vent does in its own words', () =>
    expect(
      words({ channel: { key: 'ridge-vent', loadKind: 'vent', frostHelp: false }, state: 'on' }),
    ).toMatch(/^The ridge vent opens till/));
});

describe('how long a hand may last', () => {
  it('is an hour for a heater and twelve for others', () => {
    expect(longestHandS('heater', 'on')).toBe(3600);
    expect(longestHandS('motor', 'on')).toBe(43_200);
    expect(longestHandS('heater', 'off')).toBe(43_200);
  });
  it('is offered from the usual down the list, never beyond what is allowed', () => {
    expect(handChoicesS('heater', 'on')).toEqual([1800, 900, 3600]);
    expect(handChoicesS('motor', 'off')[0]).toBe(3600);
    expect(Math.max(...handChoicesS('motor', 'on'))).toBe(43_200);
  });
});
