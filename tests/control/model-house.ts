/** Random houses and what happens to them: readings, orders, times, restarts, reports, gaps. */
import fc from 'fast-check';
import type { HouseConfig, ObservedRelay } from '@/lib/control/types';
import { body, channel, house, interlock, point, rest, rule, source } from './house';
import type { Player } from './player';

const seconds = (...list: number[]) => fc.constantFrom(...list);

export const houses: fc.Arbitrary<HouseConfig> = fc
  .record({
    minOnS: seconds(0, 60, 120, 300),
    minOffS: seconds(0, 60, 180),
    longestDraw: seconds(120, 600, 2400),
    least: seconds(60, 600, 1800),
    most: fc.option(seconds(1800, 5400)),
    frostMayBreak: fc.boolean(),
    dailyLimitS: fc.option(seconds(900, 3600)),
    coreFloor: fc.option(fc.constant(38)),
    longestOnS: fc.option(seconds(300, 1200)),
    frostLimit: fc.option(fc.constant(3)),
    delayS: seconds(0, 5, 60),
    needs: fc.boolean(),
    frozenAfterS: fc.option(seconds(300)),
    maxRate: fc.option(fc.constant(0.05)),
    second: fc.boolean(),
    heater: fc.boolean(),
    leastGain: fc.boolean(),
    ready: fc.boolean(),
    mayBreakLock: fc.boolean(),
  })
  .map((given) => {
    const { minOnS, minOffS, longestDraw, least, most, frostMayBreak } = given;
    const until = most === null ? {} : { until: { point: 'base', level: 43 }, most: Math.max(most, least) };
    const draws = { source: 'heap', minOnS, minOffS, frostHelp: true, longestOnS: given.longestOnS };
    const cool = body({ purpose: 'cool', point: 'air', band: [{ from: '00:00', low: 6, high: 10 }] });
    const gain = { leastGain: { kelvin: 3, after: 600, intake: 'bench', return: 'base' } };
    const heapRest = rest(longestDraw, least, { ...until, frostMayBreak, ...(given.leastGain ? gain : {}) });
    const ready = given.ready ? { level: 38, forS: 600 } : null;
    return house({
      frostLimit: given.frostLimit,
      points: [
        point('bench', 'bench', { frozenAfterS: given.frozenAfterS, maxRate: given.maxRate }),
        point('air', 'house-air', { staleAfterS: 400 }),
        point('core', 'heap-core', { staleAfterS: 3600 }),
        point('base', 'heap-base', { staleAfterS: 3600 }),
      ],
      sources: [source('heap', { dailyLimitS: given.dailyLimitS, coreFloor: given.coreFloor, ready })],
      channels: [
        channel('fan', 1, { ...draws, highLimit: { point: 'air', above: 12 } }),
        channel('second', 2, draws),
        channel('vent', 3, { loadKind: 'vent', minOnS, minOffS }),
        channel('pump', 4, { minOnS, loadKind: given.heater ? 'heater' : 'motor' }),
      ],
      interlocks: [
        interlock('never-with', 'vent', 'fan', { delayS: given.delayS, frostMayBreak: given.mayBreakLock }),
        ...(given.needs ? [interlock('needs', 'second', 'pump', { delayS: given.delayS })] : []),
      ],
      rules: [
        rule('fan', body({ rest: heapRest, standIns: [{ point: 'air', offset: -0.5 }] })),
        ...(given.second
          ? [rule('second', body({ point: 'air', rest: rest(longestDraw * 2, least, { frostMayBreak }) }))]
          : []),
        rule('vent', cool),
        rule('pump', body({ point: 'air' })),
      ],
    });
  });

export const KEYS = ['fan', 'second', 'vent', 'pump'];
const key = fc.constantFrom(...KEYS);
export type Deed =
  | { do: 'pass'; s: number; cut: number }
  | { do: 'say'; point: string; value: number }
  | { do: 'order'; order: Parameters<Player['order']>[0] }
  | { do: 'restart' | 'double' };
/** What a house with nodes sees besides: reports of relays, and a worker that was away. */
export type Outside =
  | Deed
  | { do: 'report'; channel: string; relay: Omit<ObservedRelay, 'reportedAt' | 'leaseEndsAt'> }
  | { do: 'follow' }
  | { do: 'gap'; s: number };
