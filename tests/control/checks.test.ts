/** Each thing to look at: once with what brings it up, once without. */
import { describe, expect, it } from 'vitest';
import { check } from '@/lib/control/check';
import type { CheckContext } from '@/lib/control/checks/finding';
import type { RuleBody } from '@/lib/control/rule-body';
import type { HouseConfig } from '@/lib/control/types';
import { USUAL } from '@/lib/units/preferences';
import { TRADE } from '../checks/control';
import { body, channel, house, interlock, point, rest, rule, source } from './house';

const long = (more: Partial<HouseConfig> & { frostLimit?: number | null } = {}) =>
  house({
    sources: [source('heap')],
    channels: [
      channel('fan', 1, { source: 'heap', minOnS: 120, frostHelp: true }),
      channel('second', 2, { source: 'heap' }),
      channel('vent', 3, { loadKind: 'vent' }),
    ],
    ...more,
  });
const kinds = (ruleBody: RuleBody, config = long(), context: CheckContext = {}) =>
  check(config, { channel: 'fan', body: ruleBody }, context).map((one) => `${one.level} ${one.kind}`);
const draw = (seconds: number, more: object = {}) => body({ rest: rest(seconds, 1800, more) });
const core = (operator: 'greaterThan' | 'lessThan', value: number) => ({ fact: 'core', operator, value });
const gain = (after: number) => ({ leastGain: { kelvin: 3, after, intake: 'air', return: 'bench' } });
const cool = (low: number, high: number) =>
  body({ purpose: 'cool', point: 'air', band: [{ from: '00:00', low, high }] });
const needs = (a: string, b: string) => interlock('needs', a, b);
const loops = [{ id: 'loop', name: 'loop', source: 'heap', channel: 'fan', intake: 'in', return: 'out' }];
const loopPoints = [...house().points, point('in', 'loop-intake'), point('out', 'loop-return')];

const ranged = long({
  points: long().points.map((one) => (one.key === 'core' ? { ...one, min: -50, max: 120 } : one)),
});

