/** A worker that is back before any lease has ended, on paper: what ran runs on, and nothing is switched by its absence. */
import { describe, expect, it } from 'vitest';
import type { ObservedRelay, State } from '@/lib/control/types';
import { body, channel, house, interlock, rule, S, START } from './house';
import { Player } from './player';

const LEASE = 30 * S;
const config = house({
  channels: [channel('a', 1, { minOnS: 900, minOffS: 120 }), channel('b', 2)],
  rules: [rule('a', body()), rule('b', body({ point: 'air' }))],
  interlocks: [interlock('needs', 'a', 'b', { delayS: 5 })],
});

/** What nodes say at an instant, each answered with a lease. */
function report(player: Player, states: Record<string, State>): Player {
  const said = Object.entries(states).map(([key, reported]): [string, ObservedRelay] => [
    key,
    { reported, reportedAt: player.now, acknowledges: true, leaseEndsAt: player.now + LEASE },
  ]);
  player.observed.relays = { ...player.observed.relays, ...Object.fromEntries(said) };
  player.step();
  return player;
}

/** Both run and have been reported on, last at 60 s. */
function running(): Player {
  const player = new Player(config, { bench: 3, air: 3 });
  for (let atS = 10; atS <= 60; atS += 10) {
    player.until(START + atS * S - 1).now = START + atS * S;
    report(player, { a: 'on', b: 'on' });
  }
  expect([player.says('a'), player.says('b')]).toEqual(['on band', 'on band']);
  player.events = [];
  return player;
}

/** Killed now; a worker that was told nothing yet but when leases can last have ended is here after `s`. */
function back(player: Player, s: number, beats = 2.5 * S): Player {
  const leaseEndsAt = Math.min(player.now + s * S, player.now + beats) + LEASE;
  player.now += s * S;
  player.observed.workerStartedAt = player.now;
  const blank: ObservedRelay = { reported: null, reportedAt: null, acknowledges: false, leaseEndsAt };
  player.observed.relays = { a: blank, b: blank };
  player.restart().step();
  return player;
}

const switched = ({ events }: Player) =>
  events.flatMap((event) =>
    event.kind === 'switching' ? [[(event.at - START) / S, event.channel, event.to, event.claim]] : [],
  );

describe('A restart within a lease', () => {
  it('switches nothing that needs another, before its node speaks and after', () => {
    const player = back(running(), 6);
    expect([player.says('a'), player.says('b')]).toEqual(['on band', 'on band']);
    player.now += 2 * S;
    report(player, { a: 'on', b: 'on' });
    player.pass(20 * S);
    expect(switched(player)).toEqual([]);
  });

  it('of a second worker too, that was told of the first one’s end late', () => {
    const player = back(running(), 26);
    player.now += 2 * S;
    report(player, { a: 'on', b: 'on' });
    expect(switched(player)).toEqual([]);
  });

  it('leaves the needed one on that is held for it, until its dependant is reported off', () => {
    const player = running();
    player.now += 3 * S;
    player.say({ air: 9 }).step();
    expect([player.says('a'), player.says('b')]).toEqual(['off interlock', 'on interlock']);
    back(player, 6);
    expect([player.says('a'), player.says('b')]).toEqual(['off interlock', 'on interlock']);
    player.now += S;
    report(player, { a: 'off', b: 'on' });
    expect(player.says('b')).toBe('off idle');
  });

  it('ends where no node comes: both are down when the leases can last have ended, and least off counts', () => {
    const player = back(running(), 6);
    // the last beat at 60 s, its slack, and the lease
    player.until(START + 92.5 * S - 1);
    expect(player.of('a').counted).toBe('on');
    player.until(START + 92.5 * S);
    expect(player.of('a').counted).toBe('off');
    expect(player.says('a')).toBe('off interlock');
  });

  it('takes a report of a drop in it for what it is: least off counts from there', () => {
    const player = back(running(), 6);
    player.now += 2 * S;
    report(player, { a: 'off', b: 'on' });
    expect(player.says('a')).toBe('off short-cycle');
    for (let at = 70; at < 195; at += 5) {
      player.until(START + at * S);
      report(player, { a: 'off', b: 'on' });
    }
    expect(switched(player).filter(([, key]) => key === 'a')).toEqual([[188, 'a', 'on', 'band']]);
  });
});

describe('A node that speaks, and says nothing of a relay', () => {
  it('does not vouch for it by the leases that it gets', () => {
    const player = running();
    player.now += 2 * S;
    const moved = { reported: null, reportedAt: null, acknowledges: true, leaseEndsAt: player.now + LEASE };
    player.observed.relays = { ...player.observed.relays, b: moved };
    player.observed.workerStartedAt = START;
    player.step();
    expect([player.says('a'), player.says('b')]).toEqual(['off interlock', 'on band']);
  });
});

describe('A node that is silent while its lease lasts', () => {
  it('switches off nothing that needs a load of it', () => {
    const player = running();
    const own = player.observed.relays['b'];
    for (let at = 70; at < 90; at += 10) {
      player.until(START + at * S);
      report(player, { a: 'on' });
    }
    player.until(START + 90 * S - 1);
    expect(player.observed.relays['b']).toEqual(own);
    expect(switched(player)).toEqual([]);
    expect(player.says('a')).toBe('on band');
    player.until(START + 90 * S);
    expect(player.says('a')).toBe('off interlock');
  });

  it('says nothing of a load that was ordered another way meanwhile', () => {
    const player = running();
    player.now += 12 * S;
    for (const one of Object.values(player.observed.relays)) one.acknowledges = false;
    player.order({ kind: 'lock-out', channel: 'b', lockout: 'l', why: 'belt' });
    expect([player.says('a'), player.says('b')]).toEqual(['off interlock', 'off lock-out']);
    player.now += S;
    player.order({ kind: 'unlock', channel: 'b', lockout: 'l' });
    player.pass(10 * S);
    // ordered on again, but nobody has said that it runs
    expect([player.says('a'), player.says('b')]).toEqual(['off interlock', 'on band']);
  });
});
