/** What must hold whatever happens, control.md's own exceptions written out. Reckoned from what is told, not as the core does. */
import { expect } from 'vitest';
import type { ControlEvent } from '@/lib/control/events';
import type { Claim } from '@/lib/control/types';
import type { Player } from './player';

/** Those that may draw under a spent credit or a spent day. `interlock` holds a needed channel on. */
const DRAW_WITHOUT_CREDIT: Claim[] = ['hand', 'proving', 'short-cycle', 'frost', 'interlock'];
/** Those that may draw under the core's floor, or from a heap that is not ready. */
const DRAW_UNDER_FLOOR: Claim[] = ['hand', 'proving', 'short-cycle', 'interlock'];
const BREAK_LEAST_ON: Claim[] = ['lock-out', 'interlock', 'limit', 'hand'];

type Switching = Extract<ControlEvent, { kind: 'switching' }>;
export const switchingsOf = (player: Player, channel: string): Switching[] =>
  player.events.flatMap((event) => (event.kind === 'switching' && event.channel === channel ? [event] : []));

/** At every step. */
export function checkStanding({ result, memory, plan }: Player): void {
  for (const [index, one] of result.channels.entries()) {
    const own = memory.channels[index];
    const planned = plan.channels[index];
    if (own === undefined || planned === undefined) throw new Error('A channel without memory.');
    if (own.lockouts.length > 0) {
      expect(one).toMatchObject({ state: 'off', claim: 'lock-out' });
      expect(own.hand?.state).not.toBe('on');
      expect(own.prove).toBeNull();
    }
    if (own.overHighLimit || own.ranLongest !== null) expect(one.state).toBe('off');
    if (own.hand?.state === 'on' && planned.config.loadKind === 'heater')
      expect(own.hand.until - own.hand.givenAt).toBeLessThanOrEqual(3_600_000);
    if (one.state !== 'on' || planned.source === null) continue;
    const heap = result.sources[planned.source];
    if (heap === undefined) throw new Error('A source without result.');
    if (heap.underFloor || heap.ready === false) expect(DRAW_UNDER_FLOOR).toContain(one.claim);
    if (heap.credit === 0) expect(DRAW_WITHOUT_CREDIT).toContain(one.claim);
    const limit = plan.sources[planned.source]?.config.dailyLimitS ?? Infinity;
    if (heap.drawnTodayS >= limit) expect(DRAW_WITHOUT_CREDIT).toContain(one.claim);
  }
  for (const heap of result.sources) {
    expect(heap.credit).toBeGreaterThanOrEqual(0);
    expect(heap.credit).toBeLessThanOrEqual(1);
  }
}

/** Never both of a pair, save for the instant in which frost may break their interlock. */
export function checkPairs({ result, plan }: Player): void {
  for (const lock of plan.interlocks) {
    if (lock.kind !== 'never-with') continue;
    const [a, b] = [result.channels[lock.channel], result.channels[lock.other]];
    expect([a?.state, b?.state]).not.toEqual(['on', 'on']);
  }
}

/** Each switching is told with the one claim that decided it, and the next begins where it ended. */
export function checkClaims(player: Player): void {
  for (const { id } of player.plan.channels) {
    for (const event of switchingsOf(player, id)) {
      const { ladder, claim, state } = event.explanation;
      expect(ladder.filter((one) => one.speaks)).toHaveLength(1);
      expect(ladder.at(-1)).toMatchObject({ claim: event.claim, speaks: true, wants: event.to });
      expect([claim, state]).toEqual([event.claim, event.to]);
      expect(event.from).not.toBe(event.to);
    }
  }
}

/** Off by a claim that may not break least on came no sooner than least on after on. */
export function checkLeastOn(player: Player): void {
  for (const { id, minOnMs, minOffMs } of player.plan.channels) {
    const list = switchingsOf(player, id);
    list.forEach((event, index) => {
      const begun = list[index - 1];
      if (begun === undefined) return;
      if (event.to === 'on') {
        // a pulse is asked before the least times
        if (event.claim !== 'proving') expect(event.at - begun.at).toBeGreaterThanOrEqual(minOffMs);
      } else if (begun.claim !== 'proving' && !BREAK_LEAST_ON.includes(event.claim))
        expect(event.at - begun.at).toBeGreaterThanOrEqual(minOnMs);
    });
  }
}

/**
 * No draw that the band alone began and ended outlasts its longest draw, nor two at once what they may together; no
 * start by the band is one that the day's limit does not carry. From the switchings alone.
 */
export function checkDraws(player: Player): void {
  const { plan } = player;
  const runs = plan.channels.flatMap(({ id, source, minOnMs }, channel) => {
    if (source === null) return [];
    const list = switchingsOf(player, id);
    return list.flatMap((event, index) => {
      if (event.to === 'off') return [];
      const end = list[index + 1]?.at ?? player.now;
      return [{ channel, source, minOnMs, from: event.at, to: end, claim: event.claim }];
    });
  });
  const held = player.events.flatMap((event) =>
    event.kind === 'decision' || event.kind === 'switching' ? [event] : [],
  );
  for (const run of runs) {
    if (run.claim !== 'band') continue;
    const id = plan.channels[run.channel]?.id;
    const bandOnly = !held.some(
      (event) => event.channel === id && event.at > run.from && event.at < run.to && event.claim !== 'band',
    );
    const rates = plan.rules.filter((one) => one.channel === run.channel && one.rest !== null);
    const longest = Math.min(...rates.map((one) => one.rest?.longestDrawMs ?? Infinity));
    if (bandOnly) expect(run.to - run.from).toBeLessThanOrEqual(longest);
    const limitMs = plan.sources[run.source]?.dailyLimitMs ?? Infinity;
    const used = runs.reduce(
      (sum, one) =>
        one.source === run.source && one.from < run.from
          ? sum + Math.max(0, Math.min(one.to, run.from) - Math.max(one.from, run.from - 86_400_000))
          : sum,
      0,
    );
    expect(used + run.minOnMs).toBeLessThanOrEqual(limitMs);
  }
}
