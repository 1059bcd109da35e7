/** When the core asks to be awake for a limit, and what a limit tells of its end. On paper, stepped at its own wakes alone. */
import { describe, expect, it } from 'vitest';
import { body, channel, house, rule, S, START } from './house';
import { Player } from './player';
import { holds, silent, speaking, type Play } from './table';
import { Sleeper } from './wakes';

const warm = { bench: 9, air: 9, core: 50, base: 45 };
const cold = { ...warm, bench: 3.5 };
const config = (more = {}, frostLimit: number | null = null) =>
  house({ frostLimit, channels: [channel('fan', 1, more)], rules: [rule('fan', body())] });
const ten = { longestOnS: 600, minOffS: 60 };

describe('longest on', () => {
  it('ends and begins again at its own instants, without a reading', () => {
    const player = new Sleeper(config(ten), cold);
    expect(player.wakesAtS).toBe(600);
    player.sleepTill(600);
    // the band still wants it on: nothing comes of time alone
    expect([player.says(), player.wakesAtS]).toEqual(['off limit', 660]);
    player.hears(610, { bench: 8 }).hears(620, { bench: 3.5 });
    expect([player.says(), player.wakesAtS]).toEqual(['off limit', 660]);
    player.sleepTill(700);
    expect(player.wakesAtS).toBe(1260);
    expect(player.switchings()).toEqual([
      [0, 'on', 'band'],
      [600, 'off', 'limit'],
      [660, 'on', 'band'],
    ]);
  });

  it('gives way to frost at the instant at which least off has passed', () => {
    const player = new Sleeper(config({ ...ten, frostHelp: true }, 3), { ...warm, air: 2 });
    player.sleepTill(700);
    expect(player.switchings().slice(1)).toEqual([
      [600, 'off', 'limit'],
      [660, 'on', 'frost'],
    ]);
  });

  it('ends a hand, whose own end is then no longer waited for', () => {
    const player = new Sleeper(config({ longestOnS: 600 }), warm);
    player.order({ kind: 'hand', channel: 'fan', state: 'on', seconds: 7200, holdInFrost: false });
    player.sleepTill(600);
    // midnight, at which the rule's season is looked at again
    expect([player.says(), player.wakesAtS]).toEqual(['off idle', 86_400]);
    expect(player.events).toContainEqual(
      expect.objectContaining({ kind: 'hand-ended', why: { cause: 'limit', state: 'on', by: 'Ann' } }),
    );
  });

  it('tells no end while the relay says that the load still runs, and least off from when it does not', () => {
    const player = new Player(config(ten), cold).pass(590 * S);
    const report = (reported: 'on' | 'off') => {
      player.observed.relays = {
        fan: { reported, reportedAt: player.now, acknowledges: true, leaseEndsAt: null },
      };
      player.step();
    };
    player.pass(10 * S);
    player.now += 5 * S;
    report('on');
    const told = { cause: 'longest-on', longestOnS: 600 };
    expect(player.of().because).toEqual({ ...told, until: null });
    player.now += 5 * S;
    report('off');
    expect(player.of().because).toEqual({ ...told, until: START + 670 * S });
  });
});

describe('high limit', () => {
  // silent from 120 s on, bad in the first ms past 210 s; what was passed is passed till a reading a kelvin under it
  holds('that was passed is remembered through the silence of its point', {
    config: config({ highLimit: { point: 'air', above: 20 } }),
    reads: cold,
    rows: [
      [60, { air: 21 }, 'off limit'],
      [120, silent('air'), 'off limit'],
      [
        400,
        (play: Play) => {
          play.wake('air');
          play.reads({ air: 19.5 });
        },
        'off limit',
      ],
      [460, { air: 19 }, 'on band'],
    ],
  });

  holds('that was not passed stops nothing when its point speaks again', {
    config: config({ highLimit: { point: 'air', above: 20 } }),
    reads: { ...cold, air: 19.5 },
    rows: [
      [60, silent('air'), 'on band'],
      [200, null, 'off limit'],
      [400, speaking('air'), 'on band'],
    ],
  });
});
