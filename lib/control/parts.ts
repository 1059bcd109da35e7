/**
 * The parts of a house, which do not bear on each other. Channels with a source or an interlock in common are of one part
 * and are settled together; what happens in one part leaves the others as they are. Only frost is all the house's.
 */
import type { Plan, PlanPart, PlanRule } from './plan';

type Places = Plan['pointPlaces'];
type Joined = Pick<Plan, 'channels' | 'sources' | 'rules' | 'order' | 'needsOrder'>;

const ascending = (a: number, b: number): number => a - b;

/** Every channel and every source is in one part. */
export function partsOf(plan: Joined): PlanPart[] {
  const rank = ranks(plan.order);
  const needsRank = ranks(plan.needsOrder);
  const by = (rankOf: readonly number[]) => (a: number, b: number) => (rankOf[a] ?? 0) - (rankOf[b] ?? 0);
  const placed = new Set<number>();
  const parts: PlanPart[] = [];
  for (const first of plan.order) {
    if (placed.has(first)) continue;
    const channels = boundTo(plan, first);
    for (const one of channels) placed.add(one);
    const own = channels.flatMap((one) => plan.channels[one] ?? []);
    const sources = new Set(own.flatMap(({ source }) => source ?? []));
    parts.push({
      channels: channels.toSorted(ascending),
      sources: [...sources].sort(ascending),
      rules: own.flatMap(({ rules }) => rules).sort(ascending),
      order: channels.toSorted(by(rank)),
      needsOrder: channels.toSorted(by(needsRank)),
      hasInterlocks: own.some(({ neverWith, needs }) => neverWith.length > 0 || needs.length > 0),
    });
  }
  plan.sources.forEach(({ channels }, source) => {
    if (channels.length === 0)
      parts.push({
        channels: [],
        sources: [source],
        rules: [],
        order: [],
        needsOrder: [],
        hasInterlocks: false,
      });
  });
  return parts;
}

function ranks(order: readonly number[]): number[] {
  const rank = order.slice();
  order.forEach((place, at) => (rank[place] = at));
  return rank;
}

/** The channel and all that share a source or an interlock with it, with each other too. */
function boundTo(plan: Joined, channel: number): number[] {
  const bound = new Set([channel]);
  for (const one of bound) {
    const found = plan.channels[one];
    if (found === undefined) continue;
    const { source, neverWith, needs, neededBy } = found;
    for (const other of source === null ? [] : (plan.sources[source]?.channels ?? [])) bound.add(other);
    for (const { other } of [...neverWith, ...needs]) bound.add(other);
    for (const lock of neededBy) bound.add(lock.channel);
  }
  return [...bound];
}

export function partByChannel(parts: readonly PlanPart[]): number[] {
  const partOf: number[] = [];
  parts.forEach(({ channels }, part) => {
    for (const channel of channels) partOf[channel] = part;
  });
  return partOf;
}

/** Points whose values or quality a rule asks for. */
export function pointsOfRule({ points, rest, only }: PlanRule, places: Places): number[] {
  const { until, leastGain } = rest ?? { until: null, leastGain: null };
  const facts = (only?.facts ?? []).map((fact) => places.get(fact));
  const asked = [...points.map((one) => one.point), until?.point, leastGain?.intake, leastGain?.return];
  return [...asked, ...facts].flatMap((one) => one ?? []);
}

/** By point: the parts that ask for it. */
export function partsByPoint(plan: Joined & Pick<Plan, 'parts' | 'points' | 'pointPlaces'>): number[][] {
  const asking = plan.points.map(() => new Set<number>());
  plan.parts.forEach(({ channels, sources, rules }, part) => {
    const asked = [
      ...rules.flatMap((one) => plan.rules[one] ?? []).flatMap((one) => pointsOfRule(one, plan.pointPlaces)),
      ...channels.flatMap((one) => [plan.channels[one]?.highLimitPoint, plan.channels[one]?.runProofPoint]),
      ...sources.map((one) => plan.sources[one]?.core),
    ];
    for (const point of asked) if (point !== null && point !== undefined) asking[point]?.add(part);
  });
  return asking.map((one) => [...one].sort(ascending));
}
