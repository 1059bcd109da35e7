/** How a proof of a channel stands: which steps it needs, which are done, and what comes next. Instants are epoch ms. */

/** In the order of doing. */
export const PROOF_STEPS = [
  'dead',
  'rating',
  'photographs',
  'clear',
  'run',
  'seen',
  'current',
  'gain',
  'unplugged',
  'fallback',
  'last-resort',
] as const;
export type ProofStep = (typeof PROOF_STEPS)[number];

/** A pulse that is watched, one in which the node is unplugged, or a draw long enough to tell what it brings. */
export const RUN_KINDS = ['pulse', 'gain', 'unplug'] as const;
export type RunKind = (typeof RUN_KINDS)[number];

/** What was said of a step. `without`: it could not be done, for a reason that is kept. `not-needed` is put down at the end. */
export interface StepWord {
  step: ProofStep;
  result: 'done' | 'failed' | 'without' | 'not-needed';
  at: number;
}

/** Why a step is not needed. */
export type NotNeeded =
  | 'no-run-proof'
  | 'no-loop'
  | 'no-fallback'
  | 'node-cannot'
  | 'no-frost-limit'
  | 'does-not-warm'
  | 'seen-lately';

export interface ProofNeeds {
  /** Something shows that the load runs. */
  hasRunProof: boolean;
  /** It draws through a loop whose two ends are measured. */
  hasLoop: boolean;
  hasFallback: boolean;
  /** Null: the node has not said. */
  nodeCanFallback: boolean | null;
  hasFrostLimit: boolean;
  /** It helps against frost, or it is a heater. */
  warms: boolean;
  /** Somebody saw the thermostat of last resort come on within a year. */
  lastResortSeen: boolean;
}

export interface StepStanding<Word extends StepWord = StepWord> {
  step: ProofStep;
  state: 'done' | 'without' | 'failed' | 'open' | 'not-needed';
  because: NotNeeded | null;
  word: Word | null;
}

/** What a failure takes with it: whoever mends the wiring opens the isolator again, so all of it is done anew. */
const TAKES_ALONG: Partial<Record<ProofStep, readonly ProofStep[]>> = {
  seen: ['dead', 'rating', 'clear', 'run'],
  unplugged: ['dead', 'clear', 'run', 'seen', 'current', 'gain'],
  fallback: [],
};

/** How long it may be believed that nobody stands at the load. */
export const CLEAR_HOLDS_MS = 10 * 60_000;
/** A thermostat that was seen to work is looked at again in the next autumn. */
export const RESORT_HOLDS_MS = 365 * 86_400_000;

/** Every step in order. The last word on it counts, unless a failure after it took it along. */
export function proofSteps<Word extends StepWord>(
  words: readonly Word[],
  needs: ProofNeeds,
): StepStanding<Word>[] {
  const standing = new Map<ProofStep, Word>();
  for (const word of words) {
    standing.set(word.step, word);
    if (word.result === 'failed') for (const other of TAKES_ALONG[word.step] ?? []) standing.delete(other);
  }
  return PROOF_STEPS.map((step) => {
    const word = standing.get(step) ?? null;
    const because = notNeeded(step, needs);
    // what was done all the same is shown as done
    if (because !== null && word?.result !== 'done') return { step, state: 'not-needed', because, word };
    return { step, state: word?.result ?? 'open', because: null, word };
  });
}

function notNeeded(step: ProofStep, needs: ProofNeeds): NotNeeded | null {
  switch (step) {
    case 'current':
      return needs.hasRunProof ? null : 'no-run-proof';
    case 'gain':
      return needs.hasLoop ? null : 'no-loop';
    case 'fallback':
      if (!needs.hasFallback) return 'no-fallback';
      return needs.nodeCanFallback === false ? 'node-cannot' : null;
    case 'last-resort':
      if (!needs.hasFrostLimit) return 'no-frost-limit';
      if (!needs.warms) return 'does-not-warm';
      return needs.lastResortSeen ? 'seen-lately' : null;
    default:
      return null;
  }
}

const isSettled = ({ state }: StepStanding): boolean =>
  state === 'done' || state === 'without' || state === 'not-needed';

/** The first step that is still to be done; null: all are. */
export const nextStep = (steps: readonly StepStanding[]): ProofStep | null =>
  steps.find((one) => !isSettled(one))?.step ?? null;

/** The step that has to come before this one; null where it may be taken now. One that is done may be done again. */
export function stepBefore(steps: readonly StepStanding[], step: ProofStep): ProofStep | null {
  const place = PROOF_STEPS.indexOf(step);
  return steps.slice(0, place).find((one) => !isSettled(one))?.step ?? null;
}

/** Which step a run belongs to. */
export const STEP_OF_RUN: Record<RunKind, ProofStep> = { pulse: 'run', gain: 'gain', unplug: 'unplugged' };

/** Whether people are known to be clear of the load at `now`. */
export function isClear(steps: readonly StepStanding[], now: number): boolean {
  const clear = steps.find((one) => one.step === 'clear');
  return clear?.state === 'done' && clear.word !== null && now - clear.word.at <= CLEAR_HOLDS_MS;
}
