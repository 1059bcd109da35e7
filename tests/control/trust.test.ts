/** Which readings are believed and for how long, on paper: a fan on under 4, off over 7.5 °C, silent after 90 s. */
import { describe, expect, it } from 'vitest';
import type { PointConfig } from '@/lib/control/types';
import { FASTEST, ONE_WIRE_FAULTS } from '../checks/sensors';
import { body, house, point, rule, S, START } from './house';
import { Player } from './player';

const played = (more: Partial<PointConfig> = {}, first = 3) => {
  const points = [point('bench', 'bench', more)];
  const player = new Player(house({ points, rules: [rule('fan', body())] }), { bench: first });
  player.silent.add('bench');
  return player;
};

/** Up to an instant, with a reading of the bench there, if there is one; what the fan says and how good the bench is. */
function at(player: Player, atS: number, bench?: number): string {
  player.until(START + atS * S - 1);
  player.now = START + atS * S;
  if (bench !== undefined) player.observed.points = { bench: { value: bench, at: player.now } };
  player.step();
  const { quality = '', why = null } = player.result.points[0] ?? {};
  return [player.says(), quality, ...(why === null ? [] : [why])].join(', ');
}

describe('an implausible reading', () => {
  it('leaves the last good one in force, till the silence counted from its own time', () => {
    const player = played();
    expect(at(player, 60, 200)).toBe('on band, good');
    expect(at(player, 90)).toBe('on band, good');
    expect(at(player, 90.001)).toBe('off fail-safe, bad, silent');
  });

  it('after another drops the quality, and three good ones in a row bring it back', () => {
    const player = played();
    expect(at(player, 30, 200)).toBe('on band, good');
    expect(at(player, 60, -60)).toBe('off fail-safe, bad, out-of-range');
    expect(at(player, 90, 3)).toBe('off fail-safe, bad, out-of-range');
    expect(at(player, 120, 3)).toBe('off fail-safe, bad, out-of-range');
    expect(at(player, 130, 200)).toBe('off fail-safe, bad, out-of-range');
    expect(at(player, 150, 3)).toBe('off fail-safe, bad, out-of-range');
    expect(at(player, 180, 3)).toBe('off fail-safe, bad, out-of-range');
    expect(at(player, 210, 3)).toBe('on band, good');
  });

  it('and a good one in turn do nothing', () => {
    const player = played();
    for (let turn = 0; turn < 10; turn += 1) {
      expect(at(player, turn * 60 + 30, 200)).toBe('on band, good');
      expect(at(player, turn * 60 + 60, 3)).toBe('on band, good');
    }
  });

  it('of a range is one past its ends, not at them', () => {
    for (const end of [-40, 85]) {
      const player = played();
      at(player, 30, end);
      expect(player.result.points[0]?.value).toBe(end);
    }
  });

  it.each(ONE_WIRE_FAULTS)('of a one-wire sensor is %f °C, whatever its range', (fault) => {
    const player = played({ sensor: 'one-wire', min: null, max: null });
    expect(at(player, 30, fault)).toBe('on band, good');
    expect(at(player, 60, fault)).toBe('off fail-safe, bad, one-wire-fault');
    expect(player.result.points[0]?.value).toBe(3);
  });
});

