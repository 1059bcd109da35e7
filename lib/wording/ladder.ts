/** The ladder that decided, line by line: the words of the why-panel. */
import { becauseWords, isClaim } from './because';
import { CLAIM_SILENT, CLAIM_TITLES } from './claims';
import type { Scene } from './scene';

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
