/** Why a load runs or stands in the night's own business: hand, frost, rest, band, and nothing at all. */
import type { Reasons, RuleStanding } from '@/lib/control/because';
import { difference, temperature } from '@/lib/units/format';
import { duration } from '@/lib/units/time';
import { faultWords } from './because-held';
import { begin, pointName, said, sourceName, timeWords, valueOf, type Scene } from './scene';
import { level } from './settings';

type Reason<Claim extends keyof Reasons> = Partial<Reasons[Claim]>;

export function handWords(reason: Reason<'hand'>, scene: Scene): string {
  const since = timeWords(reason.givenAt, scene);
  const until = timeWords(reason.until, scene);
  return said(
    `Turned ${reason.state ?? ''} by ${reason.by ?? 'hand'}${since === null ? '' : ` at ${since}`}; back to auto${until === null ? '' : ` at ${until}`}.`,
    reason.pointDeadSince !== undefined && 'It ends early because its sensor is missing.',
    reason.holdInFrost === true && 'Not even frost ends it.',
  );
}

const BORROWS = {
  rest: 'Its rest was cut short.',
  'daily-limit': 'It draws beyond its daily limit.',
  'no-gain': 'It draws although the loop brought little.',
} as const;

export function frostWords(reason: Reason<'frost'>, scene: Scene): string {
  const since = timeWords(reason.frostSince, scene);
  const limit = level(reason.limit ?? 0, scene.preferences);
  const what = reason.part === 'cools' ? 'Held still in frost' : 'Helps against frost';
  const where =
    typeof reason.point === 'string'
      ? `${pointName(reason.point, scene)} is at ${temperature(reason.value ?? null, scene.preferences)}, and the frost limit is ${limit}`
      : `no sensor of the house answers${reason.until === undefined ? '' : `, so it goes on till ${timeWords(reason.until, scene) ?? ''}`}`;
  return said(
    `${what}${since === null ? '' : ` since ${since}`}: ${where}.`,
    reason.borrows === null || reason.borrows === undefined ? null : BORROWS[reason.borrows],
    typeof reason.point === 'string' &&
      reason.endsAtOrAbove !== undefined &&
      `Ends from ${level(reason.endsAtOrAbove, scene.preferences)}.`,
  );
}

/** "Rests till 06:06 at least, then until the heap beside the pipe is back to 43 °C (39.9 °C now), 07:06 at the latest." */
function restTill(reason: Reason<'rest'>, scene: Scene): string {
  const least = timeWords(reason.restUntil, scene);
  const most = timeWords(reason.restAtMostUntil, scene);
  const waits = [reason.recovery, ...(reason.recoveries ?? [])].flatMap((one) =>
    one === undefined ? [] : [one],
  );
  const waiting = waits
    .map((one) => {
      const value = one.good ? temperature(one.value, scene.preferences) : 'no good reading';
      return `${pointName(one.point, scene)} is back to ${level(one.level, scene.preferences)} (${value} now)`;
    })
    .join(' and ');
  if (least === null) return 'Rests; the rest begins anew when nothing draws.';
  if (waiting === '' || most === null || most === least) return `Rests till ${least}.`;
  return `Rests till ${least} at least, then until ${waiting}, ${most} at the latest.`;
}

export function restWords(reason: Reason<'rest'>, scene: Scene): string {
  const sooner =
    reason.frostBreaksBelow !== undefined &&
    `Sooner if the house falls under ${level(reason.frostBreaksBelow, scene.preferences)}.`;
  const until = timeWords(reason.until, scene);
  switch (reason.cause) {
    case 'daily-limit':
      return said(
        `${begin(sourceName(reason.source ?? '', scene))} has been drawn on for ${duration(reason.drawnS ?? 0)} in 24 h, and ${duration(reason.limitS ?? 0)} is its limit.`,
        until !== null && `Some of it comes back at ${until}.`,
        sooner,
      );
    case 'no-gain':
      return said(
        reason.leastGainK === undefined
          ? 'The loop brought too little warmth, so the draw was ended.'
          : `The loop brought less than ${difference(reason.leastGainK, scene.preferences)} of warmth, so the draw was ended.`,
        reason.recovery === undefined ? until !== null && `Rests till ${until}.` : restTill(reason, scene),
        sooner,
      );
    case 'not-worth-a-start':
      return said(
        `${duration(reason.worthS ?? 0)} of draw are left, too little for its least run of ${duration(reason.leastOnS ?? 0)}, so it waits.`,
        until !== null && `Enough at ${until}.`,
        sooner,
      );
    default:
      return said(restTill(reason, scene), sooner);
  }
}

/** "Bench probe 1 is at 3.6 °C, under 4.0 °C." */
function stands(rule: Partial<RuleStanding>, scene: Scene): string {
  const point = begin(pointName(rule.point ?? '', scene));
  const instead = rule.standInFor === undefined ? '' : ` (for ${pointName(rule.standInFor, scene)})`;
  return `${point}${instead} is at ${valueOf(rule.point ?? null, rule.value ?? null, scene)}`;
}

export function bandWords(reason: Reason<'band'>, scene: Scene): string {
  const { point = null, low = 0, high = 0, value = null } = reason;
  const warm = reason.purpose !== 'cool';
  const start = warm ? `under ${valueOf(point, low, scene)}` : `over ${valueOf(point, high, scene)}`;
  const beyond = value !== null && (warm ? value < low : value > high);
  const stop = reason.stops?.value ?? (warm ? high : low);
  return said(
    beyond ? `${stands(reason, scene)}, ${start}.` : `${stands(reason, scene)}; it was ${start}.`,
    `Stops ${warm ? 'above' : 'below'} ${valueOf(point, stop, scene)}.`,
  );
}

function idleOf(rule: RuleStanding, scene: Scene): string {
  const starts =
    rule.purpose === 'cool'
      ? `Starts above ${valueOf(rule.point, rule.high, scene)}.`
      : `Starts under ${valueOf(rule.point, rule.low, scene)}.`;
  switch (rule.why) {
    case 'out-of-season':
      return 'Out of season.';
    case 'out-of-hours':
      return 'Outside its hours.';
    case 'condition-not-met':
      return 'One of its conditions does not hold.';
    case 'condition-unknown':
      return `A condition is open: no good reading of ${(rule.unknown ?? []).map((key) => pointName(key, scene)).join(', ') || 'its sensor'}.`;
    case 'point-bad':
      return `${begin(pointName(rule.point, scene))} is ${faultWords(null)}.`;
    default:
      return `${stands(rule, scene)}. ${starts}`;
  }
}

export function idleWords(reason: Reason<'idle'>, scene: Scene): string {
  const rules = reason.rules ?? [];
  if (rules.length === 0) return 'No rule in force turns it on; by hand it can be.';
  return [...new Set(rules.map((rule) => idleOf(rule, scene)))].join(' ');
}
