/** The limit cycle of a first-order lag under the core, against its closed form. */
import { describe, expect, it } from 'vitest';
import { CYCLES, NEVER, TRADE, TRADE_THERMOSTAT } from '../checks/control';
import { body, house, rest, rule, S, START } from './house';
import { Player } from './player';

const config = (low: number, high: number, more = {}) =>
  house({ rules: [rule('fan', body({ band: [{ from: '00:00', low, high }], ...more }))] });

interface Turn {
  atS: number;
  state: string;
  /** Where the lag was. */
  x: number;
}

/** Plays a lag (K with the fan on, 0 with it off) in steps and gives where the fan turned. */
function lag(player: Player, start: number, K: number, tauS: number, everyS: number, steps: number): Turn[] {
  let x = start;
  const turns: Turn[] = [];
  for (let step = 1; step <= steps; step += 1) {
    const before = player.of().state;
    const target = before === 'on' ? K : 0;
    x = target + (x - target) * Math.exp(-everyS / tauS);
    player.now += everyS * S;
    player.say({ bench: x }).step();
    if (player.of().state !== before) turns.push({ atS: step * everyS, state: player.of().state, x });
  }
  return turns;
}

describe('a first-order lag cycles by the closed form, to one step', () => {
  it.each(CYCLES)('$id', ({ tauS, K, h, l, onS, offS }) => {
    expect(tauS * Math.log((K - l) / (K - h))).toBeCloseTo(onS, 2);
    expect(tauS * Math.log(h / l)).toBeCloseTo(offS, 2);
    const player = new Player(config(l, h), { bench: l + 0.05 });
    const turns = lag(player, l + 0.05, K, tauS, 1, Math.ceil(1.6 * (onS + offS)));
    expect(turns.length).toBeGreaterThan(2);
    turns.slice(1).forEach((turn, index) => {
      const from = turns[index] ?? turn;
      // from where the turn before was really seen, up to a step past its threshold
      const exact =
        from.state === 'on' ? tauS * Math.log((K - from.x) / (K - h)) : tauS * Math.log(from.x / l);
      const late = turn.atS - from.atS - exact;
      expect(late).toBeGreaterThanOrEqual(0);
      expect(late).toBeLessThanOrEqual(1);
    });
  });

  it.each(NEVER)('K $K, off $h, on $l: duty $duty for good (F-CYC-NEVER)', ({ K, h, l, start, duty }) => {
    const player = new Player(config(l, h), { bench: start });
    const turns = lag(player, start, K, 3600, 60, 600);
    expect(turns).toEqual([]);
    expect(player.of().state).toBe(duty === 1 ? 'on' : 'off');
  });
});

describe('the trade thermostat', () => {
  const celsius = (fahrenheit: number) => ((fahrenheit - 32) * 5) / 9;

  it('is on under 35 °F, off over 45 °F, and between them stays as it was (F-MINON)', () => {
    const player = new Player(config(celsius(35), celsius(45)), { bench: celsius(50) });
    const states = TRADE_THERMOSTAT.readingsF.map((reading) => {
      player.now += 30 * S;
      return player.say({ bench: celsius(reading) }).step().channels[0]?.state === 'on' ? 1 : 0;
    });
    expect(states).toEqual(TRADE_THERMOSTAT.on);
  });

  it('does not switch at 35 °F and 45 °F to the last bit (J-SET)', () => {
    expect(celsius(35)).toBeCloseTo(TRADE.onC, 3);
    const player = new Player(config(celsius(35), celsius(45)), { bench: celsius(35) });
    expect(player.says()).toBe('off idle');
    player.at({ bench: celsius(35) - 1e-9 });
    expect(player.says()).toBe('on band');
    player.at({ bench: celsius(45) });
    expect(player.says()).toBe('on band');
    player.at({ bench: celsius(45) + 1e-9 });
    expect(player.says()).toBe('off idle');
  });

  it('a draw of 105 min, 45 off, and on again', () => {
    const player = new Player(config(4, 7.5, { rest: rest(105 * 60, 45 * 60) }), { bench: 3 });
    player.pass(4 * 3600 * S);
    expect(player.switchings()).toEqual([
      [0, 'on', 'band'],
      [6300, 'off', 'rest'],
      [9000, 'on', 'band'],
    ]);
  });

  it('in the limit the duty is longest draw over longest draw and least rest', () => {
    const player = new Player(config(4, 7.5, { rest: rest(2400, 1800) }), { bench: 3 });
    player.pass(24 * 3600 * S, 60 * S);
    const on = player.switchings().filter(([, state]) => state === 'on').length;
    // 86,400 s hold 20.57 cycles of 4,200 s: the 21st draw is under way
    expect(on).toBe(21);
    expect(player.heap('fan').drawnTodayS).toBe(20 * 2400 + 2400);
  });
});

it.each([1, 30, 60])('a night played at %i s switches when one at 5 s does, to one step', (everyS) => {
  const night = (step: number) => {
    const fans = house().channels.map((one) => ({ ...one, minOnS: 120, minOffS: 120 }));
    const player = new Player(
      { ...config(4, 7.5, { rest: rest(2400, 1800) }), channels: fans },
      { bench: 6 },
    );
    for (let at = step; at <= 5 * 3600; at += step) {
      player.now = START + at * S;
      player.say({ bench: 5.5 + 3 * Math.sin((2 * Math.PI * at) / 11_000 + 0.4) }).step();
    }
    return player.switchings();
  };
  const fine = night(5);
  const coarse = night(everyS);
  expect(fine.length).toBeGreaterThan(3);
  const how = (list: typeof fine) => list.map(([, state, claim]) => `${state} ${claim}`);
  expect(how(coarse)).toEqual(how(fine));
  coarse.forEach(([at], index) => {
    expect(Math.abs(at - (fine[index]?.[0] ?? NaN))).toBeLessThanOrEqual(Math.max(5, everyS));
  });
});
