/** What comes next, claim by claim, in cases that can be worked out on paper. */
import { describe, expect, it } from 'vitest';
import { explain } from '@/lib/control/explain';
import type { HouseConfig } from '@/lib/control/types';
import { body, channel, H, house, MIN, point, rest, rule, S, source, START } from './house';
import { Player } from './player';

const cold = { bench: 3, air: 8, core: 50, base: 40 };
const heap = (more: Partial<HouseConfig> & { frostLimit?: number | null } = {}, rests = rest(2400, 1800)) =>
  house({
    sources: [source('heap')],
    channels: [channel('fan', 1, { source: 'heap', frostHelp: true })],
    rules: [rule('fan', body({ rest: rests }))],
    ...more,
  });
const next = (player: Player, key = 'fan') =>
  explain(player.plan, player.memory, player.observed, player.now, key)?.next;

describe('a draw', () => {
  it('ends with its credit, and sooner where the band does', () =>
    expect(next(new Player(heap(), cold))).toEqual([
      { kind: 'then', at: START + 40 * MIN, state: 'off', claim: 'rest' },
      { kind: 'if', point: 'bench', side: 'above', value: 7.5, state: 'off', claim: 'idle' },
    ]));

  it('that must run for its least time ends after it', () => {
    const config = heap({ channels: [channel('fan', 1, { source: 'heap', minOnS: 120 })] });
    expect(next(new Player(config, cold))?.[1]).toEqual({
      ...{ kind: 'if', point: 'bench', side: 'above', value: 7.5, at: START + 2 * MIN },
      ...{ state: 'off', claim: 'idle' },
    });
  });

  it('is judged with the stand-in’s offset while a stand-in is used', () => {
    const standIns = [{ point: 'air', offset: -0.5 }];
    const config = heap({ rules: [rule('fan', body({ standIns }))] });
    const player = new Player(config, { ...cold, air: 4.4 });
    player.silent.add('bench');
    player.pass(3 * MIN);
    expect(player.says()).toBe('on band');
    expect(next(player)).toContainEqual({
      ...{ kind: 'if', point: 'air', side: 'above', value: 8, state: 'off', claim: 'idle' },
    });
  });
});

describe('a rest', () => {
  const resting = (rests = rest(2400, 1800), more: Parameters<typeof heap>[0] = {}) =>
    new Player(heap({ frostLimit: 2, ...more }, rests), cold).pass(41 * MIN, MIN);

  it('ends at its time, when the band wants it on; sooner in frost', () =>
    expect(next(resting())).toEqual([
      { kind: 'then', at: START + 70 * MIN, state: 'on', claim: 'band' },
      { kind: 'if', point: null, side: 'below', value: 2, state: 'on', claim: 'frost' },
      {
        ...{ kind: 'if', point: 'bench', side: 'above', value: 7.5, at: START + 70 * MIN },
        ...{ state: 'off', claim: 'idle' },
      },
    ]));

  it('that waits for a level ends at its longest, or with the level once the least is over', () => {
    const waits = rest(2400, 1800, { until: { point: 'base', level: 43 }, most: 5400 });
    expect(next(resting(waits))?.slice(0, 3)).toEqual([
      { kind: 'then', at: START + 130 * MIN, state: 'on', claim: 'band' },
      { kind: 'if', point: null, side: 'below', value: 2, state: 'on', claim: 'frost' },
      {
        ...{ kind: 'if', point: 'base', side: 'above', value: 43, orAt: true, at: START + 70 * MIN },
        ...{ state: 'on', claim: 'band' },
      },
    ]);
  });

  it('that frost may not break says nothing of frost', () => {
    const kept = next(resting(rest(2400, 1800, { frostMayBreak: false })));
    expect(kept?.filter((one) => one['claim'] === 'frost')).toEqual([]);
  });

  it('and a core that falls under its floor meanwhile keeps it off', () => {
    const floor = { sources: [source('heap', { coreFloor: 38 })] };
    expect(next(resting(rest(2400, 1800), floor))).toContainEqual({
      ...{ kind: 'if', point: 'core', side: 'below', value: 38, at: START + 70 * MIN },
      ...{ state: 'off', claim: 'source-guard' },
    });
  });
});

