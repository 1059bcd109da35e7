/** What somebody is told of while it stands, and no longer. */
import { describe, expect, it } from 'vitest';
import type { HouseConfig } from '@/lib/control/types';
import { body, channel, house, MIN, point, rest, rule, S, source } from './house';
import { Player } from './player';

const cold = { bench: 3, air: 10, core: 50, base: 40 };
const config = (more: Partial<HouseConfig> & { frostLimit?: number } = {}) =>
  house({
    sources: [source('heap', { dailyLimitS: 600 })],
    channels: [channel('fan', 1, { source: 'heap', frostHelp: true })],
    rules: [rule('fan', body({ rest: rest(600, 1200) }))],
    ...more,
  });
const told = (player: Player) =>
  player.events.flatMap((event) =>
    event.kind === 'fault-begun' || event.kind === 'fault-ended' ? [`${event.kind} ${event.fault.key}`] : [],
  );

describe('a fault', () => {
  it('of a spent day stands though the heap rests besides', () => {
    const player = new Player(config(), cold);
    player.pass(600 * S);
    expect(player.of().because).toMatchObject({ cause: 'credit-spent' });
    expect(player.faults()).toContain('daily-limit');
  });

  it('is told once when it begins and once when it ends', () => {
    const player = new Player(config({ frostLimit: 3 }), { ...cold, bench: 5 });
    player.at({ air: 2 }).pass(5 * MIN);
    player.at({ air: 9 }).pass(10 * MIN);
    expect(told(player)).toEqual(['fault-begun frost', 'fault-ended frost']);
  });

  it('keeps its beginning and what it was first told with', () => {
    const player = new Player(config({ frostLimit: 3 }), { ...cold, bench: 5, air: 2 });
    const since = player.now;
    player.pass(MIN).at({ air: 1 });
    expect(player.result.faults.find((one) => one.kind === 'frost')).toMatchObject({
      since,
      data: { point: 'air', value: 2, limit: 3 },
    });
  });

  it('of frost begins at the house’s own alarm limit where it has one, also without a frost limit', () => {
    const base = config();
    base.house.frostAlarm = 4;
    const player = new Player(base, { ...cold, bench: 5, air: 4 });
    expect(player.faults()).not.toContain('frost');
    expect(player.at({ air: 3.99 }).faults()).toContain('frost');
    expect(player.at({ air: 4.99 }).faults()).toContain('frost');
    expect(player.at({ air: 5 }).faults()).not.toContain('frost');
    expect(player.at({ air: -5 }).of().claim).not.toBe('frost');
  });
});

describe('a point that never spoke', () => {
  const points = [
    ...house().points,
    ...['back', 'amps', 'fact', 'input', 'limit', 'nobody'].map((key) => point(key, 'other')),
    point('mean', 'other', { derived: { of: 'mean', points: ['deep'] } }),
    point('deep', 'other', { derived: { of: 'mean', points: ['input'] } }),
  ];
  const uses = config({
    points,
    channels: [
      channel('fan', 1, {
        source: 'heap',
        runProof: { point: 'amps', above: 0.2 },
        highLimit: { point: 'limit', above: 60 },
      }),
    ],
    rules: [
      rule(
        'fan',
        body({
          standIns: [{ point: 'mean', offset: 0 }],
          only: { all: [{ fact: 'fact', operator: 'greaterThan', value: 1 }] },
          rest: rest(7200, 1200, {
            until: { point: 'base', level: 43 },
            most: 5400,
            leastGain: { kelvin: 3, after: 900, intake: 'air', return: 'back' },
          }),
        }),
      ),
    ],
  });

  it('is told of where anything hangs on it, through derived points too, and nowhere else', () => {
    const player = new Player(uses, { bench: 3, core: 50 });
    const dead = player.result.faults.flatMap((one) => (one.kind === 'point-bad' ? [one.about.point] : []));
    expect(dead.sort()).toEqual(['air', 'amps', 'back', 'base', 'fact', 'input', 'limit']);
  });
});

it('of a spent day ends by itself while the heap still rests', () => {
  // drawn from 0 to 600 s, at rest till 86,600 s; from 86,400 s on the first of it leaves the day
  const player = new Player(config({ rules: [rule('fan', body({ rest: rest(600, 86_000) }))] }), cold);
  player.pass(86_390 * S, MIN);
  const ended = player.events.find(
    (event) => event.kind === 'fault-ended' && event.fault.kind === 'daily-limit',
  );
  expect(ended).toBeUndefined();
  player.pass(20 * S, MIN);
  const at = player.events.find(
    (event) => event.kind === 'fault-ended' && event.fault.kind === 'daily-limit',
  )?.at;
  expect(at).toBe(player.now - 10 * S + 1);
});