describe('a change', () => {
  it.each(FASTEST)('as fast as $what can is believed, a faster one is not', ({ kelvin, seconds }) => {
    const config = { maxRate: kelvin / seconds, staleAfterS: 2 * seconds };
    const value = (change: number) => {
      const player = played(config);
      at(player, seconds, 3 + change);
      return player.result.points[0]?.value;
    };
    expect(value(kelvin)).toBe(3 + kelvin);
    expect(value(kelvin + 0.001)).toBe(3);
    expect(value(-kelvin - 0.001)).toBe(3);
  });

  // 0.1 K a second against the 3 °C of 0 s: 9 °C can be from 60 s on
  it('is held against the last plausible value: what lasts long enough is believed in the end', () => {
    const player = played({ maxRate: 0.1 });
    expect(at(player, 30, 9)).toBe('on band, good');
    expect(at(player, 50, 9)).toBe('on band, uncertain, too-fast');
    expect(at(player, 60, 9)).toBe('on band, uncertain, too-fast');
    expect(player.result.points[0]?.value).toBe(9);
    expect(at(player, 90, 9)).toBe('on band, uncertain, too-fast');
    expect(at(player, 120, 9)).toBe('off idle, good');
  });

  it('in doubt holds the latch for 10 min, then the point counts as bad', () => {
    const player = played({ maxRate: 0.001 });
    for (let s = 30; s < 660; s += 30)
      expect(at(player, s, 60 + s / 60)).toMatch(s < 60 ? 'good' : 'uncertain');
    expect(player.says()).toBe('on band');
    expect(at(player, 659.999)).toBe('on band, uncertain, too-fast');
    expect(at(player, 660)).toBe('off fail-safe, uncertain, too-fast');
  });
});

describe('standing still', () => {
  it('is doubtful when it has lasted longer than it can, not as long, and any other value begins anew', () => {
    const player = played({ frozenAfterS: 300 });
    for (let s = 60; s <= 300; s += 60) expect(at(player, s, 3)).toBe('on band, good');
    expect(at(player, 360, 3)).toBe('on band, uncertain, frozen');
    expect(at(player, 420, 3.01)).toBe('on band, uncertain, frozen');
    expect(at(player, 480, 3.02)).toBe('on band, uncertain, frozen');
    expect(at(player, 540, 3.01)).toBe('on band, good');
    for (let s = 600; s <= 840; s += 60) expect(at(player, s, 3.01)).toBe('on band, good');
    expect(at(player, 900, 3.01)).toBe('on band, uncertain, frozen');
  });
});

describe('times', () => {
  it('of up to 2 min ahead are taken, later ones and those not newer are not', () => {
    const player = played();
    const told = (value: number, aheadS: number) => {
      player.observed.points = { bench: { value, at: player.now + aheadS * S } };
      player.step();
      return player.result.points[0]?.value;
    };
    player.now += 10 * S;
    expect(told(5, 120.001)).toBe(3);
    expect(told(NaN, 1)).toBe(3);
    expect(told(5, 120)).toBe(5);
    expect(told(6, 120)).toBe(5);
    expect(told(7, 119)).toBe(5);
    expect(told(8, 120.001)).toBe(5);
  });

  it('count over late ones of a pack: a gap among them is a silence, none is none', () => {
    const late = (between: number[]) => {
      const player = played();
      player.now = START + 300 * S;
      const times = between.map((s) => START + s * S);
      player.observed.points = { bench: { value: 5, at: player.now, between: times } };
      player.step();
      return player.switchings();
    };
    expect(late([60, 150, 240])).toEqual([[0, 'on', 'band']]);
    // silent from 150.001 s to 300 s: the latch was off, and 5 °C does not turn it on
    expect(late([60, 240])).toEqual([
      [0, 'on', 'band'],
      [150.001, 'off', 'fail-safe'],
    ]);
  });

  it('of the worker’s own absence are not the point’s: in doubt till its next reading, and dead in its time', () => {
    const gone = () => {
      const player = played({}, 5);
      player.now = START + 1000 * S;
      player.observed.workerStartedAt = START + 990 * S;
      player.step();
      return player;
    };
    const speaks = gone();
    expect(speaks.result.points[0]).toMatchObject({ quality: 'uncertain', why: 'worker-was-away' });
    expect(at(speaks, 1030, 5)).toBe('off idle, good');
    // one that was silent before is not excused
    const silent = played({}, 5);
    expect(at(silent, 100)).toBe('off fail-safe, bad, silent');
    silent.now = START + 1000 * S;
    silent.observed.workerStartedAt = START + 990 * S;
    silent.step();
    expect(silent.result.points[0]).toMatchObject({ quality: 'bad', why: 'silent' });
    const dead = gone();
    expect(at(dead, 1080)).toBe('off idle, uncertain, worker-was-away');
    expect(at(dead, 1080.001)).toBe('off fail-safe, bad, silent');
  });
});
