/** Whatever `next` says would happen does happen, on random houses; and what it says of the clock comes by the clock. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { NextIf, NextReason, NextThen, NextWhen } from '@/lib/control/next';
import { explain } from '@/lib/control/explain';
import type { Memory } from '@/lib/control/memory';
import { step } from '@/lib/control/step';
import { S } from './house';
import { among, houses } from './look-ahead-houses';
import { Player } from './player';

const START_VALUES = { bench: 5, air: 8, core: 50, base: 40, return: 20, amps: 0.5 };
const key = among('fan', 'vent', 'pump', 'second');
type Deed =
  { do: 'pass'; s: number } | { do: 'say'; point: string; value: number } | { do: 'order'; order: Order };
const deeds: fc.Arbitrary<Deed> = fc.oneof(
  { weight: 3, arbitrary: fc.record({ do: among('pass' as const), s: among(1, 60, 700, 1300, 4000) }) },
  {
    weight: 5,
    arbitrary: fc.record({
      do: among('say' as const),
      point: among('bench', 'bench', 'bench', 'air', 'core', 'base', 'return', 'amps'),
      value: among(0.2, 1, 2.5, 3.5, 3.5, 3.5, 3.8, 4, 5, 7.5, 8, 10, 11.5, 13, 37.5, 39, 42, 44, 50),
    }),
  },
  {
    weight: 1,
    arbitrary: fc.record({
      do: among('order' as const),
      order: fc.oneof(
        fc.record({
          ...{ kind: among('hand' as const), channel: key, state: among('on' as const, 'off' as const) },
          ...{ seconds: among(100, 3600), holdInFrost: fc.boolean() },
        }),
        fc.record({
          kind: among('lock-out' as const),
          channel: key,
          lockout: among('x'),
          why: among('work'),
        }),
        fc.record({ kind: among('prove' as const), channel: key, seconds: among(60) }),
      ),
    }),
  },
);

type Order = Parameters<Player['order']>[0];

/** Where a channel stands when nothing but time passes up to `at`, from given readings and orders on. */
function later(
  player: Player,
  readings: Record<string, number>,
  id: string,
  at: number,
  orders: Order[] = [],
): string {
  const now = player.now + 1;
  const commands = orders.map((one, place) => ({ ...one, number: 1e6 + place, at: now, by: 'Ann' }));
  const points = { ...player.observed.points };
  for (const [name, value] of Object.entries(readings)) points[name] = { value, at: now };
  const observed = { ...player.observed, points, commands: [...player.observed.commands, ...commands] };
  let memory: Memory = step(player.plan, player.memory, observed, now).memory;
  while (memory.wakeAt !== null && memory.wakeAt < at)
    memory = step(player.plan, memory, observed, memory.wakeAt).memory;
  const told = step(player.plan, memory, observed, Math.max(at, now)).channels.find((one) => one.id === id);
  return `${told?.state ?? ''} ${told?.claim ?? ''}`;
}

/** The readings that the threshold is about, at a value. */
function readings(player: Player, { point: name, side }: NextIf, value: number): Record<string, number> {
  if (name !== null) return { [name]: value };
  const inside = ['bench', 'air'].map((one) => [one, player.observed.points[one]?.value ?? NaN] as const);
  const coldest = Math.min(...inside.map(([, now]) => now));
  return Object.fromEntries(
    inside
      .filter(([, now]) => (side === 'below' ? now === coldest : now < value))
      .slice(0, side === 'below' ? 1 : undefined)
      .map(([one]) => [one, value]),
  );
}