export const deeds: fc.Arbitrary<Deed> = fc.oneof(
  {
    weight: 5,
    arbitrary: fc.record({
      do: fc.constant('pass' as const),
      s: seconds(1, 7, 30, 60, 61, 300, 1300, 20_000),
      cut: fc.double({ min: 0.05, max: 0.95, noNaN: true }),
    }),
  },
  {
    weight: 5,
    arbitrary: fc.record({
      do: fc.constant('say' as const),
      point: fc.constantFrom('bench', 'air', 'core', 'base'),
      value: seconds(1, 2.9, 3.5, 4, 5, 7.5, 8, 11, 13, 37, 39, 44, 200),
    }),
  },
  { weight: 1, arbitrary: fc.record({ do: fc.constant('restart' as const) }) },
  { weight: 1, arbitrary: fc.record({ do: fc.constant('double' as const) }) },
  {
    weight: 1,
    arbitrary: fc.record({
      do: fc.constant('order' as const),
      order: fc.oneof(
        fc.record({
          kind: fc.constant('hand' as const),
          channel: key,
          state: fc.constantFrom('on' as const, 'off' as const),
          seconds: seconds(1, 100, 3600),
          holdInFrost: fc.boolean(),
        }),
        fc.record({ kind: fc.constant('auto' as const), channel: key }),
        fc.record({
          kind: fc.constant('lock-out' as const),
          channel: key,
          lockout: fc.constant('x'),
          why: fc.constant('work'),
        }),
        fc.record({ kind: fc.constant('unlock' as const), channel: key, lockout: fc.constant('x') }),
        fc.record({ kind: fc.constant('prove' as const), channel: key, seconds: seconds(10, 60) }),
        fc.record({ kind: fc.constant('all-off' as const), seconds: seconds(600) }),
      ),
    }),
  },
);

export const outside: fc.Arbitrary<Outside> = fc.oneof(
  { weight: 4, arbitrary: deeds },
  {
    weight: 1,
    arbitrary: fc.record({
      do: fc.constant('report' as const),
      channel: key,
      relay: fc.record({
        reported: fc.constantFrom('on' as const, 'off' as const),
        acknowledges: fc.boolean(),
      }),
    }),
  },
  { weight: 1, arbitrary: fc.record({ do: fc.constant('follow' as const) }) },
  { weight: 1, arbitrary: fc.record({ do: fc.constant('gap' as const), s: seconds(5, 40, 400, 5000) }) },
);

export const AT_FIRST = { bench: 5, air: 8, core: 50, base: 40 };

/** Does one deed; time that passes is the caller's to look at. */
export function act(player: Player, deed: Outside): void {
  switch (deed.do) {
    case 'restart':
      player.restart();
      return;
    case 'double':
      player.step();
      return;
    case 'say':
      player.now += 1000;
      player.observed.points = {
        ...player.observed.points,
        [deed.point]: { value: deed.value, at: player.now },
      };
      player.step();
      return;
    case 'order':
      player.now += 1000;
      player.order(deed.order);
      return;
    case 'pass':
      player.now += deed.s * 1000;
      player.step();
      return;
    case 'report': {
      player.now += 1000;
      const relay = { ...deed.relay, reportedAt: player.now, leaseEndsAt: player.now + 30_000 };
      player.observed.relays = { ...player.observed.relays, [deed.channel]: relay };
      player.step();
      return;
    }
    case 'follow': {
      // all relays say that they are as they are wanted
      player.now += 1000;
      const [reportedAt, leaseEndsAt] = [player.now, player.now + 30_000];
      player.observed.relays = Object.fromEntries(
        player.result.channels.map(({ id, state }) => [
          id,
          { reported: state, reportedAt, acknowledges: true, leaseEndsAt },
        ]),
      );
      player.step();
      return;
    }
    case 'gap': {
      const killedAt = player.now;
      player.now += deed.s * 1000;
      player.observed.workerStartedAt = player.now;
      player.observed.relays = blanked(player.observed.relays, Math.min(player.now, killedAt + 2500));
      player.restart().step();
    }
  }
}

/** A worker that has just started has heard no node: it knows only when leases can last have ended. */
export function blanked(
  relays: Record<string, ObservedRelay>,
  drivenTill: number,
): Record<string, ObservedRelay> {
  const leaseEndsAt = drivenTill + 30_000;
  const blank = { reported: null, reportedAt: null, acknowledges: false, leaseEndsAt };
  return Object.fromEntries(Object.keys(relays).map((id) => [id, blank]));
}
