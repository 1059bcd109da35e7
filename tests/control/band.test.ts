/** Bands on paper: strict thresholds, the latch, periods, hours, conditions, several rules. */
import { describe, expect, it } from 'vitest';
import type { RuleBody } from '@/lib/control/rule-body';
import { NIGHT_PERIODS } from '../checks/control';
import { body, channel, house, rule } from './house';
import { Player } from './player';
import { holds, silent, speaking } from './table';

const fan = (...bodies: Partial<RuleBody>[]) =>
  house({
    channels: [channel('fan', 1)],
    rules: bodies.map((one, index) => rule('fan', body(one), `rule-${index}`)),
  });
/** Clock times in seconds from the start, which is a midnight. */
const clock = (hours: number, minutes = 0) => hours * 3600 + minutes * 60;

describe('the latch', () => {
  holds('of a warming rule: on under low, off over high, and neither at them', {
    config: fan({}),
    reads: { bench: 4 },
    rows: [
      [0, null, 'off idle'],
      [60, { bench: 3.999 }, 'on band'],
      [120, { bench: 7.5 }, 'on band'],
      [180, { bench: 7.501 }, 'off idle'],
      [240, { bench: 4 }, 'off idle'],
    ],
  });

  holds('of a cooling rule: on over high, off under low, and neither at them', {
    config: fan({ purpose: 'cool', band: [{ from: '00:00', low: 20, high: 25 }] }),
    reads: { bench: 25 },
    rows: [
      [0, null, 'off idle'],
      [60, { bench: 25.001 }, 'on band'],
      [120, { bench: 20 }, 'on band'],
      [180, { bench: 19.999 }, 'off idle'],
      [240, { bench: 25 }, 'off idle'],
    ],
  });

  holds('carries over from one period to the next, and is moved by the new thresholds alone', {
    config: fan({
      band: [
        { from: '06:00', low: 5, high: 8 },
        { from: '20:00', low: 3, high: 6 },
      ],
    }),
    reads: { bench: 4 },
    rows: [
      // the evening's period still holds
      [clock(5, 59), null, 'off idle'],
      [clock(6), null, 'on band'],
      [clock(19, 59), { bench: 7 }, 'on band'],
      [clock(20), null, 'off idle'],
      [clock(23), { bench: 4 }, 'off idle'],
      [clock(23, 10), { bench: 2.9 }, 'on band'],
      [clock(30), { bench: 7.9 }, 'on band'],
    ],
  });

  holds('is off out of hours, and has to be earned again within them', {
    config: fan({ hours: { from: '18:00', to: '07:00' } }),
    reads: { bench: 3 },
    rows: [
      [0, null, 'on band'],
      [clock(7) - 0.001, null, 'on band'],
      [clock(7), null, 'off idle'],
      [clock(17), { bench: 5 }, 'off idle'],
      [clock(18), null, 'off idle'],
      [clock(18, 10), { bench: 3.9 }, 'on band'],
    ],
  });

  holds('is off out of season too', {
    config: fan({ season: { from: '10-01', to: '01-10' } }),
    reads: { bench: 3 },
    rows: [
      [clock(24) - 0.001, null, 'on band'],
      [clock(24), null, 'off idle'],
    ],
  });

  holds('is left alone by conditions, which only gate', {
    config: fan({ only: { all: [{ fact: 'core', operator: 'greaterThan', value: 45 }] } }),
    reads: { bench: 3, core: 50 },
    rows: [
      [0, null, 'on band'],
      [60, { core: 45 }, 'off idle'],
      [120, { bench: 6 }, 'off idle'],
      [180, { core: 45.1 }, 'on band'],
      // silent from 240 s on, unknown from 330 s on
      [240, silent('core'), 'on band'],
      [329.999, null, 'on band'],
      [330, null, 'off idle'],
      [400, speaking('core'), 'on band'],
    ],
  });

  holds('goes on with a stand-in, its offset added, and is off while nothing can be read', {
    config: fan({ standIns: [{ point: 'air', offset: -0.5 }] }),
    reads: { bench: 3, air: 5 },
    rows: [
      [60, silent('bench'), 'on band'],
      // bench is bad at 150 s: 5 − 0.5 lies between, so the latch stays
      [150, null, 'on band'],
      [200, { air: 8 }, 'on band'],
      [260, { air: 8.001 }, 'off idle'],
      [320, { air: 4.499 }, 'on band'],
      [380, silent('air'), 'on band'],
      [470, null, 'off fail-safe'],
      [
        500,
        (play) => {
          play.wake('air');
          play.reads({ air: 5 });
        },
        'off idle',
      ],
    ],
  });

  holds('compares a stand-in as on paper: 4.6 − 0.6 is not under 4, and 8.1 − 0.6 not over 7.5', {
    config: fan({ standIns: [{ point: 'air', offset: -0.6 }] }),
    reads: { bench: 5, air: 6 },
    rows: [
      [60, silent('bench'), 'off idle'],
      [200, { air: 4.6 }, 'off idle'],
      [260, { air: 4.5999 }, 'on band'],
      [320, { air: 8.1 }, 'on band'],
      [380, { air: 8.1001 }, 'off idle'],
    ],
  });

  holds('several rules of a channel: on if any wants on', {
    config: fan({}, { point: 'air', band: [{ from: '00:00', low: 10, high: 12 }] }),
    reads: { bench: 9, air: 11 },
    rows: [
      [0, null, 'off idle'],
      [60, { air: 9 }, 'on band'],
      [120, { bench: 3 }, 'on band'],
      [180, { air: 13 }, 'on band'],
      [240, { bench: 8 }, 'off idle'],
    ],
  });
});