function checkIf(player: Player, id: string, one: NextIf, others: NextReason[]) {
  // a derived point is not read: what its inputs would have to do is not said
  if (one.point === 'mean') return;
  const step = one.side === 'above' ? 1e-3 : -1e-3;
  if (one.exactly === true) return checkExactly(player, id, one, others, step);
  const past = one.value + step;
  // the reading comes a millisecond after it was foreseen, and so does what counts from it
  const at = (one.at ?? player.now) + 2;
  const told = `${one.state} ${one.claim}`;
  expect(later(player, readings(player, one, past), id, at), JSON.stringify(one)).toBe(told);
  if (one.later === true) {
    // by the clock alone it would have come before
    const clock = others.find((other) => other.kind === 'then' && other.state === one.state);
    const thenAt = clock?.kind === 'then' ? clock.at + 2 : NaN;
    expect(later(player, {}, id, thenAt), JSON.stringify(one)).toContain(one.state);
    expect(later(player, readings(player, one, past), id, thenAt)).not.toContain(one.state);
    return;
  }
  const exactly = later(player, readings(player, one, one.value), id, at);
  if (one.orAt === true) return expect(exactly, JSON.stringify(one)).toBe(told);
  const crosses = others.some((other) => other !== one && other.kind === 'if' && other.side === one.side);
  // what is kept up may be kept for a while by another threshold on the way there
  const isKept = player.of(id).state === one.state;
  if (!crosses || !isKept) expect(exactly, JSON.stringify([one, others])).not.toBe(told);
  if (!crosses) expect(exactly.split(' ')[0]).toBe(later(player, {}, id, at).split(' ')[0]);
}

/** At the value it comes; short of it, and past it, nothing has come of it. */
function checkExactly(player: Player, id: string, one: NextIf, others: NextReason[], step: number) {
  const at = (one.at ?? player.now) + 2;
  const told = `${one.state} ${one.claim}`;
  expect(later(player, readings(player, one, one.value), id, at), JSON.stringify(one)).toBe(told);
  if (others.some((other) => other !== one && other.kind === 'if' && other.point === one.point)) return;
  for (const value of [one.value - step, one.value + step])
    expect(later(player, readings(player, one, value), id, at), JSON.stringify([one, value])).not.toBe(told);
}

function checkThen(player: Player, id: string, one: NextThen): void {
  expect(later(player, {}, id, one.at), JSON.stringify(one)).toBe(`${one.state} ${one.claim}`);
}

const ORDERS: Record<NextWhen['what'], (id: string, other: string) => Order[]> = {
  unlocked: (id) => [{ kind: 'unlock', channel: id, lockout: 'x' }],
  'given-back': (id) => [{ kind: 'auto', channel: id }],
  'other-off': (_, other) => [{ kind: 'lock-out', channel: other, lockout: 'y', why: 'work' }],
  'other-on': (_, other) => [
    { kind: 'hand', channel: other, state: 'on', seconds: 40_000, holdInFrost: false },
  ],
  ready: () => [{ kind: 'ready', source: 'heap' }],
  answers: () => [],
};

function checkWhen(player: Player, id: string, one: NextWhen): void {
  const orders = ORDERS[one.what](id, one.other ?? '');
  const at = (one.at ?? player.now) + 2;
  expect(later(player, {}, id, at, orders), JSON.stringify(one)).toBe(
    `${one.state ?? ''} ${one.claim ?? ''}`,
  );
}

describe('what comes next', () => {
  it('is what comes, by the clock and past every threshold; at a threshold itself nothing changes', () => {
    const told = new Set<string>();
    fc.assert(
      fc.property(houses, fc.array(deeds, { minLength: 3, maxLength: 25 }), (config, list) => {
        const player = new Player(config, START_VALUES);
        for (const deed of list) {
          player.now += S;
          if (deed.do === 'say') player.say({ [deed.point]: deed.value }).step();
          if (deed.do === 'order') player.order(deed.order);
          if (deed.do === 'pass') player.until(player.now + deed.s * S, 10_000 * S);
        }
        for (const { id } of config.channels) {
          const explained = explain(player.plan, player.memory, player.observed, player.now, id);
          // plain data by its type: the shape is NextReason's
          const next = (explained?.next ?? []) as unknown as NextReason[];
          for (const one of next) {
            told.add(one.kind);
            if (one.kind === 'if') checkIf(player, id, one, next);
            if (one.kind === 'when') checkWhen(player, id, one);
            if (one.kind === 'then') checkThen(player, id, one);
          }
        }
      }),
      { numRuns: 150 },
    );
    expect([...told].sort()).toEqual(['if', 'then', 'when']);
  }, 60_000);
});