interface Case {
  kind: string;
  fires: () => string[];
  not: () => string[];
}
const CASES: Case[] = [
  { kind: 'stop draw-under-least-on', fires: () => kinds(draw(119)), not: () => kinds(draw(120)) },
  {
    kind: 'look draw-under-gain-wait',
    fires: () => kinds(draw(899, gain(900))),
    not: () => kinds(draw(900, gain(900))),
  },
  {
    kind: 'stop never-holds',
    fires: () => kinds(body({ only: { all: [core('greaterThan', 50), core('lessThan', 40)] } })),
    not: () => kinds(body({ only: { all: [core('greaterThan', 40), core('lessThan', 50)] } })),
  },
  {
    // the sensor says 120 at most; corrected it may tell more
    kind: 'stop never-holds',
    fires: () => kinds(body({ only: { all: [core('greaterThan', 1e6)] } }), ranged),
    not: () => kinds(body({ only: { all: [core('greaterThan', 1e6)] } }), ranged, { corrected: ['core'] }),
  },
  {
    kind: 'stop cycle',
    fires: () => kinds(body(), long({ interlocks: [needs('fan', 'second'), needs('second', 'fan')] })),
    not: () => kinds(body(), long({ interlocks: [needs('fan', 'second'), needs('second', 'vent')] })),
  },
  { kind: 'stop unknown-point', fires: () => kinds(body({ point: 'nobody' })), not: () => kinds(body()) },
  {
    kind: 'look recovery-out-of-reach',
    fires: () =>
      kinds(draw(2400, { until: { point: 'base', level: 43.1 }, most: 5400 }), long(), {
        greatest: { base: 43 },
      }),
    not: () =>
      kinds(draw(2400, { until: { point: 'base', level: 43 }, most: 5400 }), long(), {
        greatest: { base: 43 },
      }),
  },
  {
    kind: 'look frost-limit-above-band',
    fires: () => kinds(body(), long({ frostLimit: 4.1 })),
    not: () => kinds(body(), long({ frostLimit: 4 })),
  },
  {
    kind: 'look opposite-rules',
    fires: () => kinds(body(), long({ rules: [rule('fan', cool(7, 10), 'other')] })),
    not: () => kinds(body(), long({ rules: [rule('fan', cool(7.5, 10), 'other')] })),
  },
  {
    kind: 'look sources-fight',
    fires: () => kinds(body(), long({ rules: [rule('vent', cool(7, 10))] })),
    not: () => kinds(body(), long({ rules: [rule('vent', cool(20, 25))] })),
  },
  {
    kind: 'look least-on-never-worth',
    fires: () => kinds(draw(200), long({ rules: [rule('second', draw(200))] })),
    not: () => kinds(draw(240), long({ rules: [rule('second', draw(240))] })),
  },
  {
    kind: 'look condition-on-gain',
    fires: () =>
      kinds(
        body({ only: { all: [{ fact: 'out', operator: 'greaterThan', value: 10 }] } }),
        long({ points: loopPoints, loops }),
      ),
    not: () =>
      kinds(
        body({ only: { all: [{ fact: 'in', operator: 'greaterThan', value: 10 }] } }),
        long({ points: loopPoints, loops }),
      ),
  },
  {
    kind: 'look contact-overloaded',
    // a motor of 12 W at 2 V draws 6 A, and a third of the rating is left for it: 18 A bear it, 17 do not
    fires: () => kinds(body(), long(), { channels: { fan: { volts: 2, contactAmps: 17 } } }),
    not: () => kinds(body(), long(), { channels: { fan: { volts: 2, contactAmps: 18 } } }),
  },
  {
    kind: 'look contact-overloaded',
    // 12 W at 48 V DC draw 0.25 A; a third, and of that a fifth, of 3 A is 0.2 A, of 4 A 0.267 A
    fires: () => kinds(body(), long(), { channels: { fan: { volts: 48, supply: 'dc', contactAmps: 3 } } }),
    not: () => kinds(body(), long(), { channels: { fan: { volts: 48, supply: 'dc', contactAmps: 4 } } }),
  },
  {
    kind: 'look unproved',
    fires: () => kinds(body(), long(), { channels: { fan: { proved: false } } }),
    not: () => kinds(body(), long(), { channels: { fan: { proved: true } } }),
  },
  {
    kind: 'look no-last-resort',
    fires: () => kinds(body(), long({ frostLimit: 3 }), { channels: {} }),
    not: () => kinds(body(), long({ frostLimit: 3 }), { channels: { vent: { hasFallback: true } } }),
  },
  {
    kind: 'look no-last-resort',
    fires: () =>
      kinds(body(), long({ frostLimit: 3 }), { channels: {}, lastResort: { below: 1, isProved: false } }),
    not: () =>
      kinds(body(), long({ frostLimit: 3 }), { channels: {}, lastResort: { below: 1, isProved: true } }),
  },
  {
    kind: 'look last-resort-over-band',
    fires: () => kinds(body(), long(), { lastResort: { below: 4, isProved: true } }),
    not: () => kinds(body(), long(), { lastResort: { below: 3.9, isProved: true } }),
  },
  {
    // F-NMAX, recomputed: K/(4τd) with K 40, τ 3600 s, d 1 is 10 starts an hour
    kind: 'look starts-too-often',
    fires: () =>
      kinds(body({ band: [{ from: '00:00', low: 9, high: 10 }] }), long(), {
        response: { tauS: 3600, riseK: 40 },
        channels: { fan: { startsPerHour: 9.9 } },
      }),
    not: () =>
      kinds(body({ band: [{ from: '00:00', low: 9, high: 10 }] }), long(), {
        response: { tauS: 3600, riseK: 40 },
        channels: { fan: { startsPerHour: 10 } },
      }),
  },
  {
    kind: 'look lift-too-small',
    fires: () => kinds(body(), long(), { liftK: 8.9, coldestOutdoors: -5 }),
    not: () => kinds(body(), long(), { liftK: 12.6, coldestOutdoors: -5 }),
  },
  { kind: 'look short-draw', fires: () => kinds(draw(299)), not: () => kinds(draw(300)) },
  {
    kind: 'look short-rest',
    fires: () => kinds(body({ rest: rest(2400, 299) })),
    not: () => kinds(body({ rest: rest(2400, 300) })),
  },
  {
    kind: 'look rest-without-source',
    fires: () => kinds(draw(2400), long({ channels: [channel('fan', 1)] })),
    not: () => kinds(draw(2400)),
  },
];

