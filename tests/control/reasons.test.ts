/** What each claim says of itself, whole: values, limits and instants, worked out on paper. */
import { describe, expect, it } from 'vitest';
import type { HouseConfig } from '@/lib/control/types';
import { body, channel, house, MIN, point, rest, rule, S, source, START } from './house';
import { Player } from './player';

const at = (seconds: number) => START + seconds * S;
const readings = { bench: 5, air: 10, core: 50, base: 40 };
const config = (more: Partial<HouseConfig> & { frostLimit?: number } = {}, fan = {}, own = body()) =>
  house({
    sources: [source('heap', { coreFloor: 38 })],
    channels: [channel('fan', 1, { source: 'heap', ...fan })],
    rules: [rule('fan', own)],
    ...more,
  });
const played = (values: object, ...given: Parameters<typeof config>) =>
  new Player(config(...given), { ...readings, ...values });
const reason = (player: Player) => [player.says(), player.of().because, player.of().until];

describe('the reason of', () => {
  it('lock-out: who, why and since when', () => {
    const player = played({});
    player.pass(60 * S).order({ kind: 'lock-out', channel: 'fan', lockout: 'l', why: 'belt' });
    expect(reason(player)).toEqual([
      'off lock-out',
      { lockouts: [{ id: 'l', why: 'belt', by: 'Ann', placedAt: at(60) }] },
      null,
    ]);
  });

  it('limit: the value over it, and where it begins again', () => {
    const player = played({}, {}, { highLimit: { point: 'air', above: 20 } }).at({ air: 20.5 });
    const over = { point: 'air', above: 20, againAtOrBelow: 19 };
    expect(reason(player)).toEqual(['off limit', { cause: 'high-limit', value: 20.5, ...over }, null]);
  });

  it('limit: a point that is dead, or is not there', () => {
    const dead = { cause: 'high-limit-point-bad', value: null, above: 20, againAtOrBelow: 19 };
    for (const key of ['base', 'nobody']) {
      const player = new Player(config({}, { highLimit: { point: key, above: 20 } }), { bench: 3, core: 50 });
      expect(reason(player)).toEqual(['off limit', { ...dead, point: key }, null]);
    }
  });

  it('limit: the longest run, and the end of its least off', () => {
    const player = played({ bench: 3 }, {}, { longestOnS: 600, minOffS: 60 });
    player.pass(610 * S);
    const until = at(660);
    expect(reason(player)).toEqual(['off limit', { cause: 'longest-on', longestOnS: 600, until }, until]);
  });

  it('proving: who, how long, until when', () => {
    const player = played({});
    player.order({ kind: 'prove', channel: 'fan', seconds: 60 });
    expect(reason(player)).toEqual(['on proving', { by: 'Ann', seconds: 60, until: at(60) }, at(60)]);
  });

  it('short-cycle: what it holds, since and until when, against whom', () => {
    const player = played({ bench: 3 }, {}, { minOnS: 120, minOffS: 300 });
    player.until(at(30)).at({ bench: 8 });
    const on = { holds: 'on', holdsSince: at(0), leastS: 120, until: at(120) };
    expect(reason(player)).toEqual(['on short-cycle', { ...on, wanted: 'off', wantedBy: 'idle' }, at(120)]);
    player.until(at(120)).at({ bench: 3 });
    const off = { holds: 'off', holdsSince: at(120), leastS: 300, until: at(420) };
    expect(reason(player)).toEqual(['off short-cycle', { ...off, wanted: 'on', wantedBy: 'band' }, at(420)]);
  });

  it('hand: who, since and until when, and that its point is dead', () => {
    const player = played({});
    player.pass(10 * S);
    player.order({ kind: 'hand', channel: 'fan', state: 'on', seconds: 7200, holdInFrost: false });
    const given = { state: 'on', by: 'Ann', givenAt: at(10), holdInFrost: false };
    expect(reason(player)).toEqual(['on hand', { ...given, until: at(7210) }, at(7210)]);
    player.silent.add('bench');
    player.pass(2 * MIN);
    const dead = { pointDeadSince: at(100.001), until: at(1900.001) };
    expect(reason(player)).toEqual(['on hand', { ...given, ...dead }, at(1900.001)]);
  });

  it('source guard: the core under its floor, and the one not ready yet', () => {
    const guard = { source: 'heap', point: 'core' };
    const floor = { ...guard, cause: 'core-floor', value: 37, floor: 38, againAtOrAbove: 39 };
    expect(reason(played({ core: 37 }))).toEqual(['off source-guard', floor, null]);
    const heap = source('heap', { ready: { level: 45, forS: 3600 } });
    const ready = { ...guard, cause: 'not-ready', value: 50, level: 45, forS: 3600 };
    const until = at(3600);
    expect(reason(played({}, { sources: [heap] }))).toEqual([
      'off source-guard',
      { ...ready, aboveSince: at(0), until },
      until,
    ]);
    expect(reason(played({ core: 45 }, { sources: [heap] }))[1]).toEqual({
      ...{ ...ready, value: 45, aboveSince: null, until: null },
    });
    const blind = source('heap', { corePoint: null, ready: { level: 45, forS: 3600 } });
    expect(reason(played({}, { sources: [blind] }))[1]).toEqual({
      ...{ ...ready, point: null, value: null, aboveSince: null, until: null },
    });
  });

  it('frost: the coldest, the limit, and what it borrows from', () => {
    const helps = [{ frostLimit: 3 }, { frostHelp: true }] as const;
    const told = { point: 'air', value: 2, limit: 3, endsAtOrAbove: 4, frostSince: at(0), part: 'helps' };
    expect(reason(played({ air: 2 }, ...helps))).toEqual(['on frost', { ...told, borrows: null }, null]);
    const player = played({ air: 2 }, ...helps, body({ rest: rest(600, 1200) }));
    player.pass(601 * S);
    expect(player.of().because).toEqual({ ...told, borrows: 'rest' });
    player.silent.add('air').add('bench');
    player.pass(2 * MIN);
    // the last readings are of 601 s: blind from 691 s on
    const until = at(691.001 + 1800);
    expect(reason(player)[1]).toEqual({ ...told, point: null, value: null, borrows: 'rest', until });
  });

  it('fail-safe: every point that it hangs on, and why each is of no use', () => {
    const own = body({ standIns: [{ point: 'spare', offset: 0 }] });
    const points = [...house().points, point('spare', 'bench')];
    const player = played({}, { points }, {}, own);
    player.silent.add('bench');
    player.pass(2 * MIN);
    const named = [
      { point: 'bench', why: 'silent', lastAt: at(0) },
      { point: 'spare', why: 'never-spoke', lastAt: null },
    ];
    expect(reason(player)).toEqual(['off fail-safe', { safe: 'off', points: named }, null]);
  });

  it('band: the rule, its point and thresholds, and where it stops', () => {
    const told = { rule: 'rule-fan', version: 1, low: 4, high: 7.5, latch: true, why: 'wants' };
    expect(reason(played({ bench: 3 }))).toEqual([
      'on band',
      { ...told, purpose: 'warm', point: 'bench', value: 3, stops: { side: 'above', value: 7.5 } },
      null,
    ]);
    const cool = body({ purpose: 'cool', standIns: [{ point: 'air', offset: 0.5 }] });
    const player = played({ bench: 8 }, {}, {}, cool);
    player.silent.add('bench');
    player.pass(2 * MIN);
    expect(player.of().because).toEqual({
      ...{ ...told, purpose: 'cool', point: 'air', standInFor: 'bench', value: 10.5 },
      stops: { side: 'below', value: 4 },
    });
  });
});