describe('what a person or another load has to do', () => {
  it('a lock-out is removed, and the band turns it on', () => {
    const player = new Player(heap(), cold);
    player.order({ kind: 'lock-out', channel: 'fan', lockout: 'a', why: 'belt' });
    expect(next(player)).toEqual([{ kind: 'when', what: 'unlocked', state: 'on', claim: 'band' }]);
  });

  it('a hand ends by its time, or is given back before', () => {
    const player = new Player(heap(), cold);
    player.order({ kind: 'hand', channel: 'fan', state: 'off', seconds: 3600, holdInFrost: false });
    expect(next(player)).toEqual([
      { kind: 'then', at: START + H, state: 'on', claim: 'band' },
      {
        ...{ kind: 'if', point: 'bench', side: 'above', value: 7.5, at: START + H },
        ...{ state: 'off', claim: 'idle' },
      },
      { kind: 'when', what: 'given-back', state: 'on', claim: 'band' },
    ]);
  });

  it('a heap that is not ready is said to be', () => {
    const config = heap({ sources: [source('heap', { ready: { level: 45, forS: 3600 } })] });
    expect(next(new Player(config, cold))?.at(-1)).toEqual({
      ...{ kind: 'when', what: 'ready', source: 'heap', state: 'on', claim: 'band' },
    });
  });

  it('a missing point answers again; what then runs is not said', () => {
    const player = new Player(heap(), cold);
    player.silent.add('bench');
    player.pass(3 * MIN);
    expect(player.says()).toBe('off fail-safe');
    expect(next(player)).toEqual([{ kind: 'when', what: 'answers', point: 'bench' }]);
  });

  it('the other of a never-with goes off, and the delay passes', () => {
    const config = heap({
      channels: [channel('fan', 1), channel('vent', 2, { loadKind: 'vent' })],
      rules: [
        rule('fan', body()),
        rule('vent', body({ purpose: 'cool', point: 'air', band: [{ from: '00:00', low: 8, high: 11 }] })),
      ],
      interlocks: [
        { id: 'a', channel: 'fan', kind: 'never-with', other: 'vent', delayS: 60, frostMayBreak: false },
      ],
    });
    const player = new Player(config, { ...cold, bench: 5, air: 12 });
    player.at({ bench: 3 });
    expect(player.says()).toBe('off interlock');
    expect(next(player)).toEqual([
      // to the ms: a reading can come one after this instant at the soonest
      {
        kind: 'if',
        point: 'air',
        side: 'below',
        value: 8,
        at: START + 60 * S + 2,
        state: 'on',
        claim: 'band',
      },
      { kind: 'when', what: 'other-off', other: 'vent', at: START + 60 * S + 2, state: 'on', claim: 'band' },
    ]);
  });
});

it('a point that is silent stays silent in what is foreseen', () => {
  const player = new Player(house({ rules: [rule('fan', body())], points: [point('bench', 'bench')] }), {
    bench: 3,
  });
  player.silent.add('bench');
  player.pass(3 * MIN);
  expect(next(player)?.filter((one) => one['kind'] === 'then')).toEqual([]);
});

it('claims under the one that decided are told too', () => {
  const player = new Player(heap(), cold);
  player.order({ kind: 'hand', channel: 'fan', state: 'off', seconds: 3600, holdInFrost: false });
  const told = explain(player.plan, player.memory, player.observed, player.now, 'fan');
  expect(told?.ladder.at(-1)?.claim).toBe('hand');
  expect(told?.under).toMatchObject([{ claim: 'band', speaks: true, wants: 'on', because: { value: 3 } }]);
});

it('a decision without a switching carries its ladder', () => {
  const player = new Player(heap(), { ...cold, bench: 5 });
  player.events = [];
  player.order({ kind: 'hand', channel: 'fan', state: 'off', seconds: 600, holdInFrost: false });
  expect(player.events).toContainEqual(
    expect.objectContaining({
      ...{ kind: 'decision', claim: 'hand', before: 'idle' },
      explanation: expect.objectContaining({ claim: 'hand', until: START + 600 * S }),
    }),
  );
});

describe('a condition by the clock', () => {
  const hour = (value: number) => ({ all: [{ fact: 'time.hour', operator: 'equal' as const, value }] });
  const timed = (value: number) =>
    new Player(
      house({
        channels: [channel('fan', 1), channel('lamp', 2)],
        rules: [rule('fan', body({ only: hour(value) }))],
      }),
      cold,
    );

  it.each([1, 5, 12, 17, 22])('that begins at hour %i of the day is foreseen from midnight', (value) =>
    expect(next(timed(value))?.[0]).toEqual({
      ...{ kind: 'then', at: START + value * H, state: 'on', claim: 'band' },
    }),
  );

  it('hides nothing of another load: a hand of six hours ends when it ends', () => {
    const player = timed(5);
    player.order({ kind: 'hand', channel: 'lamp', state: 'on', seconds: 6 * 3600, holdInFrost: false });
    expect(next(player, 'lamp')?.[0]).toMatchObject({ kind: 'then', at: player.now + 6 * H, state: 'off' });
  });
});