describe('things to look at', () => {
  it.each(CASES)('$kind is found where it is, and only there', ({ kind, fires, not }) => {
    expect(fires()).toContain(kind);
    expect(not()).not.toContain(kind);
  });

  it('name the field, and put what stops first', () => {
    const found = check(long({ frostLimit: 5 }), { channel: 'fan', body: draw(60) });
    expect(found[0]).toMatchObject({
      level: 'stop',
      kind: 'draw-under-least-on',
      paths: ['rest.longestDraw'],
    });
    expect(found.map((one) => one.level)).toEqual(['stop', 'look', 'look']);
  });

  it('say below what outdoor temperature the trade’s fan never stops (J-CHK-REACH)', () => {
    const band = [{ from: '00:00', low: TRADE.onC, high: TRADE.offC }];
    const found = check(long(), { channel: 'fan', body: body({ band }) }, { liftK: (TRADE.liftF * 5) / 9 });
    expect(found.find((one) => one.kind === 'lift-too-small')?.text).toContain(
      'under −1.7 °C outdoors this fan will never stop by itself',
    );
    expect(((TRADE.reachF - 32) * 5) / 9).toBeCloseTo(-1.667, 3);
  });

  it('two that warm and vent do not fight where an interlock or their seasons part them', () => {
    const fights = (config: HouseConfig, own = body()) => kinds(own, config).includes('look sources-fight');
    const venting = rule('vent', cool(7, 10));
    expect(fights(long({ rules: [venting] }))).toBe(true);
    const never = interlock('never-with', 'vent', 'fan');
    expect(fights(long({ rules: [venting], interlocks: [never] }))).toBe(false);
    expect(fights(long({ rules: [venting], interlocks: [needs('vent', 'fan')] }))).toBe(true);
    const inSummer = rule('vent', { ...cool(7, 10), season: { from: '05-01', to: '09-30' } });
    const winter = (to: string) => body({ season: { from: '10-01', to } });
    expect(fights(long({ rules: [inSummer] }), winter('04-30'))).toBe(false);
    expect(fights(long({ rules: [inSummer] }), winter('05-01'))).toBe(true);
  });

  it('a condition on a point that is derived from a loop’s gain is one on the gain', () => {
    const derived = (key: string, points: string[]) => ({
      ...point(key, 'other'),
      derived: { of: 'mean', points },
    });
    const points = [...loopPoints, derived('gain', ['in', 'out']), derived('smooth', ['gain'])];
    const only = { any: [{ not: { fact: 'smooth', operator: 'lessThan' as const, value: 3 } }] };
    const found = check(long({ points, loops }), { channel: 'fan', body: body({ only }) });
    expect(found).toMatchObject([{ kind: 'condition-on-gain', paths: ['only.any.0.not.fact'] }]);
  });

  it('a fact that is missing is named at its own place in the tree', () => {
    const only = { all: [core('greaterThan', 1), { any: [{ ...core('lessThan', 9), fact: 'gone' }] }] };
    expect(check(long(), { channel: 'fan', body: body({ only }) })).toMatchObject([
      { kind: 'unknown-point', paths: ['only.all.1.any.0.fact'] },
    ]);
  });

  it('speak in the degrees of their reader', () => {
    const context = { liftK: 12, preferences: { ...USUAL, temperature: 'F' as const } };
    const text = check(long(), { channel: 'fan', body: body() }, context)[0]?.text;
    // the band ends at 7.5 °C
    expect(text).toContain('21.6 °F warmer than outdoors: under 23.9 °F outdoors');
  });

  it('say nothing of an outdoors that a whole year has not brought', () => {
    const found = (coldestOutdoors: number) => kinds(body(), long(), { liftK: 12, coldestOutdoors });
    expect(found(-4.5)).not.toContain('look lift-too-small');
    expect(found(-4.4)).not.toContain('look lift-too-small');
    expect(found(-4.6)).toContain('look lift-too-small');
  });

  it('a rule is not held against its own version in force', () => {
    const config = long({ rules: [rule('fan', cool(7, 10), 'own')] });
    expect(check(config, { id: 'own', channel: 'fan', body: body() })).toEqual([]);
  });
});
