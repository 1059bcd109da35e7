/** Puts a memory into a plan's order. Entries stay with their ids; those of removed ids are parked, not dropped. */
import {
  emptyMemory,
  type ChannelMemory,
  type Memory,
  type ParkedPoint,
  type RuleMemory,
  type SourceMemory,
} from './memory';
import type { Plan } from './plan';
import { inLists, NO_READING, withReadings } from './readings';
import { creditAt } from './credit';
import { settleDay } from './day';

export function fit(plan: Plan, memory: Memory): Memory {
  if (memory.shape === plan.shape) return memory;
  const { parked } = memory;
  const hadPoints = [...parked.points, ...withReadings(memory.points, memory.readings)];
  const points = sort(plan.points, hadPoints, (one) => newPoint(one.id));
  const rules = sort(plan.rules, [...parked.rules, ...memory.rules], (one) => newRule(one.id));
  const sources = sort(plan.sources, [...parked.sources, ...memory.sources], (one) =>
    newSource(one.id, memory.at ?? 0),
  );
  const channels = sort(plan.channels, [...parked.channels, ...memory.channels], (one) =>
    newChannel(one.id, one.safe),
  );
  const at = memory.at ?? 0;
  const wasParked = new Set(parked.channels.map((one) => one.id));
  return {
    ...emptyMemory(),
    ...memory,
    shape: plan.shape,
    ...inLists(points.kept),
    rules: rules.kept,
    sources: sources.kept,
    channels: channels.kept.map((one, index) =>
      wasParked.has(one.id) ? standing(one, plan.channels[index]?.safe ?? 'off') : one,
    ),
    parked: {
      points: points.parked,
      rules: rules.parked,
      sources: sources.parked.map((one) => laidAside(one, at)),
      channels: channels.parked.map((one) => ({
        ...switchedOff(one, at),
        ...{ hand: null, prove: null, relay: null },
      })),
    },
  };
}

/** A removed channel goes off: its least off counts from there, whenever it comes back. */
const switchedOff = (one: ChannelMemory, at: number): ChannelMemory =>
  one.counted === 'off' && one.wanted === 'off'
    ? one
    : { ...one, wanted: 'off', counted: 'off', countedSince: at, leastSince: at };

/** One that comes back stands as its wiring left it, coil off. */
const standing = (one: ChannelMemory, safe: ChannelMemory['wanted']): ChannelMemory =>
  one.wanted === safe ? one : { ...one, wanted: safe, counted: safe };

/** Nothing draws on a source that is gone, and nothing comes back to it. */
const laidAside = (one: SourceMemory, at: number): SourceMemory =>
  one.draws === 0 && one.slope === 0
    ? one
    : { ...settleDay(one, 0, at), credit: creditAt(one, at), creditAt: at, slope: 0 };

function sort<P extends { id: string }, M extends { id: string }>(
  wanted: P[],
  had: M[],
  fresh: (one: P) => M,
): { kept: M[]; parked: M[] } {
  const byId = new Map(had.map((one) => [one.id, one]));
  const kept = wanted.map((one) => byId.get(one.id) ?? fresh(one));
  const ids = new Set(wanted.map((one) => one.id));
  return { kept, parked: [...byId.values()].filter((one) => !ids.has(one.id)) };
}

const newPoint = (id: string): ParkedPoint => ({
  id,
  hasValue: false,
  suspects: 0,
  goodRun: 0,
  dropped: null,
  quality: 'bad',
  why: 'never-spoke',
  uncertainSince: null,
  doubts: null,
  contradictedSince: null,
  trail: null,
  reading: NO_READING,
});

const newRule = (id: string): RuleMemory => ({ id, latch: false, using: 0, gainLowSince: null });

const newSource = (id: string, at: number): SourceMemory => ({
  id,
  credit: 1,
  creditAt: at,
  slope: 0,
  resting: false,
  restSince: null,
  restWhy: null,
  ranToMost: false,
  draws: 0,
  spans: [],
  day: { usedMs: 0, at, slope: 0, nextAt: null },
  underFloor: false,
  ready: false,
  aboveSince: null,
});

export const newChannel = (id: string, safe: ChannelMemory['wanted']): ChannelMemory => ({
  id,
  wanted: safe,
  orderedAt: null,
  claim: null,
  counted: safe,
  countedSince: null,
  leastSince: null,
  known: null,
  knownSince: null,
  relay: null,
  hand: null,
  prove: null,
  lockouts: [],
  overHighLimit: false,
  ranLongest: null,
  pointDeadSince: null,
  gainLowSince: null,
  noGainUntil: null,
  standing: false,
});
