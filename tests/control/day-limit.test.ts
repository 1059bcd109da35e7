/** The rolling 24 h of a source: channel-seconds on, two fans twice. On paper. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { settleDay, usedMs } from '@/lib/control/day';
import { fit } from '@/lib/control/fit';
import { emptyMemory, type SourceMemory } from '@/lib/control/memory';
import { compile } from '@/lib/control/compile';
import { body, channel, H, house, rest, rule, S, source } from './house';
import { holds } from './table';

const cold = { bench: 3, air: 10, core: 50, base: 40 };
const DAY_S = 86_400;
const fan = (key: string, number: number, more = {}) =>
  channel(key, number, { source: 'heap', frostHelp: true, ...more });
const config = (dailyLimitS: number, more = {}, restMore = {}, frostLimit: number | null = null) =>
  house({
    frostLimit,
    sources: [source('heap', { dailyLimitS })],
    channels: [fan('fan', 1, more), fan('second', 2, more)],
    rules: [
      rule('fan', body({ rest: rest(DAY_S, 60, restMore) })),
      rule('second', body({ point: 'air', rest: rest(DAY_S, 60, restMore) })),
    ],
  });

describe('the daily limit', () => {
  // two fans count twice: 3,600 channel-seconds are 1,800 s
  holds('counts every fan', {
    config: config(3600),
    reads: { ...cold, air: 3 },
    rows: [
      [1799.999, null, { fan: 'on band', second: 'on band' }],
      [1800, null, { fan: 'off rest', second: 'off rest' }],
      [DAY_S, null, { fan: 'off rest', second: 'off rest' }],
      // a millisecond has left the 24 h
      [DAY_S + 0.001, null, { fan: 'on band', second: 'on band' }],
    ],
  });

  // 1,000 s drawn from 0 and from 40,000 s on: what the first leaves from 86,400 s on can be had again till 87,400
  holds('rolls: what was drawn a day ago may be drawn again, as long as it was', {
    config: config(2000),
    reads: cold,
    rows: [
      [1000, { bench: 8 }, 'off idle'],
      [40_000, { bench: 3 }, 'on band'],
      [40_999.999, null, 'on band'],
      [41_000, null, 'off rest'],
      [DAY_S, null, 'off rest'],
      [DAY_S + 0.001, null, 'on band'],
      [DAY_S + 1000, null, 'on band'],
      [DAY_S + 1000.001, null, 'off rest'],
      [DAY_S + 40_000, null, 'off rest'],
      [DAY_S + 40_000.001, null, 'on band'],
    ],
  });

  // 100 s of 600 are left, under 120; 20 s more have left at 86,420 s
  holds('allows no start that what is left does not carry for the least on time', {
    config: config(600, { minOnS: 120 }),
    reads: cold,
    rows: [
      [500, { bench: 8 }, 'off idle'],
      [1000, { bench: 3 }, 'off rest'],
      [DAY_S + 19.999, null, 'off rest'],
      [DAY_S + 20, null, 'on band'],
    ],
  });

  // 480 of 600 are used at 480 s, when the second wants to: 120 s left carry two for 60 s, one for 120
  holds('is shared by those that draw: a start beside another must be worth it for both', {
    config: config(600, { minOnS: 120 }),
    reads: cold,
    rows: [
      [480, { air: 3 }, { fan: 'on band', second: 'off rest' }],
      [600, null, { fan: 'off rest', second: 'off rest' }],
    ],
  });

  holds('gives way to frost', {
    config: config(600, {}, {}, 3),
    reads: { ...cold, bench: 3.5 },
    rows: [
      [600, null, 'off rest'],
      [700, { bench: 2.9 }, 'on frost'],
      [5000, null, 'on frost'],
    ],
  });

  holds('but not where the rule keeps its rest from frost', {
    config: config(600, {}, { frostMayBreak: false }, 3),
    reads: { ...cold, bench: 3.5 },
    rows: [
      [600, null, 'off rest'],
      [700, { bench: 2.9 }, 'off rest'],
    ],
  });
});

describe('its account', () => {
  const fresh = (): SourceMemory => {
    const [first] = fit(compile(config(600)), { ...emptyMemory(), at: 0 }).sources;
    if (first === undefined) throw new Error('The house has a source.');
    return first;
  };

  it('is the sum over the last 24 h, whenever it is asked and however often it was', () => {
    const spells = fc.array(
      fc.record({ s: fc.integer({ min: 1, max: 20_000 }), draws: fc.integer({ min: 0, max: 3 }) }),
      { minLength: 1, maxLength: 60 },
    );
    fc.assert(
      fc.property(spells, fc.boolean(), (list, looksBetween) => {
        let memory = fresh();
        let at = 0;
        const drawn: [number, number, number][] = [];
        for (const { s, draws } of list) {
          memory = settleDay(memory, draws, at);
          if (looksBetween) memory = settleDay(memory, draws, at + Math.floor((s * S) / 3));
          drawn.push([at, at + s * S, draws]);
          at += s * S;
        }
        const exact = drawn.reduce(
          (sum, [from, to, draws]) => sum + Math.max(0, to - Math.max(from, at - 24 * H)) * draws,
          0,
        );
        expect(usedMs(memory, at)).toBeCloseTo(exact, 3);
      }),
    );
  });

  it('of a load that flaps all day stays small, and right where nothing has left the day', () => {
    let memory = fresh();
    for (let turn = 0; turn < 4000; turn += 1) memory = settleDay(memory, 1 - (turn % 2), turn * 10 * S);
    expect(memory.spans.length).toBeLessThanOrEqual(500);
    expect(usedMs(memory, 40_000 * S)).toBeCloseTo(20_000 * S, 3);
  });
});
