/** What a worker that is killed finds again, of a memory that changes without any event. */
import { describe, expect, it } from 'vitest';
import type { HouseConfig, ObservedRelay, State } from '@/lib/control/types';
import { MemoryKeeping } from '@/worker/control/memory-keeping';
import { body, channel, H, house, MIN, point, rest, rule, S, source, START } from '../control/house';
import { Player } from '../control/player';

const mild = { bench: 5, air: 6, core: 51, base: 43 };

/** A house whose memory is kept as the worker keeps it, on a clock of `rate`. */
class KeptHouse {
  readonly player: Player;
  /** Of those, how often it was kept without any event. */
  writes = 0;
  private readonly keeping: MemoryKeeping;
  private kept: string;

  constructor(
    config: HouseConfig,
    values: Record<string, number>,
    private readonly rate = 1,
  ) {
    this.player = new Player(config, values);
    this.keeping = new MemoryKeeping(rate);
    this.kept = JSON.stringify(this.player.memory);
    this.keep();
    this.writes = 0;
  }

  /** Packs and reports of relays as nodes send them. */
  until(at: number, states: Record<string, State> = {}, drift = 0): this {
    const { player } = this;
    for (let next = player.now + 5 * S; next <= at; next += 5 * S) {
      player.now = next;
      const said = Object.entries(states).map(([key, reported]): [string, ObservedRelay] => [
        key,
        { reported, reportedAt: next, acknowledges: true, leaseEndsAt: next + 30 * S },
      ]);
      if (said.length > 0) player.observed.relays = Object.fromEntries(said);
      player.say({ bench: 5 + drift * Math.sin(next / 7000), air: 6 + drift * Math.sin(next / 9000) });
      player.step();
      this.keep();
    }
    return this;
  }

  say(values: Record<string, number>): this {
    this.player.at(values);
    this.keep();
    return this;
  }

  order(order: Parameters<Player['order']>[0]): this {
    this.player.order(order);
    this.keep();
    return this;
  }

  /** The worker is killed; the next one is here at `at`. */
  killed(at: number): this {
    const { player } = this;
    player.memory = JSON.parse(this.kept);
    player.now = at;
    player.observed.workerStartedAt = at;
    player.observed.relays = {};
    player.step();
    return this;
  }

  private keep(): void {
    const { memory, now, result } = this.player;
    const nowMs = (now - START) / this.rate;
    if (result.events.length === 0 && !this.keeping.isDue(memory, nowMs)) return;
    if (result.events.length === 0) this.writes += 1;
    this.keeping.keep(memory, nowMs);
    this.kept = JSON.stringify(memory);
  }
}

const heap = house({
  sources: [source('heap', { ready: { level: 50, forS: 7200 } })],
  channels: [channel('fan', 1, { source: 'heap', minOffS: 120 })],
  rules: [rule('fan', body({ rest: rest(600, 1200) }))],
});

describe('A worker that is killed', () => {
  it('finds how long the core has been above its ready level, since it last was not', () => {
    const one = new KeptHouse(heap, mild, 60);
    one
      .until(START + 20 * MIN)
      .say({ core: 49 })
      .until(START + 21 * MIN);
    one.say({ core: 51 });
    const since = one.player.now;
    one.until(START + 40 * MIN).killed(START + 41 * MIN);
    expect(one.player.heap().ready).toBe(false);
    one.until(since + 2 * H - 5 * S);
    expect(one.player.heap().ready).toBe(false);
    one.until(since + 2 * H + 5 * S);
    expect(one.player.heap().ready).toBe(true);
  });

  it('finds what a relay said last, and since when that counts', () => {
    const one = new KeptHouse(heap, mild).until(START + 10 * S, { fan: 'off' });
    one.order({ kind: 'hand', channel: 'fan', state: 'on', seconds: 600, holdInFrost: false });
    one.until(START + 15 * S, { fan: 'on' });
    one.killed(START + 30 * S);
    expect(one.player.memory.channels[0]).toMatchObject({ known: 'on', relay: { reported: 'on' } });
  });

  it('finds since when a draw has brought no heat', () => {
    const leastGain = { kelvin: 3, after: 600, intake: 'bench', return: 'base' };
    const config = house({
      sources: [source('heap')],
      channels: [channel('fan', 1, { source: 'heap' })],
      rules: [rule('fan', body({ rest: rest(2400, 1200, { leastGain }) }))],
    });
    const one = new KeptHouse(config, mild);
    one
      .say({ bench: 3 })
      .until(START + 700 * S)
      .say({ base: 6 });
    const since = one.player.now;
    one.until(START + 710 * S).killed(START + 715 * S);
    expect(one.player.memory.channels[0]).toMatchObject({ counted: 'on', gainLowSince: since });
  });
});

describe('A quiet house', () => {
  const trend = { of: 'trend', points: ['air'], windowS: 1800 };
  const config = house({
    frostLimit: 2,
    points: [
      point('bench', 'bench', { frozenAfterS: 1800, maxRate: 0.5 }),
      point('air', 'house-air'),
      point('core', 'heap-core'),
      point('base', 'heap-base'),
      point('climb', 'other', { unit: 'K/h', derived: trend }),
    ],
    sources: [source('heap', { coreFloor: 38, dailyLimitS: 3600, ready: { level: 50, forS: 600 } })],
    channels: [channel('fan', 1, { source: 'heap', frostHelp: true, longestOnS: 1200 }), channel('vent', 2)],
    rules: [rule('fan', body({ rest: rest(600, 1200) }))],
  });

  it.each([1, 60])(
    'is kept once a minute of app time at rate %i, whatever its points drift and its relays repeat',
    (rate) => {
      const states = { fan: 'off', vent: 'off' } as const;
      const one = new KeptHouse(config, mild, rate).until(START + 30 * MIN, states, 0.4);
      one.writes = 0;
      one.until(START + 90 * MIN, states, 0.4);
      expect(one.writes).toBe(60);
    },
  );
});
