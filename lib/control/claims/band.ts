/**
 * Band: two-position with a latch. Warm: on when the value is under low, off when it is over high; cool: the other
 * way; strictly, and between them it stays. On where a rule's latch is on, in season and hours, and its extra
 * conditions hold. Out of season or hours the latch is off; conditions only gate, they leave it.
 */
import type { BandReason, RuleStanding } from '../because';
import type { FactValue } from '../conditions';
import { awaitReading, isOver, isUnder, noteLines } from '../lines';
import { plain } from '../plain';
import { valueOf } from '../readings';
import { entry, wakeAt, type Run, type RuleCode } from '../run';
import type { ClaimRung } from './claim';

export const band: ClaimRung<'band'> = {
  claim: 'band',
  speaks: (run, channel) => (bandWants(run, channel) ? 'on' : null),
  because: (run, channel): BandReason => {
    const rule = entry(run.plan.channels, channel).rules.find((one) => run.standing[one] === 'wants');
    if (rule === undefined) throw new Error('No rule wants this channel on.');
    const standing = ruleStanding(run, rule);
    const warm = entry(run.plan.rules, rule).warm;
    const stops = warm
      ? { side: 'above' as const, value: standing.high }
      : { side: 'below' as const, value: standing.low };
    return { ...standing, stops };
  },
};

export function bandWants(run: Run, channel: number): boolean {
  const { rules } = entry(run.plan.channels, channel);
  for (const rule of rules) if (run.standing[rule] === 'wants') return true;
  return false;
}

/** Settles a rule: the calendar's word, the point in use, its latch, its conditions. */
export function settleRule(run: Run, index: number): void {
  const rule = entry(run.plan.rules, index);
  const calendar = entry(run.calendars, index);
  wakeAt(run, calendar.until);
  const before = entry(run.rules, index);
  const using = pointInUse(run, index, before.using);
  const latch = settleLatch(run, index, using, before.latch);
  if (latch !== before.latch) run.events.push({ kind: 'latch', at: run.at, rule: rule.id, on: latch });
  if (latch !== before.latch || using !== before.using) run.rules[index] = { ...before, latch, using };
  run.standing[index] = codeOf(run, index, using, latch);
}

/** The first point that is not bad; control returns to an earlier one after three good readings of it. */
function pointInUse(run: Run, index: number, using: number): number {
  const { points } = entry(run.plan.rules, index);
  const now = Math.min(using, points.length - 1);
  for (let place = 0; place < now; place += 1) {
    const { point } = entry(points, place);
    if (point === null) continue;
    if (run.usable[point] === 'good' && entry(run.points, point).goodRun >= 3) return place;
    awaitReading(run, point);
  }
  const { point } = entry(points, now);
  if (point !== null && run.usable[point] !== 'bad') return now;
  const usable = points.findIndex((one) => one.point !== null && run.usable[one.point] !== 'bad');
  return usable < 0 ? now : usable;
}

function settleLatch(run: Run, index: number, using: number, latch: boolean): boolean {
  const { warm, points } = entry(run.plan.rules, index);
  const { inSeason, inHours, low, high } = entry(run.calendars, index);
  const { point, offset } = entry(points, using);
  if (!inSeason || !inHours || point === null) return false;
  const quality = run.usable[point];
  if (quality === 'bad') return false;
  if (quality === 'uncertain') return latch;
  // a latch turns on at one end of the band and off at the other: only that end is looked at
  const turns =
    warm === latch
      ? isOver(run, point, offset === 0 ? high : plain(high - offset))
      : isUnder(run, point, offset === 0 ? low : plain(low - offset));
  return turns ? !latch : latch;
}

function codeOf(run: Run, index: number, using: number, latch: boolean): RuleCode {
  const { only, points } = entry(run.plan.rules, index);
  const { inSeason, inHours } = entry(run.calendars, index);
  if (!inSeason) return 'out-of-season';
  if (!inHours) return 'out-of-hours';
  const { point } = entry(points, using);
  if (point === null || run.usable[point] === 'bad') return 'point-bad';
  if (!latch) return 'satisfied';
  if (only === null) return 'wants';
  const verdict = only.verdict((fact, limits) => {
    const place = run.plan.pointPlaces.get(fact);
    if (place !== undefined) noteLines(run, place, limits);
    return readFact(run, fact);
  });
  return verdict === true ? 'wants' : verdict === false ? 'condition-not-met' : 'condition-unknown';
}

/** A fact's value now; null where it has no good reading. */
export function readFact(run: Run, fact: string): FactValue | null {
  const place = run.plan.pointPlaces.get(fact);
  if (place !== undefined) return run.usable[place] === 'good' ? valueOf(run, place) : null;
  const now = run.plan.timeFacts(run.at);
  switch (fact) {
    case 'time.hour':
      return now.hour;
    case 'time.month':
      return now.month;
    case 'time.weekday':
      return now.weekday;
    case 'time.sunUp':
      return now.sunUp;
    default:
      return null;
  }
}

/** How a rule stands, as data. */
export function ruleStanding(run: Run, index: number): RuleStanding {
  const { config, warm, points, only } = entry(run.plan.rules, index);
  const { low, high } = entry(run.calendars, index);
  const { using, latch } = entry(run.rules, index);
  const { point, key, offset } = entry(points, using);
  const value = point === null ? null : valueOf(run, point);
  const why = entry(run.standing, index);
  const standing: RuleStanding = {
    rule: config.name,
    version: config.version,
    purpose: warm ? 'warm' : 'cool',
    point: key,
    value: value === null ? null : value + offset,
    low,
    high,
    latch,
    why,
  };
  if (using > 0) standing.standInFor = entry(points, 0).key;
  if (why === 'condition-unknown')
    standing.unknown = only?.facts.filter((fact) => readFact(run, fact) === null) ?? [];
  return standing;
}
