/** The ladder that decided, line by line, and what would come next: the words of the why-panel. */
import type { NextReason } from '@/lib/control/because';
import { pointValue } from '@/lib/units/format';
import { becauseWords, isClaim } from './because';
import { CLAIM_NAMES, CLAIM_SILENT, CLAIM_TITLES } from './claims';
import { begin, pointName, timeWords, withInstants, type Scene } from './scene';

export interface LadderLine {
  claim: string;
  title: string;
  /** It speaks: it has something to say of this load. */
  speaks: boolean;
  /** The one that decided: the first that speaks. */
  decides: boolean;
  words: string;
}

export interface Step {
  claim: string;
  speaks: boolean;
  because?: unknown;
}

export function ladderLines(ladder: readonly Step[], scene: Scene): LadderLine[] {
  const decider = ladder.find((step) => step.speaks);
  return ladder.flatMap((step) => {
    if (!isClaim(step.claim)) return [];
    return [
      {
        claim: step.claim,
        title: CLAIM_TITLES[step.claim],
        speaks: step.speaks,
        decides: step === decider,
        words: step.speaks ? becauseWords(step.claim, step.because ?? {}, scene) : CLAIM_SILENT[step.claim],
      },
    ];
  });
}

/**
 * What follows, earliest first.
 * @example "At 06:06 the band turns it on." and "Sooner, if the house air falls under 3.0 °C: frost turns it on."
 */
export function nextWords(next: readonly unknown[], scene: Scene): string[] {
  return next.flatMap((one) => {
    const reason = withInstants(one);
    return isNext(reason) ? [oneNext(reason, scene)] : [];
  });
}

function oneNext(next: NextReason, scene: Scene): string {
  const does =
    next.claim === 'idle' ? `it goes ${next.state}` : `${CLAIM_NAMES[next.claim]} turns it ${next.state}`;
  if (next.kind === 'then') return `At ${timeWords(next.at, scene) ?? ''}, if no reading changes: ${does}.`;
  const unit = scene.points.find((point) => point.key === next.point)?.unit ?? 'Cel';
  const passes = next.side === 'below' ? 'falls under' : 'rises above';
  // without a point it is the coldest of the house, which frost looks at
  const who = next.point === null ? 'the coldest sensor of the house' : pointName(next.point, scene);
  return `${begin(`if ${who} ${passes}`)} ${pointValue(next.value, unit, scene.preferences)}: ${does}.`;
}

function isNext(value: unknown): value is NextReason {
  if (typeof value !== 'object' || value === null) return false;
  const one = value as Partial<Record<string, unknown>>;
  const known = typeof one['claim'] === 'string' && isClaim(one['claim']) && typeof one['state'] === 'string';
  return (
    known &&
    (one['kind'] === 'then'
      ? typeof one['at'] === 'number'
      : one['kind'] === 'if' && typeof one['value'] === 'number')
  );
}
