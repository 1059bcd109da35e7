/**
 * What the heap's figures and its book say about it: a finding has evidence, and how sure it is; none is an order. A
 * finding that was set aside comes back when its evidence is other than it was then.
 */
import type { BookEntry, Dismissal, Finding, Findings, HeapFacts, Urgency } from './heap-facts';
import { recoverySlower } from './slower-recovery';

const DAY_MS = 86_400_000;
/** What nose and hand found tells of the heap for so long, unless it was worked on since. */
const SEEN_MS = 10 * DAY_MS;
/** NRCS practice standard 317, job sheet: watch closely over 165 °F, act at once over 185 °F. */
export const WATCH_C = ((165 - 32) * 5) / 9;
export const ACT_C = ((185 - 32) * 5) / 9;
/** Cornell Composting, "Getting the right mix": under 40 % much slower, over 60 % air runs short. */
export const DRY_SHARE = 0.4;
export const WET_SHARE = 0.65;
/** 7 CFR 205.203(c)(2): 25 to 40 : 1 at the beginning. */
export const CN_LEAST = 25;
export const CN_MOST = 40;
/** K between two places of one round from which turning would even it out. */
const UNEVEN_K = 25;

export function heapFindings(facts: HeapFacts, dismissals: readonly Dismissal[]): Findings {
  const found = [
    tooHot(facts),
    coreFalls(facts),
    recoverySlows(facts),
    ...byHand(facts),
    ...byMix(facts),
    uneven(facts),
  ]
    .filter((one) => one !== null)
    // what nose or hand found stands before what the mix reckons of the same
    .filter((one, place, all) => all.findIndex((other) => other.kind === one.kind) === place);
  const order: Urgency[] = ['act', 'soon', 'look'];
  const sorted = found.toSorted((a, b) => order.indexOf(a.urgency) - order.indexOf(b.urgency));
  const covering = (finding: Finding) =>
    dismissals.filter((one) => covers(one, finding)).toSorted((a, b) => b.at - a.at)[0];
  return {
    open: sorted.filter((finding) => covering(finding) === undefined),
    dismissed: sorted.flatMap((finding) => {
      const dismissal = covering(finding);
      return dismissal === undefined ? [] : [{ finding, dismissal }];
    }),
  };
}

/** Whether it was this evidence that somebody set aside: the same thing, and no step worse. */
export function covers(dismissal: Dismissal, finding: Finding): boolean {
  return (
    dismissal.kind === finding.kind &&
    dismissal.mark === finding.mark &&
    finding.level < dismissal.level + finding.step
  );
}

/** What was last done that changes a heap: evidence from before it is another heap's. */
function lastWork(facts: HeapFacts, kinds: readonly string[]): BookEntry | null {
  return facts.entries.find((entry) => kinds.includes(entry.kind)) ?? null;
}

function tooHot({ core, probes, now }: HeapFacts): Finding | null {
  const ofProbes = probes !== null && now - probes.at < 3 * DAY_MS ? probes : null;
  const isByProbes = ofProbes !== null && ofProbes.hottestC > (core?.value ?? -Infinity);
  const celsius = isByProbes ? ofProbes.hottestC : core?.value;
  const at = isByProbes ? ofProbes.at : core?.at;
  if (celsius === undefined || at === undefined || celsius <= WATCH_C) return null;
  const isNow = celsius > ACT_C;
  return {
    ...{ kind: 'too-hot', celsius, from: isByProbes ? 'probes' : 'core', limit: isNow ? ACT_C : WATCH_C },
    ...{ urgency: isNow ? 'act' : 'soon', sure: 'measured', at, level: celsius, step: 2 },
    mark: isNow ? 'over 185 °F' : 'over 165 °F',
  };
}

function coreFalls(facts: HeapFacts): Finding | null {
  const { trend, dawns } = facts;
  const last = dawns.at(-1);
  if (trend?.isLastingFall !== true || last === undefined) return null;
  const worked = lastWork(facts, ['built', 'fed', 'turned']);
  return {
    ...{ kind: 'core-falls', changeK: trend.changeK, days: trend.days },
    hasTurned: facts.entries.some((entry) => entry.kind === 'turned'),
    ...{ urgency: 'soon', sure: 'measured', at: last.at, level: -last.value, step: 2 },
    mark: worked === null ? 'since the beginning' : `since ${worked.id}`,
  };
}