describe('across a change of the clock', () => {
  it.each(NIGHT_PERIODS)(
    'in %s a fan within hours of the night runs from %s to %s (F-PERIOD)',
    (zone, from, to) => {
      const config = fan({ hours: { from: '18:00', to: '07:00' } });
      config.house.zone = zone;
      const start = Date.parse(from) - 3_600_000;
      const player = new Player(config, { bench: 3 }, undefined, start);
      player.until(Date.parse(to) + 3_600_000, 60_000);
      expect(player.switchings('fan', 0)).toEqual([
        [Date.parse(from) / 1000, 'on', 'band'],
        [Date.parse(to) / 1000, 'off', 'idle'],
      ]);
    },
  );
});

describe('by facts of time', () => {
  // 2027-01-10 is a Sunday, 7 by ISO; the sun of 54.2° N rises there at about 08:20
  it.each<[string, RuleBody['only'], number, string]>([
    ['an hour', { all: [{ fact: 'time.hour', operator: 'in', value: [2, 3] }] }, clock(2), 'on band'],
    ['an hour past', { all: [{ fact: 'time.hour', operator: 'in', value: [2, 3] }] }, clock(4), 'off idle'],
    ['a weekday', { all: [{ fact: 'time.weekday', operator: 'equal', value: 7 }] }, clock(1), 'on band'],
    [
      'a weekday past',
      { all: [{ fact: 'time.weekday', operator: 'equal', value: 7 }] },
      clock(24),
      'off idle',
    ],
    ['a month', { not: { fact: 'time.month', operator: 'greaterThan', value: 1 } }, clock(1), 'on band'],
    ['the sun down', { all: [{ fact: 'time.sunUp', operator: 'equal', value: true }] }, clock(8), 'off idle'],
    ['the sun up', { all: [{ fact: 'time.sunUp', operator: 'equal', value: true }] }, clock(9), 'on band'],
  ])('%s', (_, only, atS, says) => {
    const player = new Player(fan({ only }), { bench: 3 });
    player.pass(atS * 1000, 600_000 / 10);
    expect(player.says()).toBe(says);
  });
});
