/** What earlier versions of this code have written goes on where it stood: nothing of it is forgotten or made up. */
import { describe, expect, it } from 'vitest';
import { migrateMemory } from '@/lib/control/memory-versions';
import { body, channel, house, MIN, point, rest, rule, S, source } from './house';
// written by the code of version 1 at the end of `played`
import version1 from './memory-version-1.json';
import { Player } from './player';

const config = () =>
  house({
    points: [
      ...[point('bench', 'bench', { maxRate: 0.1 }), point('air', 'house-air'), point('core', 'heap-core')],
      ...[point('base', 'heap-base'), point('mute', 'outdoors'), point('torn', 'ground')],
      point('mean', 'other', { derived: { of: 'mean', points: ['bench', 'air'] } }),
      point('lost', 'other', { derived: { of: 'mean', points: ['mute', 'air'] } }),
      point('slope', 'other', { derived: { of: 'trend', points: ['core'], windowS: 600 } }),
    ],
    sources: [source('heap')],
    channels: [channel('fan', 1, { source: 'heap', minOnS: 60, minOffS: 120 }), channel('lamp', 2)],
    rules: [rule('fan', body({ rest: rest(1200, 1800) }))],
  });

/** A draw that goes on, a reading in doubt, points that never spoke or fell silent, and one that was taken away. */
function played(): Player {
  const all = config();
  const more = { ...all, points: [...all.points, point('gone', 'other')] };
  const player = new Player(more, { bench: 3, air: 10, core: 50, base: 40, torn: 85.1, gone: 7 });
  player
    .pass(5 * MIN)
    .at({ bench: 3.05, torn: 12 })
    .pass(2 * MIN);
  player.silent.add('base');
  player
    .pass(3 * MIN)
    .replan(all)
    .pass(1 * MIN);
  return player.say({ bench: 30 }).pass(30 * S);
}

describe('a memory of version 1', () => {
  const migrated = migrateMemory(version1);

  it('becomes what today’s code remembers of the same hour', () => {
    expect(migrated).toStrictEqual(played().memory);
  });

  it('holds what it is to hold: a draw, a suspect reading, silence, and points without any', () => {
    const { points, readings, parked, channels } = migrated;
    const of = (id: string) => points.findIndex((one) => one.id === id);
    expect(channels[0]).toMatchObject({ id: 'fan', wanted: 'on', claim: 'band' });
    expect(points[of('bench')]).toMatchObject({ hasValue: true, suspects: 1 });
    expect(readings.value[of('bench')]).toBe(3.05);
    expect(readings.lastAt[of('bench')]).toBeGreaterThan(readings.at[of('bench')] ?? NaN);
    expect(points[of('mute')]).toMatchObject({ hasValue: false, why: 'never-spoke' });
    expect(points[of('base')]).toMatchObject({ hasValue: true, why: 'silent' });
    expect(points[of('slope')]?.trail?.length).toBeGreaterThan(10);
    expect(parked.points).toMatchObject([{ id: 'gone', reading: { value: 7 } }]);
  });

  it('goes on step by step as if the code had never changed', () => {
    const here = played();
    const there = new Player(config(), {}, migrated, here.now);
    for (const player of [here, there])
      player
        .say({ bench: 30, air: 10, core: 50, torn: 12 })
        .pass(60 * MIN)
        .say({ bench: 30.1 })
        .pass(2 * MIN);
    expect(there.memory).toStrictEqual(here.memory);
    expect(there.switchings('fan')).toEqual(here.switchings('fan').filter(([atS]) => atS > 690));
  });

  it('that lacks what version 1 learned later gets it empty', () => {
    const { parked: _, points: __, ...bare } = version1;
    expect(migrateMemory(bare)).toMatchObject({ version: 2, points: [], parked: { points: [] } });
  });
});

it('today’s memory is taken as it is, also written out and read back', () => {
  const { memory } = played();
  expect(migrateMemory(JSON.parse(JSON.stringify(memory)))).toStrictEqual(memory);
});
