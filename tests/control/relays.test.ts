/** Which state of a load counts, on paper: a report for 25 s if it acknowledges, else what is wanted; a lease of 30 s. */
import { describe, expect, it } from 'vitest';
import type { ObservedRelay } from '@/lib/control/types';
import { body, channel, house, rest, rule, S, source, START } from './house';
import { Player } from './player';

const config = (more = {}, restBody: ReturnType<typeof rest> | undefined = rest(600, 1200)) =>
  house({
    sources: [source('heap')],
    channels: [channel('fan', 1, { source: 'heap', ...more })],
    rules: [rule('fan', body({ rest: restBody }))],
  });
const cold = { bench: 3, air: 10, core: 50, base: 40 };

/** At an instant the relay says something; null: the node is silent. */
type Said = [atS: number, relay: Partial<ObservedRelay> | null, says: string];

function follow(player: Player, rows: Said[]): void {
  for (const [atS, relay, says] of rows) {
    player.until(START + atS * S - 1);
    player.now = START + atS * S;
    if (relay !== null) {
      const own = {
        reported: null,
        reportedAt: player.now,
        acknowledges: true,
        leaseEndsAt: player.now + 30 * S,
      };
      player.observed.relays = { fan: { ...own, ...relay } };
    }
    player.step();
    expect(`${player.says()}, counts as ${player.of().counted}`, `at ${atS} s`).toBe(says);
  }
}

describe('what counts', () => {
  it('is the report while it is fresh, then what is wanted, and what is safe when the lease can last have ended', () => {
    const player = new Player(config({ minOffS: 120 }), cold);
    follow(player, [
      [10, { reported: 'on' }, 'on band, counts as on'],
      // its 25 s are over at 35 s; the lease ends at 40 s and the load has dropped: least off counts from there
      [35, null, 'on band, counts as on'],
      [39.999, null, 'on band, counts as on'],
      [40, null, 'off short-cycle, counts as off'],
      [159.999, null, 'off short-cycle, counts as off'],
      // ordered on again, but no lease has reached it
      [160, null, 'on band, counts as off'],
    ]);
    // 40 s drawn and 120 s come back of 1,200
    expect(player.heap().credit).toBe(1);
  });

  it('is what is wanted while the report does not acknowledge the order', () => {
    const player = new Player(config(), { ...cold, bench: 9 });
    follow(player, [
      [10, { reported: 'off' }, 'off idle, counts as off'],
      [11, { reported: 'on', acknowledges: false }, 'off idle, counts as off'],
      [12, { reported: 'on' }, 'off idle, counts as on'],
    ]);
    expect(player.faults()).toContain('relay-does-not-follow');
  });

  it('is the report for less than 25 s', () => {
    const player = new Player(config(), { ...cold, bench: 9 });
    follow(player, [
      [10, { reported: 'on' }, 'off idle, counts as on'],
      [34.999, null, 'off idle, counts as on'],
      [35, null, 'off idle, counts as off'],
    ]);
  });

  it('a load that does not follow its order is not held in it by its least on', () => {
    const player = new Player(config({ minOnS: 300 }), cold);
    follow(player, [[10, { reported: 'off' }, 'on band, counts as off']]);
    player.say({ bench: 9 });
    follow(player, [[20, { reported: 'off' }, 'off idle, counts as off']]);
  });

  it('spends the credit of a welded relay, and its rest begins when it opens', () => {
    const player = new Player(config(), { ...cold, bench: 9 });
    const welded: Said[] = Array.from({ length: 64 }, (_, index) => [
      (index + 1) * 10,
      { reported: 'on' },
      index * 10 + 10 < 610 ? 'off idle, counts as on' : 'off rest, counts as on',
    ]);
    follow(player, [...welded, [650, { reported: 'off' }, 'off rest, counts as off']]);
    expect(player.heap().restSince).toBe(START + 650 * S);
    expect(player.heap().credit).toBe(0);
  });

  it('a lease trip drops the load: least off counts, and then the claims are asked anew', () => {
    const player = new Player(config({ minOffS: 60 }), cold);
    follow(player, [
      [10, { reported: 'on' }, 'on band, counts as on'],
      [20, { reported: 'off' }, 'off short-cycle, counts as off'],
      [40, { reported: 'off' }, 'off short-cycle, counts as off'],
      [60, { reported: 'off' }, 'off short-cycle, counts as off'],
      [79.999, { reported: 'off' }, 'off short-cycle, counts as off'],
      [80, { reported: 'off' }, 'on band, counts as on'],
    ]);
    // the drop is the worker's to tell, as a switching of its own
    expect(player.switchings()).toEqual([
      [0, 'on', 'band'],
      [80, 'on', 'band'],
    ]);
  });

  it('of a normally closed contact: the coil drops, and the load runs', () => {
    const player = new Player(config({ contact: 'NC' }, undefined), { ...cold, bench: 9 });
    follow(player, [
      [10, { reported: 'off' }, 'off idle, counts as off'],
      [39.999, null, 'off idle, counts as off'],
    ]);
    expect(player.of().coil).toBe('on');
    follow(player, [[40, null, 'off idle, counts as on']]);
    // it is ordered off again, but no lease has reached it
    expect(player.switchings().at(-1)).toEqual([40, 'off', 'idle']);
  });
});

describe('a gap of the worker', () => {
  it('counts a load as on till 30 s after the last step, where nobody says when leases end', () => {
    const player = new Player(config(), cold);
    player.pass(100 * S);
    player.now += 1000 * S;
    player.observed.workerStartedAt = player.now;
    player.restart().step();
    // 130 s drawn, 970 s come back of 1,200: whole again
    expect(player.says()).toBe('on band');
    expect(player.heap()).toMatchObject({ credit: 1, drawnTodayS: 130 });
  });

  it('passes least times, hands and rests', () => {
    const player = new Player(config({ minOffS: 600 }), { ...cold, bench: 9 });
    player.order({ kind: 'hand', channel: 'fan', state: 'on', seconds: 300, holdInFrost: false });
    player.pass(100 * S);
    player.say({ bench: 3 });
    player.now += 400 * S;
    player.observed.workerStartedAt = player.now;
    player.restart().step();
    // dropped at 130 s: off till 730 s; the hand ended at 300 s
    expect(player.says()).toBe('off short-cycle');
    expect(player.events.filter((event) => event.kind === 'hand-ended').map((event) => event.at)).toEqual([
      START + 300 * S,
    ]);
    player.until(START + 729 * S).until(START + 730 * S);
    expect(player.says()).toBe('on band');
  });
});