function recoverySlows(facts: HeapFacts): Finding | null {
  const slower = facts.recovery === null ? null : recoverySlower(facts.recovery);
  if (slower === null) return null;
  const worked = lastWork(facts, ['built', 'turned']);
  return {
    ...{ kind: 'recovery-slower', ...slower.body },
    ...{ urgency: 'look', sure: 'measured', at: slower.at },
    mark: worked === null ? 'since the beginning' : `since ${worked.id}`,
    ...{ level: slower.body.toS, step: slower.body.sdS * 2 },
  };
}

/** Nose and hand, the newest word of each, unless the heap was worked on since. */
function byHand(facts: HeapFacts): Finding[] {
  const worked = lastWork(facts, ['built', 'fed', 'watered', 'turned']);
  const fresh = facts.entries.filter(
    (entry) => facts.now - entry.at < SEEN_MS && (worked === null || entry.at >= worked.at),
  );
  const squeezed = fresh.find((entry) => entry.squeeze !== null);
  const smelt = fresh.find((entry) => entry.smell !== null);
  const found: Finding[] = [];
  const seen = { sure: 'seen', level: 1, step: 1 } as const;
  const none = { moisture: null, sd: null };
  if (squeezed?.squeeze === 'crumbles')
    found.push({
      ...{ kind: 'dry', squeeze: 'crumbles', ...none, urgency: 'soon', ...seen },
      ...{ at: squeezed.at, mark: squeezed.id },
    });
  const isSour = smelt?.smell === 'rotten-egg' || smelt?.smell === 'sour';
  const wetBy = squeezed?.squeeze === 'runs' ? squeezed : isSour ? smelt : undefined;
  if (wetBy !== undefined)
    found.push({
      ...{ kind: 'wet', squeeze: squeezed?.squeeze ?? null, smell: isSour ? (smelt.smell ?? null) : null },
      ...{ ...none, urgency: 'soon', ...seen, at: wetBy.at, mark: wetBy.id },
    });
  if (smelt?.smell === 'ammonia')
    found.push({
      ...{ kind: 'cn-low', smell: 'ammonia', cn: null, sd: null, urgency: 'soon', ...seen },
      ...{ at: smelt.at, mark: smelt.id },
    });
  return found;
}

/** The mix as it went in, where its figures are beyond their own uncertainty; what the hand found goes before it. */
function byMix(facts: HeapFacts): Finding[] {
  const { mix } = facts;
  const fed = lastWork(facts, ['built', 'fed']);
  if (mix === null || fed === null || mix.knownShare < 0.8) return [];
  const { moisture, cn } = mix.mix;
  const hand = facts.entries.some((entry) => entry.squeeze !== null && facts.now - entry.at < SEEN_MS);
  const found: Finding[] = [];
  const reckoned = { urgency: 'look', sure: 'reckoned', at: fed.at, mark: fed.id } as const;
  const moistureSd = mix.sd.moisture ?? 0;
  if (moisture !== null && !hand && moisture + moistureSd < DRY_SHARE)
    found.push({
      ...{ kind: 'dry', squeeze: null, moisture, sd: moistureSd },
      ...{ ...reckoned, level: -moisture, step: 0.05 },
    });
  if (moisture !== null && !hand && moisture - moistureSd > WET_SHARE)
    found.push({
      ...{ kind: 'wet', squeeze: null, smell: null, moisture, sd: moistureSd },
      ...{ ...reckoned, level: moisture, step: 0.05 },
    });
  const cnSd = mix.sd.cn ?? 0;
  if (cn !== null && cn + cnSd < CN_LEAST)
    found.push({ ...{ kind: 'cn-low', smell: null, cn, sd: cnSd }, ...{ ...reckoned, level: -cn, step: 3 } });
  if (cn !== null && cn - cnSd > CN_MOST)
    found.push({ ...{ kind: 'cn-high', cn, sd: cnSd }, ...{ ...reckoned, level: cn, step: 5 } });
  return found;
}

function uneven(facts: HeapFacts): Finding | null {
  const { probes, now } = facts;
  if (probes === null || now - probes.at > SEEN_MS || probes.hottestC - probes.coldestC < UNEVEN_K)
    return null;
  const turned = lastWork(facts, ['turned']);
  if (turned !== null && turned.at > probes.at) return null;
  return {
    ...{ kind: 'uneven', hottestC: probes.hottestC, coldestC: probes.coldestC },
    ...{ urgency: 'look', sure: 'measured', at: probes.at, mark: probes.id },
    ...{ level: probes.hottestC - probes.coldestC, step: 5 },
  };
}