describe('the reason of rest', () => {
  const waiting = body({ rest: rest(600, 1200, { until: { point: 'base', level: 43 }, most: 5400 }) });

  it('tells a spent credit, its ends, and the level that it waits for', () => {
    const player = played({ bench: 3 }, { frostLimit: 2 }, { frostHelp: true }, waiting);
    player.pass(700 * S);
    const told = {
      ...{ cause: 'credit-spent', source: 'heap', credit: 0, frostBreaksBelow: 2 },
      ...{ restSince: at(600), restAtMostUntil: at(6000) },
      recovery: { point: 'base', value: 40, level: 43, good: true },
    };
    expect(reason(player)).toEqual(['off rest', { ...told, restUntil: at(1800), until: at(1800) }, at(1800)]);
    player.until(at(1900));
    expect(reason(player)).toEqual(['off rest', { ...told, restUntil: at(6000), until: at(6000) }, at(6000)]);
  });

  it('tells a spent day, and a start that is not worth it', () => {
    const heap = source('heap', { dailyLimitS: 600 });
    const own = body({ rest: rest(7200, 1200) });
    const spent = played({ bench: 3 }, { sources: [heap] }, {}, own);
    spent.pass(600 * S);
    const day = { source: 'heap', until: null, drawnS: 600, limitS: 600 };
    expect(spent.of().because).toEqual({
      ...day,
      cause: 'daily-limit',
      credit: expect.closeTo(1 - 600 / 7200, 9),
    });
    const short = played({ bench: 3 }, { sources: [heap] }, { minOnS: 120 }, own);
    short.until(at(500)).at({ bench: 8 });
    short.until(at(1000)).at({ bench: 3 });
    expect(short.of().because).toEqual({
      ...{ source: 'heap', until: null, cause: 'not-worth-a-start', limitS: 600, leastOnS: 120 },
      credit: expect.closeTo(1, 2),
      drawnS: expect.closeTo(500, 2),
      worthS: expect.closeTo(100, 2),
    });
  });

  it('tells a draw without gain', () => {
    const leastGain = { kelvin: 3, after: 900, intake: 'air', return: 'base' };
    const own = body({ rest: rest(7200, 1200, { leastGain }) });
    const player = played({ bench: 3, air: 38 }, {}, {}, own);
    player.pass(1030 * S);
    expect(player.of().because).toMatchObject({
      cause: 'no-gain',
      leastGainK: 3,
      credit: 0,
      until: at(2220),
    });
    const two = played(
      { bench: 3, air: 38 },
      {
        channels: [channel('fan', 1, { source: 'heap' }), channel('second', 2, { source: 'heap' })],
        rules: [rule('fan', own), rule('second', body({ rest: rest(7200, 1200) }))],
      },
    );
    two.pass(1030 * S);
    expect(two.of().because).toEqual({
      ...{ cause: 'no-gain', source: 'heap', credit: expect.closeTo(1 - (1020 * 2 + 10) / 7200, 6) },
      ...{ leastGainK: 3, restUntil: at(2220), until: at(2220) },
    });
    expect(two.faults()).toContain('no-gain');
  });
});
