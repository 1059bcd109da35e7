/**
 * Time at temperature against published rules, as a record of what was measured where it was measured: never an approval.
 * A core that was hot says nothing of the edges, and the rules are written for other ways of composting than a heap that
 * is drawn on. Comparisons are made on unrounded °C: 130 °F is 54.44 °C and is not 55 °C.
 *
 * Sources: 40 CFR 503 appendix B (55 °C for 3 days in a vessel or a static aerated pile; 15 days with 5 turnings in a
 * windrow; 40 °C for 5 days with 4 h over 55 °C); 40 CFR 503.32(a)(3)(ii) (days by temperature); 7 CFR 205.203(c)(2)
 * (131 to 170 °F, initial C:N 25 to 40 : 1).
 */
import { celsius } from '@/lib/units/conversion';
import {
  hoursAbove,
  hoursFrom,
  hoursRead,
  longest,
  mostHoursAbove,
  spells,
  type HeatStep,
  type Spell,
} from './hot-spells';

export const HOT_C = 55;
export const WARM_C = 40;
/** 131 and 170 °F: the organic rule's band has an upper edge too, and time above it does not count. */
export const ORGANIC_FROM_C = celsius(131);
export const ORGANIC_TO_C = celsius(170);
export const ORGANIC_CN = { least: 25, most: 40 } as const;
/** On which side of these a core lies decides what counts. */
export const RULE_LINES = [WARM_C, HOT_C, ORGANIC_TO_C];
const STILL_H = 72;
const WINDROW_H = 360;
const TURNINGS = 5;
const FIVE_DAYS_H = 120;
const HOURS_OVER_HOT = 4;

/** 3 days in a vessel or in a static aerated pile: 72 h that have passed, not three dates. */
export function reachesStill(hours: number, leastC: number, fromC = HOT_C): boolean {
  return leastC >= fromC && hours >= STILL_H;
}

/** 15 days with 5 turnings in a windrow. */
export function reachesWindrow(hours: number, leastC: number, turnings: number, fromC = HOT_C): boolean {
  return leastC >= fromC && hours >= WINDROW_H && turnings >= TURNINGS;
}

/** 40 °C for 5 days, with 4 h over 55 °C in them. */
export function reachesFiveDays(hours: number, leastC: number, hoursOverHot: number): boolean {
  return leastC >= WARM_C && hours >= FIVE_DAYS_H && hoursOverHot >= HOURS_OVER_HOT;
}

/**
 * Days that the equation asks for at a temperature: 131 700 000 / 10^(0.14 t), for 7 % solids or more.
 * @returns null under 50 °C, for which it is not written; at least 20 minutes
 */
export function requiredDays(tempC: number): number | null {
  if (tempC < 50) return null;
  return Math.max(131_700_000 / 10 ** (0.14 * tempC), 20 / 1440);
}

export type RuleName = 'still' | 'windrow' | 'five-days' | 'organic-still' | 'organic-windrow';

export interface RuleRecord {
  rule: RuleName;
  /** h of the longest spell that the rule would count, and of how many it asks. */
  hours: number;
  ofHours: number;
  turnings: { made: number; of: number } | null;
  hoursOverHot: { made: number; of: number } | null;
  /** The figures of the rule were reached at this probe. No more than that. */
  isReached: boolean;
  spell: Spell | null;
}

export interface HeatRecord {
  hoursFromHot: number;
  hoursOverTop: number;
  hottestC: number;
  hottestAt: number;
  longestHot: Spell | null;
  turningsWhileHot: number;
  rules: RuleRecord[];
  /** h in which the probe was silent between its first and last reading. */
  silentHours: number;
  measuredHours: number;
}

/**
 * @param steps of the probe since the heap was built, in order of time
 * @param turnings epoch ms
 * @returns null without a reading
 */
export function heatRecord(steps: readonly HeatStep[], turnings: readonly number[]): HeatRecord | null {
  const [first, last] = [steps[0], steps.at(-1)];
  if (first === undefined || last === undefined) return null;
  const hot = spells(steps, HOT_C);
  const organic = spells(steps, ORGANIC_FROM_C, ORGANIC_TO_C);
  const hottest = steps.reduce((top, step) => (step.greatest > top.greatest ? step : top), first);
  const measuredHours = hoursRead(steps);
  return {
    hoursFromHot: hoursFrom(steps, HOT_C),
    hoursOverTop: hoursAbove(steps, ORGANIC_TO_C),
    hottestC: hottest.greatest,
    hottestAt: hottest.from,
    longestHot: longest(hot),
    turningsWhileHot: hot.reduce((sum, spell) => sum + within(turnings, spell), 0),
    rules: [
      still('still', hot, HOT_C),
      windrow('windrow', hot, turnings, HOT_C),
      fiveDays(steps),
      still('organic-still', organic, ORGANIC_FROM_C),
      windrow('organic-windrow', organic, turnings, ORGANIC_FROM_C),
    ],
    silentHours: Math.max(0, (last.to - first.from) / 3_600_000 - measuredHours),
    measuredHours,
  };
}

const within = (turnings: readonly number[], { from, to }: Spell) =>
  turnings.filter((at) => at >= from && at <= to).length;

function still(rule: RuleName, found: readonly Spell[], fromC: number): RuleRecord {
  const spell = longest(found);
  const isReached = spell !== null && reachesStill(spell.hours, spell.leastC, fromC);
  return {
    ...{ rule, spell, isReached, hours: spell?.hours ?? 0, ofHours: STILL_H },
    turnings: null,
    hoursOverHot: null,
  };
}

function windrow(
  rule: RuleName,
  found: readonly Spell[],
  turnings: readonly number[],
  fromC: number,
): RuleRecord {
  const reached = found.find((one) => reachesWindrow(one.hours, one.leastC, within(turnings, one), fromC));
  const spell = reached ?? longest(found);
  return {
    ...{ rule, spell, isReached: reached !== undefined, hours: spell?.hours ?? 0, ofHours: WINDROW_H },
    turnings: { made: spell === null ? 0 : within(turnings, spell), of: TURNINGS },
    hoursOverHot: null,
  };
}

function fiveDays(steps: readonly HeatStep[]): RuleRecord {
  const warm = spells(steps, WARM_C);
  const overHot = (spell: Spell) =>
    mostHoursAbove(
      steps.filter((step) => step.from >= spell.from && step.to <= spell.to),
      HOT_C,
      FIVE_DAYS_H,
    );
  const long = warm.filter((one) => one.hours >= FIVE_DAYS_H);
  const reached = long.find((one) => reachesFiveDays(one.hours, one.leastC, overHot(one)));
  const spell = reached ?? longest(warm);
  return {
    ...{ rule: 'five-days', spell, isReached: reached !== undefined },
    ...{ hours: spell?.hours ?? 0, ofHours: FIVE_DAYS_H, turnings: null },
    hoursOverHot: { made: spell === null ? 0 : overHot(spell), of: HOURS_OVER_HOT },
  };
}
