/** The figures behind a reason: what was read, beside what it was compared with. */
import type { Reasons, RuleStanding } from '@/lib/control/because';
import { difference, share } from '@/lib/units/format';
import { duration } from '@/lib/units/time';
import { isClaim } from './because';
import { begin, pointName, timeWords, valueOf, withInstants, type Scene } from './scene';

export interface ReasonFigure {
  name: string;
  value: string;
  /** What it is measured against; absent where it stands for itself. */
  against?: string;
}

/**
 * @param because as the core gave it, or as it came over the wire
 * @example figuresOf('rest', {…}, scene) has { name: 'The heap beside the pipe', value: '39.9 °C', against: 'back at 43.0 °C' }
 */
export function figuresOf(claim: string, because: unknown, scene: Scene): ReasonFigure[] {
  const reason = withInstants(because);
  if (!isClaim(claim) || typeof reason !== 'object' || reason === null) return [];
  switch (claim) {
    case 'rest':
      return ofRest(reason, scene);
    case 'band':
      return ofRule(reason, scene);
    case 'idle':
      return ((reason as Partial<Reasons['idle']>).rules ?? []).flatMap((rule) => ofRule(rule, scene));
    case 'frost':
      return ofFrost(reason, scene);
    case 'source-guard':
      return ofGuard(reason, scene);
    case 'limit':
      return ofLimit(reason, scene);
    case 'short-cycle':
      return ofLeastTime(reason, scene);
    default:
      return [];
  }
}

const named = (key: string, scene: Scene): string => begin(pointName(key, scene));

function ofRule(
  { point, value = null, low, high, purpose }: Partial<RuleStanding>,
  scene: Scene,
): ReasonFigure[] {
  if (point === undefined || low === undefined || high === undefined) return [];
  const [on, off] = purpose === 'cool' ? [high, low] : [low, high];
  const [over, under] = purpose === 'cool' ? ['above', 'below'] : ['below', 'above'];
  const against = `on ${over} ${valueOf(point, on, scene)}, off ${under} ${valueOf(point, off, scene)}`;
  return [{ name: named(point, scene), value: valueOf(point, value, scene), against }];
}

function ofRest(rest: Partial<Reasons['rest']>, scene: Scene): ReasonFigure[] {
  const waits = [...(rest.recovery === undefined ? [] : [rest.recovery]), ...(rest.recoveries ?? [])];
  const since = timeWords(rest.restSince, scene);
  const { credit, drawnS, limitS, worthS, leastOnS, leastGainK } = rest;
  return [
    ...waits.map(({ point, value, level, good }) => ({
      name: named(point, scene),
      value: good ? valueOf(point, value, scene) : 'no good reading',
      against: `back at ${valueOf(point, level, scene)}`,
    })),
    ...(since === null ? [] : [{ name: 'Rests since', value: since }]),
    ...(typeof drawnS !== 'number' || typeof limitS !== 'number'
      ? []
      : [{ name: 'Drawn on in 24 h', value: duration(drawnS), against: `${duration(limitS)} at most` }]),
    ...(worthS === undefined || leastOnS === undefined
      ? []
      : [{ name: 'Minutes left', value: duration(worthS), against: `${duration(leastOnS)} at least` }]),
    ...(leastGainK === undefined
      ? []
      : [{ name: 'Least gain', value: difference(leastGainK, scene.preferences) }]),
    ...(credit === undefined ? [] : [{ name: 'Left of the longest draw', value: share(credit) }]),
  ];
}

function ofFrost({ point, value = null, limit, endsAtOrAbove }: Partial<Reasons['frost']>, scene: Scene) {
  if (typeof point !== 'string' || limit === undefined || endsAtOrAbove === undefined) return [];
  const against = `under ${valueOf(point, limit, scene)}, ends from ${valueOf(point, endsAtOrAbove, scene)}`;
  return [{ name: named(point, scene), value: valueOf(point, value, scene), against }];
}

function ofGuard(reason: Partial<Reasons['source-guard']>, scene: Scene): ReasonFigure[] {
  const { point, value = null, floor, againAtOrAbove, level } = reason;
  if (typeof point !== 'string') return [];
  const against =
    floor !== undefined
      ? `floor ${valueOf(point, floor, scene)}, again from ${valueOf(point, againAtOrAbove ?? floor, scene)}`
      : level === undefined
        ? undefined
        : `ready above ${valueOf(point, level, scene)}`;
  const figure = { name: named(point, scene), value: valueOf(point, value, scene) };
  return [against === undefined ? figure : { ...figure, against }];
}

function ofLimit({ point, value = null, above, againAtOrBelow }: Partial<Reasons['limit']>, scene: Scene) {
  if (point === undefined || above === undefined) return [];
  const again =
    againAtOrBelow === undefined ? '' : `, again from ${valueOf(point, againAtOrBelow, scene)} down`;
  const against = `limit ${valueOf(point, above, scene)}${again}`;
  return [{ name: named(point, scene), value: valueOf(point, value, scene), against }];
}

function ofLeastTime({ holds, holdsSince, leastS }: Partial<Reasons['short-cycle']>, scene: Scene) {
  const since = timeWords(holdsSince, scene);
  if (since === null || holds === undefined || leastS === undefined) return [];
  return [{ name: `${begin(holds)} since`, value: since, against: `${duration(leastS)} at least` }];
}
