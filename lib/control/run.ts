/** The working state of one step: copies of the memory's lists, whose entries are replaced, never changed. */
import type { ChannelMemory, FrostMemory, PointMemory, Readings, RuleMemory, SourceMemory } from './memory';
import type { InterlockVerdict } from './interlocks';
import type { RuleCalendar } from './calendar';
import type { Plan } from './plan';
import type { ControlEvent } from './events';
import type { Claim, Observed, Quality, State } from './types';

export interface Run {
  plan: Plan;
  observed: Observed;
  /** The instant that is being settled. */
  at: number;
  /** The instant of the step itself: orders given anywhere in it leave now. */
  stepAt: number;
  /** Nobody drove the relays at `at`: the worker was away. */
  undriven: boolean;
  /** Since when: the last step before the gap. */
  awayFrom: number | null;
  /** When each point falls silent, where that is not to be read from its memory alone. */
  silentAt: number[] | null;
  /** Earliest later instant at which something changes by itself, silence and doubt of readings apart; Infinity: none. */
  wake: number;
  /** The same for silence and doubt, which every reading puts off. */
  readingsWake: number;
  /** Something kept is to be looked at then, though nobody need be woken for it. */
  due: number;
  /** `wake` and `due` of each part of the house, and the `wake` of what is all the house's (frost, facts of the time): from then on nothing holds. */
  partWake: number[];
  partDue: number[];
  houseWake: number;
  /** By point: what was found holds while its value stays between these two (lines.ts). */
  over: number[];
  under: number[];
  points: PointMemory[];
  /** Values and times of the points' readings (readings.ts). */
  readings: Readings;
  rules: RuleMemory[];
  sources: SourceMemory[];
  channels: ChannelMemory[];
  frost: FrostMemory;
  /** Quality as control uses it: ten minutes of uncertain count as bad. */
  usable: Quality[];
  /** What the calendar says to each rule at `at`. */
  calendars: RuleCalendar[];
  /** How each rule stands at `at`. */
  standing: RuleCode[];
  /** By channel: the claim from hand to idle that speaks, and what it wants. */
  lowerClaim: Claim[];
  lowerState: State[];
  /** The same with lock-out, limit and proving: what the channel asks of its interlocks. */
  demandClaim: Claim[];
  demandState: State[];
  interlocked: (InterlockVerdict | null)[];
  /** By source: Σ 1/longest draw a ms, and the number, of what draws or has been decided to at `at`. */
  drawRate: number[];
  drawCount: number[];
  events: ControlEvent[];
  /** Whether switchings carry their ladder; a look into the future needs none. */
  explains: boolean;
}

/** What an instant's settling finds. */
type Found = Pick<
  Run,
  | 'wake'
  | 'due'
  | 'partWake'
  | 'partDue'
  | 'houseWake'
  | 'over'
  | 'under'
  | 'calendars'
  | 'standing'
  | 'lowerClaim'
  | 'lowerState'
  | 'demandClaim'
  | 'demandState'
  | 'interlocked'
  | 'drawRate'
  | 'drawCount'
>;

/** Before it has found anything. */
export function nothingFound({ points, channels, sources, rules, parts }: Plan): Found {
  return {
    wake: Infinity,
    due: Infinity,
    partWake: filled(parts.length, Infinity),
    partDue: filled(parts.length, Infinity),
    houseWake: Infinity,
    over: filled(points.length, -Infinity),
    under: filled(points.length, Infinity),
    calendars: filled(rules.length, NEVER),
    standing: filled<RuleCode>(rules.length, 'out-of-season'),
    lowerClaim: filled<Claim>(channels.length, 'idle'),
    lowerState: filled<State>(channels.length, 'off'),
    demandClaim: filled<Claim>(channels.length, 'idle'),
    demandState: filled<State>(channels.length, 'off'),
    interlocked: filled<InterlockVerdict | null>(channels.length, null),
    drawRate: filled(sources.length, 0),
    drawCount: filled(sources.length, 0),
  };
}

const NEVER: RuleCalendar = { from: 0, until: 0, inSeason: false, inHours: false, low: 0, high: 0 };

/** What a run found, in lists of another's own. */
export const copyFound = (run: Run): Found => ({
  wake: run.wake,
  due: run.due,
  partWake: run.partWake.slice(),
  partDue: run.partDue.slice(),
  houseWake: run.houseWake,
  over: run.over.slice(),
  under: run.under.slice(),
  calendars: run.calendars.slice(),
  standing: run.standing.slice(),
  lowerClaim: run.lowerClaim.slice(),
  lowerState: run.lowerState.slice(),
  demandClaim: run.demandClaim.slice(),
  demandState: run.demandState.slice(),
  interlocked: run.interlocked.slice(),
  drawRate: run.drawRate.slice(),
  drawCount: run.drawCount.slice(),
});

/** Grown one by one: a list made with a length keeps room for holes, and whatever reads it then looks for them. */
export function filled<T>(length: number, value: T): T[] {
  const list: T[] = [];
  while (list.length < length) list.push(value);
  return list;
}

/** Why a rule wants its channel on, or not. */
export type RuleCode =
  | 'wants'
  | 'satisfied'
  | 'out-of-season'
  | 'out-of-hours'
  | 'condition-not-met'
  | 'condition-unknown'
  | 'point-bad';

/** The entry of a list that the plan says is there. Not for lists of numbers: one line that reads lists of all kinds is slow for each. */
export function entry<T>(list: readonly T[], index: number): T {
  const found = list[index];
  if (found === undefined) throw absent(list, index);
  return found;
}

const absent = (list: readonly unknown[], index: number): Error =>
  new RangeError(`The plan names entry ${index} of a list of ${list.length}.`);

/** Something happens by itself at `instant`: the step must be awake then. */
export function wakeAt(run: Run, instant: number): void {
  if (instant > run.at && instant < run.wake) run.wake = instant;
}

/** As `wakeAt`, for what every reading puts off. */
export function wakeForReadings(run: Run, instant: number): void {
  if (instant > run.at && instant < run.readingsWake) run.readingsWake = instant;
}

/** What was found at `run.at` need not hold from `instant` on, but it can wait for the next step. */
export function dueAt(run: Run, instant: number): void {
  if (instant > run.at && instant < run.due) run.due = instant;
}

/**
 * What is asked only to be told. Claims note when they want to be awake as they are asked; a reason that somebody reads
 * afterwards must not move what the run has settled, or reading would change when the next step comes.
 */
export function told<T>(run: Run, ask: () => T): T {
  const { wake, readingsWake, due } = run;
  const answer = ask();
  run.wake = wake;
  run.readingsWake = readingsWake;
  run.due = due;
  return answer;
}

export const nextWake = (run: Run): number => Math.min(run.wake, run.readingsWake);
