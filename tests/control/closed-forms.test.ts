/** First-order lags under the core, played to the millisecond, against their closed forms. */
import { describe, expect, it } from 'vitest';
import { CYCLES, DEAD_TIME, MOST_STARTS, TRADE } from '../checks/control';
import { body, house, MIN, point, rest, rule, S } from './house';
import { Player } from './player';

const fahrenheit = (value: number) => ((value - 32) * 5) / 9;
const config = (low: number, high: number, more = {}) =>
  house({
    // read only where it turns: it may be silent between
    points: [point('bench', 'bench', { staleAfterS: 86_400 })],
    rules: [rule('fan', body({ band: [{ from: '00:00', low, high }], ...more }))],
  });

interface Lag {
  tauS: number;
  /** Where it tends to with the load on, and with it off. */
  K: number;
  rest?: number;
  l: number;
  h: number;
  delayS?: number;
}

/**
 * Runs `turns` turns: the reading on which the core switches comes a millisecond after the lag has passed its
 * threshold. Gives how long each turn was, s, and how far the lag went, for those after the first two.
 */
function run({ tauS, K, rest: off = 0, l, h, delayS = 0 }: Lag, turns: number) {
  const player = new Player(config(l, h), { bench: l });
  let x = l;
  const told: { state: string; lastedS: number; x: number }[] = [];
  const decay = (target: number, seconds: number) => {
    x = target + (x - target) * Math.exp(-seconds / tauS);
    player.now += Math.round(seconds * S);
  };
  for (let turn = 0; turn < turns; turn += 1) {
    const { state } = player.of();
    const began = player.now;
    // the load answers late: till then the lag goes on as before
    if (turn > 0) decay(state === 'on' ? off : K, delayS);
    const turned = x;
    const target = state === 'on' ? K : off;
    const edge = state === 'on' ? h : l;
    const seconds = tauS * Math.log((x - target) / (edge - target));
    decay(target, Math.max(0, seconds) + 1 / S);
    player.say({ bench: x }).step();
    expect(player.of().state, 'the core turned at its threshold').toBe(state === 'on' ? 'off' : 'on');
    expect(player.switchings()).toHaveLength(turn + 1);
    if (turn > 1) told.push({ state, lastedS: (player.now - began) / S, x: turned });
  }
  return told;
}

describe('the cycle of a lag', () => {
  it.each(CYCLES)(
    '$id: times on and off, duty and starts an hour',
    ({ tauS, K, h, l, onS, offS, duty, perH }) => {
      const turns = run({ tauS, K, l, h }, 12);
      const mean = (state: string) => {
        const list = turns.filter((one) => one.state === state).map((one) => one.lastedS);
        return list.reduce((sum, one) => sum + one, 0) / list.length;
      };
      const [on, off] = [mean('on'), mean('off')];
      expect(Math.abs(on - onS)).toBeLessThan(0.02);
      expect(Math.abs(off - offS)).toBeLessThan(0.02);
      expect(on / (on + off)).toBeCloseTo(duty, 4);
      expect(3600 / (on + off)).toBeCloseTo(perH, 3);
    },
  );

  it.each(MOST_STARTS.shares)(
    'F-NMAX: at a load of %f it starts %f times as often as at half',
    (load, share) => {
      const { tauS, K, bandK, perH, exactPerH } = MOST_STARTS;
      const [l, h] = [load * K - bandK / 2, load * K + bandK / 2];
      const turns = run({ tauS, K, l, h }, 10);
      const period = (turns.reduce((sum, one) => sum + one.lastedS, 0) / turns.length) * 2;
      const starts = 3600 / period;
      expect(Math.abs(starts / perH - share)).toBeLessThan(0.01 * share);
      if (load === 0.5) expect(starts).toBeCloseTo(exactPerH, 2);
    },
  );

  it('F-DEAD: a load that answers 120 s late goes past both thresholds and turns seldomer', () => {
    const { tauS, K, l, h, delayS, greatest, least, onS, offS } = DEAD_TIME;
    for (const { state, lastedS, x } of run({ tauS, K, l, h, delayS }, 9)) {
      expect(Math.abs(lastedS - (state === 'on' ? onS : offS))).toBeLessThan(0.1);
      expect(x).toBeCloseTo(state === 'on' ? least : greatest, 4);
    }
  });
});

describe('in the limit the duty of draw and rest', () => {
  it.each([
    [2400, 1800],
    [600, 1200],
    [TRADE.drawMin * 60, TRADE.restMin * 60],
    [7, 13],
  ])('of %i s and %i s is the longest draw over both', (longest, least) => {
    const player = new Player(config(4, 7.5, { rest: rest(longest, least) }), { bench: 3 });
    const cycles = 8;
    player.pass(cycles * (longest + least) * S, Math.min(MIN, longest * S));
    const used = player.heap('fan').drawnTodayS;
    expect(used / (cycles * (longest + least))).toBeCloseTo(longest / (longest + least), 12);
    expect(player.switchings()).toHaveLength(2 * cycles + 1);
  });
});

describe('the trade’s fan (common practice, no source)', () => {
  /** What the house tends to with the fan on: outdoors and its lift. */
  const lag = (outdoorsF: number) => {
    const out = fahrenheit(outdoorsF);
    return {
      tauS: 3830,
      rest: out,
      K: out + (TRADE.liftF * 5) / 9,
      l: fahrenheit(TRADE.onF),
      h: fahrenheit(TRADE.offF),
    };
  };

  it('stops by itself over 29 °F outdoors', () => {
    const turns = run(lag(TRADE.reachF + 0.1), 5);
    expect(turns.length).toBe(3);
  });

  it.each([TRADE.reachF, TRADE.reachF - 0.1, 20])('never does at %f °F', (outdoorsF) => {
    const { tauS, K, l, h } = lag(outdoorsF);
    const player = new Player(config(l, h), { bench: l - 0.1 });
    for (let hours = 1; hours <= 48; hours += 1) {
      player.now += 3_600_000;
      player.say({ bench: K + (l - 0.1 - K) * Math.exp((-hours * 3600) / tauS) }).step();
      expect(player.says()).toBe('on band');
    }
  });

  it('switches at 1.667 and 7.222 °C, and not at the rounded 1.7 and 7.2', () => {
    const player = new Player(config(fahrenheit(TRADE.onF), fahrenheit(TRADE.offF)), { bench: 1.7 });
    expect(player.says()).toBe('off idle');
    expect(player.at({ bench: TRADE.onC }).says()).toBe('off idle');
    expect(player.at({ bench: 1.666 }).says()).toBe('on band');
    expect(player.at({ bench: 7.201 }).says()).toBe('on band');
    expect(player.at({ bench: TRADE.offC }).says()).toBe('on band');
    expect(player.at({ bench: 7.223 }).says()).toBe('off idle');
  });
});
