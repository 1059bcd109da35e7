/** What control.md asks of a rule before the core ever sees it: what is required, what is refused, what is taken for granted. */
import { describe, expect, it } from 'vitest';
import { needsCycle } from '@/lib/control/interlocks';
import { compile } from '@/lib/control/compile';
import { RuleBody } from '@/lib/schema/rule';
import { body, house, rule } from './house';

const given = (more: object = {}) => ({
  purpose: 'warm',
  point: 'bench-1',
  band: [{ from: '18:00', low: 4, high: 7.5 }],
  ...more,
});
const rest = (more: object = {}) => given({ rest: { longestDraw: 2400, least: 1800, ...more } });
const only = (leaf: object) => given({ only: { all: [leaf] } });
const leastGain = (more: object = {}) => ({
  leastGain: { kelvin: 3, intake: 'intake', return: 'return', ...more },
});

/** The paths of what is wrong; none: it is taken. */
const wrong = (value: object): string[] => {
  const told = RuleBody.safeParse(value);
  return told.success ? [] : told.error.issues.map(({ path }) => path.join('.'));
};

describe('A rule’s form', () => {
  it.each<[string, object, string[]]>([
    ['a band of half a kelvin', given({ band: [{ from: '18:00', low: 4, high: 4.5 }] }), []],
    // 5.1 − 4.6 is a little under 0.5 in binary, and half a kelvin on paper
    ['a band of half a kelvin on paper', given({ band: [{ from: '18:00', low: 4.6, high: 5.1 }] }), []],
    ['a narrower one', given({ band: [{ from: '18:00', low: 4, high: 4.49 }] }), ['band.0.high']],
    ['one upside down', given({ band: [{ from: '18:00', low: 4, high: 3 }] }), ['band.0.high']],
    ['a rest that waits, with its longest', rest({ until: { point: 'base', level: 43 }, most: 5400 }), []],
    ['a rest that waits without end', rest({ until: { point: 'base', level: 43 } }), ['rest.most']],
    ['a longest rest under the least', rest({ most: 1799 }), ['rest.most']],
    ['a list for a list’s operator', only({ fact: 'core', operator: 'in', value: [1, 2] }), []],
    ['a list for one number’s', only({ fact: 'core', operator: 'equal', value: [1] }), ['only']],
    ['one number for a list’s operator', only({ fact: 'core', operator: 'notIn', value: 1 }), ['only']],
    ['an operator of nobody’s', only({ fact: 'core', operator: 'near', value: 1 }), ['only']],
    ['a path into a fact', only({ fact: 'core', operator: 'equal', value: 1, path: '$.x' }), ['only']],
    ['a fact of the time that there is', only({ fact: 'time.weekday', operator: 'equal', value: 1 }), []],
    ['a point that stands in for itself', given({ standIns: [{ point: 'bench-1' }] }), ['standIns']],
  ])('%s', (_, value, paths) => {
    const found = wrong(value);
    if (paths.length === 0) expect(found).toEqual([]);
    else for (const path of paths) expect(found.some((one) => one.startsWith(path))).toBe(true);
  });

  it('takes for granted that frost may break a rest, and waits 900 s for a gain', () => {
    expect(RuleBody.parse(rest(leastGain())).rest).toMatchObject({
      frostMayBreak: true,
      leastGain: { after: 900 },
    });
    expect(RuleBody.parse(rest({ frostMayBreak: false, ...leastGain({ after: 1800 }) })).rest).toMatchObject({
      frostMayBreak: false,
      leastGain: { after: 1800 },
    });
  });
});

describe('A ring of needs', () => {
  const lock = (channel: string, other: string) => ({ channel, other });
  it.each<[string, { channel: string; other: string }[], boolean]>([
    ['of two', [lock('a', 'b'), lock('b', 'a')], true],
    ['of three', [lock('a', 'b'), lock('b', 'c'), lock('c', 'a')], true],
    ['of one with itself', [lock('a', 'a')], true],
    ['is no ring where two need one', [lock('a', 'c'), lock('b', 'c')], false],
    ['is no ring where it ends', [lock('a', 'b'), lock('b', 'c'), lock('a', 'c')], false],
  ])('%s', (_, locks, isRing) => {
    expect(needsCycle(locks).length > 0).toBe(isRing);
  });
});

describe('A configuration whose names lead nowhere', () => {
  it('is compiled all the same: what hangs on a missing point counts as bad, and is named', () => {
    const plan = compile(
      house({ rules: [rule('fan', body({ point: 'gone' })), rule('nobody', body(), 'other')] }),
    );
    expect([...plan.missing].sort()).toEqual(['gone', 'nobody']);
    expect(plan.rules).toHaveLength(1);
  });
});
