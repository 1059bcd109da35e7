/** Draws that a node tells of afterwards. Longest draw 20 min, rest 30 min, so a run of 10 min is worth half the credit. */
import { describe, expect, it } from 'vitest';
import { body, channel, H, house, MIN, rest, rule, source, START } from './house';
import { Player } from './player';

const played = (more: { dailyLimitS?: number } = {}) =>
  new Player(
    house({
      sources: [source('heap', more)],
      channels: [channel('fan', 1, { source: 'heap' }), channel('second', 2, { source: 'heap' })],
      rules: [rule('fan', body({ rest: rest(1200, 1800) }))],
    }),
    { bench: 5, air: 5, core: 50, base: 45 },
  );

/** Tells of runs of the fan, in minutes before now. */
function tell(player: Player, ...runs: [from: number, to: number][]): void {
  player.observed.relays = {
    fan: {
      ...{ reported: 'off', reportedAt: player.now, acknowledges: true, leaseEndsAt: player.now + 30_000 },
      ranAlone: runs.map(([from, to]) => ({ from: player.now - from * MIN, to: player.now - to * MIN })),
    },
  };
  player.step();
  player.observed.relays = {};
}
const credit = (player: Player) => player.heap().credit;

describe('A run that a node tells of afterwards', () => {
  it('is drawn from the credit, and what came back since then is left', () => {
    const player = played();
    player.pass(2 * H);
    tell(player, [10, 0]);
    expect(credit(player)).toBeCloseTo(0.5, 6);
    const again = played();
    again.pass(2 * H);
    // half spent 19 to 9 min ago; 9 of 30 min came back
    tell(again, [19, 9]);
    expect(credit(again)).toBeCloseTo(0.8, 6);
  });

  it('that spent the credit began a rest when it ended', () => {
    const player = played();
    player.pass(2 * H);
    tell(player, [30, 10]);
    expect(player.heap()).toMatchObject({ credit: 0, restSince: player.now - 10 * MIN });
    expect(player.heap().restUntil).toBe(player.now + 20 * MIN);
    player.say({ bench: 3 }).pass(19 * MIN);
    expect(player.says()).toBe('off rest');
    player.pass(1 * MIN);
    expect(player.says()).toBe('on band');
  });

  it('whose rest has passed by now costs nothing any more', () => {
    const player = played();
    player.pass(4 * H);
    tell(player, [60, 40]);
    expect(credit(player)).toBe(1);
  });

  it('in the midst of a rest starts that anew', () => {
    const player = played();
    player.pass(2 * H);
    tell(player, [50, 30]);
    expect(credit(player)).toBe(1);
    const resting = played();
    resting.pass(2 * H);
    tell(resting, [30, 10]);
    resting.pass(5 * MIN);
    tell(resting, [5, 2]);
    expect(resting.heap()).toMatchObject({ credit: 0, restSince: resting.now - 2 * MIN });
  });

  it('counts in the rolling 24 h, and leaves it after them', () => {
    const player = played({ dailyLimitS: 3600 });
    player.pass(2 * H);
    tell(player, [90, 60], [40, 10]);
    expect(player.heap().drawnTodayS).toBe(3600);
    player.say({ bench: 3 }).pass(3 * H);
    expect(player.says()).toBe('off rest');
    player.until(START + 24 * H + 30 * MIN - 1);
    expect(player.heap().drawnTodayS).toBe(3600);
    player.pass(5 * MIN);
    expect(player.heap().drawnTodayS).toBeLessThan(3600);
  });

  it('told twice, whole or in part, counts once; and a restart between changes nothing', () => {
    const player = played();
    player.pass(2 * H);
    tell(player, [20, 15]);
    const once = credit(player);
    tell(player, [20, 15]);
    player.restart();
    tell(player, [20, 15]);
    expect(credit(player)).toBeCloseTo(once, 9);
    tell(player, [20, 10]);
    expect(player.heap().drawnTodayS).toBe(600);
    expect(player.events.filter((one) => one.kind === 'ran-alone')).toHaveLength(2);
  });

  it('keeps an open draw of another fan countable', () => {
    const player = played();
    player.pass(1 * H);
    player.order({ kind: 'hand', channel: 'second', state: 'on', seconds: 3600 * 4, holdInFrost: false });
    player.pass(1 * H);
    tell(player, [50, 40]);
    expect(player.heap().drawnTodayS).toBe(3600 + 600);
    player.order({ kind: 'auto', channel: 'second' });
    player.pass(1 * H);
    expect(player.heap().drawnTodayS).toBe(3600 + 600);
  });

  it('is no order that was not followed: a fan that is on by itself raises no alarm', () => {
    const player = played();
    player.pass(1 * H);
    const seen = {
      reported: 'on' as const,
      reportedAt: player.now,
      acknowledges: true,
      leaseEndsAt: player.now,
    };
    player.observed.relays = { fan: { ...seen, isAlone: true } };
    player.step();
    expect(player.faults()).not.toContain('relay-does-not-follow');
    expect(player.heap().drawing).toBe(true);
    player.observed.relays = { fan: seen };
    player.step();
    expect(player.faults()).toContain('relay-does-not-follow');
  });
});
