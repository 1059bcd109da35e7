/** Findings about a heap in words: what, why, how sure, the practice's source, and the careful next step. */
import type { Finding } from '@/lib/analysis/heap-facts';
import { CN_LEAST, CN_MOST } from '@/lib/analysis/heap-findings';
import { decimal, difference, share, temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { duration } from '@/lib/units/time';

export interface FindingWords {
  title: string;
  why: string;
  sure: string;
  next: string;
  source: string;
}

const COMMON = 'common practice, no source';
const PROBE_FIRST = 'Probe and squeeze it first';
const CAREFULLY = 'on a mild day, with the fan off and somebody beside you';

export function findingWords(finding: Finding, preferences: Preferences): FindingWords {
  return { ...body(finding, preferences), sure: sureness(finding) };
}

function sureness({ sure, kind }: Finding): string {
  if (sure === 'seen') return 'Found by nose or hand at one place; another place may differ.';
  if (sure === 'reckoned')
    return 'Reckoned from what went in and figures of tables; it is beyond what these may be off.';
  return kind === 'too-hot' || kind === 'uneven'
    ? 'Measured, at the places of the probes.'
    : 'Measured, and beyond its own wander.';
}

function body(finding: Finding, preferences: Preferences): Omit<FindingWords, 'sure'> {
  const degrees = (celsius: number, places = 1) => temperature(celsius, preferences, places);
  switch (finding.kind) {
    case 'core-falls':
      return {
        title: 'The core falls, and does not come back',
        why: `It fell ${difference(Math.abs(finding.changeK), preferences)} in ${finding.days} days, more than it wanders from day to day.`,
        next: `${PROBE_FIRST}. If it is dry, water it; if it is damp and smells earthy, feed it; turn it ${CAREFULLY}${finding.hasTurned ? '' : ', only if that does not help'}.`,
        source: COMMON,
      };
    case 'recovery-slower':
      return {
        title: 'It comes back more slowly',
        why: `To regain two thirds of a draw it took ${duration(finding.fromS)} at first and now ${duration(finding.toS)}, over ${finding.weeks} weeks.`,
        next: `Lengthen the rest first. ${PROBE_FIRST}; feed or turn it ${CAREFULLY}.`,
        source: COMMON,
      };
    case 'dry':
      return {
        title: 'It is dry',
        why:
          finding.moisture === null
            ? 'Squeezed, it crumbles: there is little water left in it.'
            : `What went in comes to ${share(finding.moisture)} ± ${share(finding.sd)} water; under 40 % a heap hardly works.`,
        next: 'Squeeze it at another place. Then water it slowly, a can at a time, until a fistful gives a drop or two; cold water all at once would chill it.',
        source: 'Cornell Composting, Getting the right mix',
      };
    case 'wet':
      return {
        title: 'It is too wet, or short of air',
        why: wetWhy(finding),
        next: `Squeeze it at another place and look to the cover. Work dry, coarse stuff in and open it up ${CAREFULLY}; keep your head out of it.`,
        source: finding.smell === null ? 'Cornell Composting, Getting the right mix' : COMMON,
      };
    case 'cn-low':
      return {
        title: 'Too much nitrogen for its carbon',
        why:
          finding.cn === null
            ? 'It smells of ammonia: nitrogen is leaving as gas.'
            : `What went in comes to ${decimal(finding.cn, 0)} : 1 ± ${decimal(finding.sd ?? 0, 0)}; from ${CN_LEAST} : 1 on nitrogen stays.`,
        next: 'Stand upwind: ammonia stings eyes and lungs. Add carbon with the next feed, straw or dry leaves; the mix below says how much.',
        source: finding.cn === null ? COMMON : '7 CFR 205.203(c)(2)',
      };
    case 'cn-high':
      return {
        title: 'Much carbon for its nitrogen',
        why: `What went in comes to ${decimal(finding.cn, 0)} : 1 ± ${decimal(finding.sd, 0)}; over ${CN_MOST} : 1 it works slowly. Wood counts with all of its carbon, of which little is reached in a winter.`,
        next: 'Where the core holds, leave it. Where it falls, feed greens or manure rather than straw.',
        source: '7 CFR 205.203(c)(2)',
      };
    case 'too-hot':
      return {
        title:
          finding.urgency === 'act'
            ? 'Dangerously hot: act now'
            : 'Hot: watch it closely, it may heat itself',
        why: `${finding.from === 'core' ? 'The core' : 'One place of the last round'} stands at ${degrees(finding.celsius)}, over ${degrees(finding.limit, 0)}. From there a heap dries, chars and can take fire.`,
        next:
          finding.urgency === 'act'
            ? 'Do not open it alone: air can make it burn. Call the fire service for advice, wet it from outside, keep people and the house’s air away from it.'
            : 'Probe it in several places, twice a day. Draw on it, wet it slowly; do not turn it without water at hand and somebody beside you.',
        source: 'USDA NRCS conservation practice 317, job sheet',
      };
    case 'uneven':
      return {
        title: 'Hot in one place, cold in another',
        why: `The last round went from ${degrees(finding.coldestC)} to ${degrees(finding.hottestC)}.`,
        next: `The cold side may be dry or open to the wind: squeeze it there and see to its cover. If the core falls too, turn outside to inside ${CAREFULLY}.`,
        source: COMMON,
      };
  }
}

function wetWhy(finding: Extract<Finding, { kind: 'wet' }>): string {
  if (finding.moisture !== null)
    return `What went in comes to ${share(finding.moisture)} ± ${share(finding.sd)} water; over 65 % air runs short.`;
  const hand = finding.squeeze === 'runs' ? 'Squeezed, water runs from it' : null;
  const nose =
    finding.smell === 'rotten-egg'
      ? 'it smells of rotten egg, for want of air'
      : finding.smell === 'sour'
        ? 'it smells sour, for want of air'
        : null;
  const text = [hand, nose].filter((part) => part !== null).join('; ');
  return `${text.charAt(0).toUpperCase()}${text.slice(1)}.`;
}
