/** Which claim stands over which, and what it breaks, where no other file holds it. On paper. */
import { describe, expect, it } from 'vitest';
import { CLAIMS } from '@/lib/control/types';
import { body, channel, house, interlock, rule, source } from './house';
import { Player } from './player';
import { hand, holds, lockOut, prove, unlock, type Play } from './table';

const warm = { bench: 9, air: 9, core: 50, base: 45 };
const allOff =
  (seconds: number) =>
  (play: Play): void =>
    play.order({ kind: 'all-off', seconds });

describe('The ladder', () => {
  it('is asked in the order of the table', () =>
    expect(CLAIMS).toEqual([
      ...['lock-out', 'interlock', 'limit', 'proving', 'short-cycle', 'hand', 'source-guard', 'frost'],
      ...['fail-safe', 'rest', 'band', 'idle'],
    ]));

  it('is told whole, down to the claim that decided', () => {
    const player = new Player(house({ channels: [channel('fan', 1)], rules: [rule('fan', body())] }), {
      ...warm,
      bench: 3,
    });
    const [event] = player.events.filter((one) => one.kind === 'switching');
    expect(event).toMatchObject({ explanation: { claim: 'band', state: 'on' } });
    const ladder = event?.kind === 'switching' ? event.explanation.ladder : [];
    expect(ladder.map(({ claim }) => claim)).toEqual(CLAIMS.slice(0, CLAIMS.indexOf('band') + 1));
    expect(ladder.filter(({ speaks }) => speaks).map(({ claim }) => claim)).toEqual(['band']);
  });
});

describe('A lock-out', () => {
  it.each([
    { kind: 'hand', channel: 'fan', state: 'on', seconds: 60, holdInFrost: false },
    { kind: 'prove', channel: 'fan', seconds: 60 },
  ] as const)('refuses a $kind, with its reason', (order) => {
    const player = new Player(house({ channels: [channel('fan', 1)] }), warm);
    player.order({ kind: 'lock-out', channel: 'fan', lockout: 'a', why: 'belt' });
    player.order(order);
    expect(player.events.at(-1)).toMatchObject({
      ...{ kind: 'command-refused', number: 2, channel: 'fan', why: 'locked-out' },
    });
    expect(player.says()).toBe('off lock-out');
  });
});

describe('An interlock', () => {
  const pair = (kind: 'needs' | 'never-with') =>
    house({
      channels: [channel('a', 1), channel('b', 2)],
      rules: [rule('b', body({ point: 'air' }))],
      interlocks: [interlock(kind, 'a', 'b')],
    });

  holds('is over proving: what needs another does not run a pulse without it', {
    config: pair('needs'),
    reads: warm,
    rows: [
      [10, prove(60, 'a'), { a: 'off interlock', b: 'off idle' }],
      [20, { air: 3 }, { a: 'on proving', b: 'on band' }],
      [70, null, { a: 'off idle', b: 'on band' }],
    ],
  });

  holds('is over a hand: what must never run with another waits till that is off', {
    config: pair('never-with'),
    reads: warm,
    rows: [
      [10, prove(60, 'b'), { b: 'on proving' }],
      [20, hand('on', 600, { channel: 'a' }), { a: 'off interlock', b: 'on proving' }],
      [70, null, { a: 'on hand', b: 'off interlock' }],
    ],
  });
});

describe('Everything off', () => {
  holds('breaks least on like every hand off, holds against frost, and leaves a lock-out and a pulse', {
    config: house({
      frostLimit: 3,
      sources: [source('heap')],
      channels: [
        channel('fan', 1, { source: 'heap', minOnS: 600, frostHelp: true }),
        channel('mat', 2),
        channel('lamp', 3),
      ],
      rules: [rule('fan', body())],
    }),
    reads: { ...warm, bench: 3.5 },
    rows: [
      [10, lockOut('mat'), { fan: 'on band', mat: 'off lock-out' }],
      [20, prove(60, 'lamp'), { lamp: 'on proving' }],
      [30, allOff(3600), { fan: 'off hand', mat: 'off lock-out', lamp: 'on proving' }],
      [80, { air: 1 }, { fan: 'off hand', lamp: 'off hand' }],
      [90, unlock('mat'), { mat: 'off hand' }],
      [3629.999, null, { fan: 'off hand', mat: 'off hand', lamp: 'off hand' }],
      [3630, null, { fan: 'on frost', mat: 'off idle', lamp: 'off idle' }],
    ],
  });
});

describe('Frost', () => {
  // one rule of two cools: the load is no cooling one
  holds('leaves a load alone of which not all rules cool', {
    config: house({
      frostLimit: 3,
      rules: [
        rule('fan', body({ point: 'core', band: [{ from: '00:00', low: 60, high: 70 }] }), 'warms'),
        rule('fan', body({ purpose: 'cool', band: [{ from: '00:00', low: 20, high: 25 }] }), 'cools'),
      ],
    }),
    reads: warm,
    rows: [
      [0, null, 'on band'],
      [60, { air: 2 }, 'on band'],
    ],
  });

  holds('breaks the rest of a channel only where each of its rules lets it', {
    config: house({
      frostLimit: 3,
      sources: [source('heap')],
      channels: [channel('fan', 1, { source: 'heap', frostHelp: true })],
      rules: [
        rule('fan', body({ rest: { longestDraw: 600, least: 1200, frostMayBreak: true } }), 'lets'),
        rule('fan', body({ rest: { longestDraw: 600, least: 1200, frostMayBreak: false } }), 'keeps'),
      ],
    }),
    reads: { ...warm, bench: 3.5 },
    rows: [
      [600, null, 'off rest'],
      [700, { air: 1 }, 'off rest'],
      [1800, null, 'on frost'],
    ],
  });
});
