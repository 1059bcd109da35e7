/** Which steps of a house's set-up are done, open, put off or must wait: told from what there is, so nothing is ticked. */

/**
 * In the order in which each can be done: a source names points, a channel names its source, a loop names its channel
 * and two points, a rule names a channel and a point.
 */
export const SETUP_STEPS = [
  'house',
  'node',
  'point',
  'source',
  'channel',
  'loop',
  'rule',
  'proving',
  'sheet',
] as const;
export type SetupStepName = (typeof SETUP_STEPS)[number];

/** What a house can do without, for now or for good. The house itself is there. */
export const CAN_WAIT = ['node', 'point', 'source', 'channel', 'loop', 'rule', 'proving'] as const;
export type PutOff = (typeof CAN_WAIT)[number];

export interface SetupFacts {
  nodes: { key: string; relays: number; isHeard: boolean }[];
  points: { key: string; role: string; isMeasured: boolean }[];
  sources: { slug: string; kind: string }[];
  channels: { key: string; label: string; source: string | null; isProved: boolean }[];
  loops: { source: string }[];
  /** Rules in force, and drafts that are in force nowhere yet. */
  rulesInForce: number;
  drafts: number;
  putOff: readonly string[];
}

export interface SetupStep {
  step: SetupStepName;
  state: 'done' | 'open' | 'put-off' | 'waits';
  /** Steps that must come before; empty unless it waits. */
  for: SetupStepName[];
}

const OF_THE_HOUSE = new Set(['house-air', 'bench']);

/** Sources that air is drawn through: of each the heat is known by a loop only. */
const looped = (source: { kind: string }) => source.kind === 'heap' || source.kind === 'ground';

const DONE: Record<SetupStepName, (facts: SetupFacts) => boolean> = {
  house: () => true,
  node: ({ nodes }) => nodes.length > 0,
  // without a reading of the house nothing can be judged, not even frost
  point: ({ points }) => points.some((one) => one.isMeasured && OF_THE_HOUSE.has(one.role)),
  source: ({ sources }) => sources.length > 0,
  channel: ({ channels }) => channels.length > 0,
  loop: ({ sources, loops }) =>
    sources.length > 0 &&
    sources.filter(looped).every((one) => loops.some((loop) => loop.source === one.slug)),
  rule: ({ rulesInForce }) => rulesInForce > 0,
  proving: ({ channels }) => channels.length > 0 && channels.every((one) => one.isProved),
  sheet: () => false,
};

const NEEDS: Record<SetupStepName, (facts: SetupFacts) => SetupStepName[]> = {
  house: () => [],
  node: () => [],
  point: ({ nodes }) => (nodes.length > 0 ? [] : ['node']),
  source: () => [],
  channel: ({ nodes }) => (nodes.some((one) => one.relays > 0) ? [] : ['node']),
  loop: ({ sources, channels, points }) => [
    ...(points.filter((one) => one.isMeasured).length > 1 ? [] : (['point'] as const)),
    ...(sources.length > 0 ? [] : (['source'] as const)),
    ...(channels.length > 0 ? [] : (['channel'] as const)),
  ],
  rule: ({ channels, points }) => [
    ...(points.length > 0 ? [] : (['point'] as const)),
    ...(channels.length > 0 ? [] : (['channel'] as const)),
  ],
  proving: ({ channels }) => (channels.length > 0 ? [] : ['channel']),
  sheet: ({ nodes }) => (nodes.length > 0 ? [] : ['node']),
};

export function setupSteps(facts: SetupFacts): SetupStep[] {
  return SETUP_STEPS.map((step) => {
    if (DONE[step](facts)) return { step, state: 'done', for: [] };
    if (facts.putOff.includes(step)) return { step, state: 'put-off', for: [] };
    const needs = NEEDS[step](facts);
    return needs.length === 0 ? { step, state: 'open', for: [] } : { step, state: 'waits', for: needs };
  });
}

/** The step to go on with; null when nothing but the sheet is left. */
export function nextStep(steps: readonly SetupStep[]): SetupStep | null {
  return steps.find((one) => one.state === 'open' && one.step !== 'sheet') ?? null;
}
