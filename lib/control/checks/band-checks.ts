/** Things to look at in a rule's band, beside frost, the house's other rules and the weather. */
import { withinSeason } from '../calendar';
import type { RuleBody } from '../rule-body';
import { look, type CheckInput, type Finding } from './finding';

export function bandChecks(input: CheckInput): Finding[] {
  return [...frostAboveBand(input), ...opposites(input), ...liftTooSmall(input), ...tooManyStarts(input)];
}

function frostAboveBand({ config, rule, channel, say }: CheckInput): Finding[] {
  const { frostLimit } = config.house;
  if (frostLimit === null || rule.body.purpose !== 'warm' || channel?.frostHelp !== true) return [];
  return rule.body.band.flatMap(({ low }, index) =>
    frostLimit > low
      ? [
          look(
            'frost-limit-above-band',
            [`band.${index}.low`],
            `The frost limit (${say.temperature(frostLimit)}) is above “on below” (${say.temperature(low)}): frost would run this channel first, rests and hours counting for nothing. Raise “on below” over it.`,
          ),
        ]
      : [],
  );
}

/** A warm rule still on, or a cool one, where the other is: both can be on between cool's low and warm's high. */
function overlaps(a: RuleBody, b: RuleBody): boolean {
  const [warm, cool] = a.purpose === 'warm' ? [a, b] : [b, a];
  return warm.band.some(({ high }) => cool.band.some(({ low }) => high > low));
}

/** Both seasons hold a day that is the other's first: two stretches of a ring meet where one begins in the other. */
function seasonsMeet(a: RuleBody, b: RuleBody): boolean {
  if (a.season === undefined || b.season === undefined) return true;
  return withinSeason(a.season.from, b.season) || withinSeason(b.season.from, a.season);
}

function opposites({ config, rule, channel }: CheckInput): Finding[] {
  const found: Finding[] = [];
  for (const other of config.rules) {
    if (other.id === rule.id || other.body.purpose === rule.body.purpose) continue;
    if (!overlaps(rule.body, other.body) || !seasonsMeet(rule.body, other.body)) continue;
    const isParted = config.interlocks.some(
      ({ kind, channel: one, other: two }) =>
        kind === 'never-with' &&
        ((one === rule.channel && two === other.channel) || (one === other.channel && two === rule.channel)),
    );
    const indexes = rule.body.band.map((_, index) => `band.${index}`);
    if (other.channel === rule.channel)
      found.push(
        look(
          'opposite-rules',
          indexes,
          `“${other.name}” wants the opposite of this channel in a band that overlaps: it would run for both. Part the bands.`,
        ),
      );
    else if (channel !== null && !isParted && sharesPoint(config.points, rule.body.point, other.body.point))
      found.push(
        look(
          'sources-fight',
          indexes,
          `“${other.name}” ${other.body.purpose === 'cool' ? 'cools' : 'warms'} while this rule ${rule.body.purpose === 'warm' ? 'warms' : 'cools'}: heat would be made and thrown away. Part the bands, or interlock the two channels.`,
        ),
      );
  }
  return found;
}

/** The same point, or two of the house's own: what one warms the other feels. */
function sharesPoint(points: { key: string; role: string }[], a: string, b: string): boolean {
  const isHouse = (key: string) =>
    points.some((one) => one.key === key && (one.role === 'house-air' || one.role === 'bench'));
  return a === b || (isHouse(a) && isHouse(b));
}

function liftTooSmall({ rule, channel, context, say }: CheckInput): Finding[] {
  const { liftK, coldestOutdoors } = context;
  if (liftK === undefined || rule.body.purpose !== 'warm') return [];
  return rule.body.band.flatMap(({ high }, index) => {
    const outdoors = high - liftK;
    if (coldestOutdoors !== undefined && outdoors <= coldestOutdoors) return [];
    const butForRest = rule.body.rest === undefined ? '' : ' but for its rest';
    const load = channel === null || channel.loadKind === 'motor' ? 'fan' : 'load';
    return [
      look(
        'lift-too-small',
        [`band.${index}.high`],
        `While this ran it was at most ${say.difference(liftK)} warmer than outdoors: under ${say.temperature(outdoors)} outdoors this ${load} will never stop by itself${butForRest}. Lower “off above”, or rely on the rest.`,
      ),
    ];
  });
}

/** Starts an hour of a two-position cycle at half load, the most there can be: rise ÷ (4 τ band), per hour. */
function tooManyStarts({ rule, context }: CheckInput): Finding[] {
  const { response } = context;
  const allowed = context.channels?.[rule.channel]?.startsPerHour;
  if (response === undefined || allowed === undefined || allowed === null) return [];
  return rule.body.band.flatMap(({ low, high }, index) => {
    const starts = (3600 * response.riseK) / (4 * response.tauS * (high - low));
    if (starts <= allowed) return [];
    return [
      look(
        'starts-too-often',
        [`band.${index}.low`, `band.${index}.high`],
        `This band would start the load up to ${Math.round(starts * 10) / 10} times an hour; it is rated for ${allowed}. Widen the band.`,
      ),
    ];
  });
}
