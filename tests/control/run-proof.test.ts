/** The proof that a load runs: over 0.2 A. Credit of 20 min, rest of 30 min. */
import { describe, expect, it } from 'vitest';
import { body, channel, house, MIN, point, rest, rule, S, source } from './house';
import { Player } from './player';

const amps = point('amps', 'current', { unit: 'A', min: 0, max: 5 });
const played = (values: Record<string, number>) =>
  new Player(
    house({
      points: [
        point('bench', 'bench'),
        point('air', 'house-air'),
        point('core', 'heap-core'),
        point('base', 'heap-base'),
        amps,
      ],
      sources: [source('heap')],
      channels: [channel('fan', 1, { source: 'heap', runProof: { point: 'amps', above: 0.2 } })],
      rules: [rule('fan', body({ rest: rest(1200, 1800) }))],
    }),
    { bench: 5, air: 5, core: 50, base: 45, amps: 0, ...values },
  );

describe('A fan that is ordered on and draws no current', () => {
  it('counts as not drawing from its first reading after it could have come up to speed', () => {
    const player = played({ bench: 3 });
    expect(player.says()).toBe('on band');
    player.pass(30 * S);
    expect(player.faults()).toEqual(['fan-standing']);
    expect(player.heap()).toMatchObject({ drawing: false });
    const { credit, drawnTodayS } = player.heap();
    player.pass(40 * MIN);
    expect(player.says()).toBe('on band');
    expect(player.heap().credit).toBeGreaterThanOrEqual(credit);
    expect(player.heap().drawnTodayS).toBe(drawnTodayS);
  });

  it('draws again, without the alarm, once its current is back', () => {
    const player = played({ bench: 3 });
    player.pass(5 * MIN);
    player.say({ amps: 0.5 }).pass(30 * S);
    expect(player.faults()).toEqual([]);
    player.pass(20 * MIN);
    expect(player.says()).toBe('off rest');
  });

  it('is not called standing by a reading from before it was switched on, nor at exactly its limit’s other side', () => {
    const player = played({ amps: 0.2 });
    player.say({ bench: 3, amps: 0.21 }).pass(30 * S);
    player.pass(30 * S);
    expect(player.faults()).toEqual([]);
    player.say({ amps: 0.2 }).pass(30 * S);
    expect(player.faults()).toEqual(['fan-standing']);
  });

  it('is believed where its proof cannot be read', () => {
    const player = played({ bench: 3 });
    player.silent.add('amps');
    player.pass(10 * MIN);
    expect(player.faults()).not.toContain('fan-standing');
    expect(player.heap().drawing).toBe(true);
  });
});

describe('A fan that is off and draws current', () => {
  it('raises an alarm half a minute after it was switched off, and goes on counting as its relay says', () => {
    const player = played({ bench: 3, amps: 0.5 });
    player.pass(5 * MIN);
    player.at({ bench: 8 });
    expect(player.says()).toBe('off idle');
    player.pass(29 * S);
    expect(player.faults()).toEqual([]);
    player.pass(31 * S);
    expect(player.faults()).toEqual(['runs-though-off']);
    expect(player.heap().drawing).toBe(false);
    player.say({ amps: 0 }).pass(30 * S);
    expect(player.faults()).toEqual([]);
  });

  it('is no such fan once it is on', () => {
    const player = played({ amps: 0.5 });
    player.pass(1 * MIN);
    expect(player.faults()).toEqual(['runs-though-off']);
    player.at({ bench: 3 });
    expect(player.faults()).toEqual([]);
  });
});
