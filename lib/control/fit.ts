/** Puts a memory into a plan's order. Entries stay with their ids; those of removed ids are parked, not dropped. */
import {
  emptyMemory,
  type ChannelMemory,
  type Memory,
  type PointMemory,
  type RuleMemory,
  type SourceMemory,
} from './memory';
import type { Plan } from './plan';

export function fit(plan: Plan, memory: Memory): Memory {
  if (memory.shape === plan.shape) return memory;
  const { parked } = memory;
  const points = sort(plan.points, [...parked.points, ...memory.points], (one) => newPoint(one.id));
  const rules = sort(plan.rules, [...parked.rules, ...memory.rules], (one) => newRule(one.id));
  const sources = sort(plan.sources, [...parked.sources, ...memory.sources], (one) =>
    newSource(one.id, memory.at ?? 0),
  );
  const channels = sort(plan.channels, [...parked.channels, ...memory.channels], (one) =>
    newChannel(one.id, one.safe),
  );
  return {
    ...emptyMemory(),
    ...memory,
    shape: plan.shape,
    points: points.kept,
    rules: rules.kept,
    sources: sources.kept,
    channels: channels.kept,
    parked: {
      points: points.parked,
      rules: rules.parked,
      sources: sources.parked,
      channels: channels.parked.map((one) => ({ ...one, hand: null, prove: null, relay: null })),
    },
  };
}

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

const newPoint = (id: string): PointMemory => ({
  id,
  value: null,
  at: null,
  lastAt: null,
  sameSince: null,
  suspects: 0,
  goodRun: 0,
  dropped: null,
  quality: 'bad',
  why: 'never-spoke',
  uncertainSince: null,
  doubts: null,
  contradictedSince: null,
  trail: null,
});

const newRule = (id: string): RuleMemory => ({ id, latch: false, using: 0 });

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

const newChannel = (id: string, safe: ChannelMemory['wanted']): ChannelMemory => ({
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
