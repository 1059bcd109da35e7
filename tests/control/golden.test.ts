/** The thirteen situations that the ladder was drawn for, by name. */
import { describe, expect, it } from 'vitest';
import { body, channel, H, house, MIN, point, rest, rule, S, source } from './house';
import { Player } from './player';

const heap = (more = {}) => source('heap', { coreFloor: 38, ...more });
const fan = (more = {}) =>
  channel('fan', 1, { source: 'heap', frostHelp: true, minOnS: 120, minOffS: 120, ...more });
const cold = { bench: 5, air: 5, core: 50, base: 45 };
const fanHouse = (ruleBody = body(), fanMore = {}, heapMore = {}) =>
  house({
    frostLimit: 3,
    sources: [heap(heapMore)],
    channels: [fan(fanMore)],
    rules: [rule('fan', ruleBody)],
  });

describe('the thirteen situations', () => {
  it('bench probe dead, another house point at 0 °C: frost runs the fan', () => {
    const player = new Player(fanHouse(), cold);
    player.silent.add('bench');
    player.pass(2 * MIN);
    expect(player.says()).toBe('off fail-safe');
    player.at({ air: 0 });
    expect(player.says()).toBe('on frost');
  });

  it('frost with the core under its floor: the source guard keeps it off, with an alarm', () => {
    const player = new Player(fanHouse(), { ...cold, core: 30, air: 0 });
    expect(player.says()).toBe('off source-guard');
    expect(player.faults()).toEqual(expect.arrayContaining(['core-under-floor', 'frost']));
  });

  it('frost during a rest: on, the credit held at zero, recorded as borrowed', () => {
    const player = new Player(fanHouse(body({ rest: rest(600, 1800) })), { ...cold, bench: 3.5 });
    player.pass(601 * S);
    expect(player.says()).toBe('off rest');
    player.pass(5 * MIN).at({ air: 2 });
    expect(player.says()).toBe('on frost');
    expect(player.of().because).toMatchObject({ borrows: 'rest', value: 2, limit: 3 });
    player.pass(10 * MIN);
    expect(player.heap().credit).toBe(0);
  });

  it('frost in May with the rule out of season: on', () => {
    const may = Date.UTC(2027, 4, 10, 3);
    const config = fanHouse(body({ season: { from: '10-01', to: '04-30' } }));
    const player = new Player(config, { ...cold, bench: 2, air: 2 }, undefined, may);
    expect(player.says()).toBe('on frost');
  });

  it('daily limit spent with the house at 3 °C over a frost limit of 2: rest until frost', () => {
    const config = fanHouse(body({ rest: rest(86_400, 60) }), {}, { dailyLimitS: 3600 });
    config.house.frostLimit = 2;
    const player = new Player(config, { ...cold, bench: 3, air: 3 });
    player.pass(61 * MIN);
    expect(player.says()).toBe('off rest');
    expect(player.of().because).toMatchObject({ cause: 'daily-limit', drawnS: 3600, limitS: 3600 });
    player.at({ air: 1.9 });
    expect(player.says()).toBe('off short-cycle');
    player.pass(2 * MIN);
    expect(player.says()).toBe('on frost');
  });

  it('a hand off given at dusk and forgotten ends when frost begins', () => {
    const player = new Player(fanHouse(), cold);
    player.order({ kind: 'hand', channel: 'fan', state: 'off', seconds: 43_200, holdInFrost: false });
    player.pass(3 * H);
    expect(player.says()).toBe('off hand');
    player.at({ air: 2.9 });
    expect(player.says()).toBe('on frost');
  });

  it('a hand off that holds in frost stays off, with an alarm at once', () => {
    const player = new Player(fanHouse(), cold);
    player.order({ kind: 'hand', channel: 'fan', state: 'off', seconds: 43_200, holdInFrost: true });
    player.pass(3 * H).at({ air: 2.9 });
    expect(player.says()).toBe('off hand');
    expect(player.faults()).toContain('hand-off-in-frost');
  });

  it('a bench mat by hand with the bench over its high limit: limit puts it off', () => {
    const mat = channel('mat', 2, { loadKind: 'heater', highLimit: { point: 'bench', above: 28 } });
    const player = new Player(house({ channels: [mat] }), { bench: 20 });
    player.order({ kind: 'hand', channel: 'mat', state: 'on', seconds: 3600, holdInFrost: false });
    expect(player.says('mat')).toBe('on hand');
    player.pass(MIN).at({ bench: 28.1 });
    expect(player.says('mat')).toBe('off limit');
    player.pass(MIN).at({ bench: 20 });
    expect(player.says('mat')).toBe('off idle');
  });

  it('hand on whose point dies: on for at most 30 min more', () => {
    const player = new Player(fanHouse(), { ...cold, bench: 9, air: 9 });
    player.order({ kind: 'hand', channel: 'fan', state: 'on', seconds: 43_200, holdInFrost: false });
    player.silent.add('bench');
    player.pass(31 * MIN);
    expect(player.says()).toBe('on hand');
    player.pass(31 * S);
    expect(player.says()).toBe('off fail-safe');
  });

  it('hand on under the core floor: on', () => {
    const player = new Player(fanHouse(), { ...cold, core: 30 });
    player.order({ kind: 'hand', channel: 'fan', state: 'on', seconds: 1800, holdInFrost: false });
    expect(player.says()).toBe('on hand');
  });

  it('proving for 10 s with a least on of 120 s: on for 10 s, then off', () => {
    const player = new Player(fanHouse(), { ...cold, bench: 9 });
    player.order({ kind: 'prove', channel: 'fan', seconds: 10 });
    expect(player.says()).toBe('on proving');
    player.pass(20 * S);
    expect(player.switchings()).toEqual([
      [0, 'on', 'proving'],
      [10, 'off', 'idle'],
    ]);
  });

  it('credit worth 10 s with a least on of 120 s: no start', () => {
    const player = new Player(fanHouse(body({ rest: rest(600, 36_000) })), { ...cold, bench: 3.5 });
    player.pass(590 * S).at({ bench: 8 });
    expect(player.says()).toBe('off idle');
    player.pass(10 * MIN).at({ bench: 3.5 });
    expect(player.says()).toBe('off rest');
    expect(player.of().because).toMatchObject({ cause: 'not-worth-a-start', leastOnS: 120 });
  });

  describe('a vent that is never-with the fan is welded open, and frost comes', () => {
    const vent = channel('vent', 2, { loadKind: 'vent' });
    const play = (frostMayBreak: boolean) => {
      const lock = {
        id: 'lock',
        channel: 'vent',
        kind: 'never-with' as const,
        other: 'fan',
        delayS: 5,
        frostMayBreak,
      };
      const player = new Player({ ...fanHouse(), channels: [fan(), vent], interlocks: [lock] }, cold);
      player.observed.relays = {
        vent: {
          reported: 'on',
          reportedAt: player.now,
          acknowledges: true,
          leaseEndsAt: player.now + 30 * S,
        },
      };
      player.now += S;
      return player.at({ air: 1, bench: 1 });
    };

    it('frost runs the fan where the interlock lets it', () => {
      expect(play(true).says()).toBe('on frost');
    });

    it('else the interlock keeps it off, with an alarm', () => {
      const player = play(false);
      expect(player.says()).toBe('off interlock');
      expect(player.faults()).toContain('interlock-blocks-frost');
    });
  });

  it('a lock-out on an NC contact is refused with its reason', () => {
    const player = new Player(house({ channels: [channel('fan', 1, { contact: 'NC' })] }), cold);
    player.order({ kind: 'lock-out', channel: 'fan', lockout: 'l1', why: 'belt' });
    expect(player.events).toContainEqual(
      expect.objectContaining({ kind: 'command-refused', why: 'lock-out-on-nc', channel: 'fan' }),
    );
    expect(player.of().mode).toBe('auto');
  });
});

it('a house without a bench point or a rule is idle', () => {
  const player = new Player(house({ points: [point('bench', 'bench')] }), {});
  expect(player.says()).toBe('off idle');
});
