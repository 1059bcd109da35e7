/** Situations as tables of times, each played in three ways that must end alike. */
import { expect, it } from 'vitest';
import type { HouseConfig, PersonCommand, State } from '@/lib/control/types';
import { S, START } from './house';
import { Player } from './player';

type Order = PersonCommand extends infer C
  ? C extends PersonCommand
    ? Omit<C, 'number' | 'at' | 'by'>
    : never
  : never;

/** What happens at an instant: new values of points by key, or a deed. */
export type What = Record<string, number> | ((play: Play) => void) | null;
/** Seconds from the start, what happens then, and what channels then say, `fan` where no key stands: `on band`. */
export type Row = readonly [atS: number, what: What, says?: string | Record<string, string>];

export interface Table {
  config: HouseConfig;
  /** What points read from before the first row on. */
  reads: Record<string, number>;
  rows: Row[];
  /** All switchings, by channel: seconds from the start, state, claim. */
  switches?: Record<string, [number, string, string][]>;
  start?: number;
}

const READS_MS = 30 * S;

/** Readings every 30 s and steps as the core asks; the same with the memory written out at every step; steps at the rows alone. */
const WAYS = ['step by step', 'restarted at each step', 'stepped at the rows alone'] as const;

export class Play {
  readonly player: Player;
  private readonly silent = new Set<string>();
  private readonly values: Map<string, number>;
  private last: number;

  constructor(
    private readonly table: Table,
    private readonly way: (typeof WAYS)[number],
    private readonly start = table.start ?? START,
  ) {
    this.player = new Player(table.config, table.reads, undefined, this.start);
    this.values = new Map(Object.entries(table.reads));
    this.last = this.start;
  }

  run(): void {
    for (const [atS, what, says] of this.table.rows) {
      this.at(this.start + atS * S, what);
      const { player } = this;
      if (says === undefined) continue;
      const told = typeof says === 'string' ? { fan: says } : says;
      const found = Object.fromEntries(Object.keys(told).map((key) => [key, player.says(key)]));
      expect(found, `at ${atS} s, ${this.way}`).toEqual(told);
    }
    for (const [key, list] of Object.entries(this.table.switches ?? {}))
      expect(this.player.switchings(key, this.start), `${key}, ${this.way}`).toEqual(list);
  }

  reads(values: Record<string, number>): void {
    for (const [key, value] of Object.entries(values)) this.values.set(key, value);
  }

  order(order: Order): void {
    const { player } = this;
    const number = player.observed.commands.length + 1;
    player.observed.commands = [...player.observed.commands, { ...order, number, at: player.now, by: 'Ann' }];
  }

  report(states: Record<string, State>, acknowledges = true): void {
    const { player } = this;
    const now = Object.entries(states).map(([key, reported]) => [
      key,
      { reported, reportedAt: player.now, acknowledges, leaseEndsAt: player.now + 30 * S },
    ]);
    player.observed.relays = { ...player.observed.relays, ...Object.fromEntries(now) };
  }

  hush(...keys: string[]): void {
    for (const key of keys) this.silent.add(key);
  }

  wake(...keys: string[]): void {
    for (const key of keys) this.silent.delete(key);
  }

  private at(instant: number, what: What): void {
    const { player } = this;
    const isLate = this.way === 'stepped at the rows alone';
    const spoke = [...this.values].filter(([key]) => !this.silent.has(key));
    if (!isLate) this.stepUpTo(instant - 1);
    player.now = instant;
    if (typeof what === 'function') what(this);
    else if (what !== null) this.reads(what);
    if (isLate) this.readLate(spoke, instant);
    else this.read(instant);
    this.step();
    this.last = instant;
  }

  private step(): void {
    // the player's own readings stay out of it: they are set here
    this.player.silent = new Set(this.values.keys());
    if (this.way === 'restarted at each step') this.player.restart();
    this.player.step();
  }

  private read(at: number): void {
    for (const [key, value] of this.values)
      if (!this.silent.has(key)) this.player.observed.points[key] = { value, at };
  }

  private stepUpTo(instant: number): void {
    const { player } = this;
    while (player.now < instant) {
      const wake = Math.max(player.memory.wakeAt ?? Infinity, player.now + 1);
      player.now = Math.min(instant, player.now + READS_MS, wake);
      this.read(player.now);
      this.step();
    }
  }

  /** What was read up to here, as a late step is told of it: the newest value and the times of those before. */
  private readLate(spoke: [string, number][], instant: number): void {
    const times: number[] = [];
    for (let at = this.last + READS_MS; at < instant - 1; at += READS_MS) times.push(at);
    if (instant - 1 > this.last) times.push(instant - 1);
    this.read(instant);
    for (const [key, before] of spoke) {
      const newest = this.player.observed.points[key];
      const fell = this.silent.has(key);
      const at = fell ? (times.at(-1) ?? this.last) : instant;
      const value = fell || newest === undefined ? before : newest.value;
      this.player.observed.points[key] = { value, at, between: times.filter((time) => time < at) };
    }
  }
}

/** A mutation run by chosen tests (scripts/mutate) plays the way of the fewest steps, which goes through all instants too. */
const USUAL_WAYS = process.env['MUTATE_TESTS'] === undefined ? WAYS : WAYS.slice(-1);

/** A table as a test: it holds whichever way it is stepped. */
export function holds(name: string, table: Table, ways: readonly (typeof WAYS)[number][] = USUAL_WAYS): void {
  it(name, () => {
    for (const way of ways) new Play(table, way).run();
  });
}

export const hand =
  (state: State, seconds: number, more: { channel?: string; holdInFrost?: boolean } = {}) =>
  (play: Play): void =>
    play.order({ kind: 'hand', state, seconds, channel: 'fan', holdInFrost: false, ...more });
export const prove =
  (seconds: number, channel = 'fan') =>
  (play: Play): void =>
    play.order({ kind: 'prove', channel, seconds });
export const proveEnd =
  (channel = 'fan') =>
  (play: Play): void =>
    play.order({ kind: 'prove-end', channel });
export const lockOut =
  (channel = 'fan', lockout = 'l') =>
  (play: Play): void =>
    play.order({ kind: 'lock-out', channel, lockout, why: 'belt' });
export const unlock =
  (channel = 'fan', lockout = 'l') =>
  (play: Play): void =>
    play.order({ kind: 'unlock', channel, lockout });
export const silent =
  (...keys: string[]) =>
  (play: Play): void =>
    play.hush(...keys);
export const speaking =
  (...keys: string[]) =>
  (play: Play): void =>
    play.wake(...keys);
export const reports =
  (states: Record<string, State>) =>
  (play: Play): void =>
    play.report(states);
