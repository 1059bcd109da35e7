/** The twelve claims in their order, and how a channel is decided by the first that speaks. */
import { band } from './claims/band';
import type { ClaimRung } from './claims/claim';
import { failSafe } from './claims/fail-safe';
import { frost } from './claims/frost';
import { hand } from './claims/hand';
import { idle } from './claims/idle';
import { interlock } from './claims/interlock';
import { limit } from './claims/limit';
import { lockOut } from './claims/lock-out';
import { proving } from './claims/proving';
import { rest } from './claims/rest';
import { shortCycle } from './claims/short-cycle';
import { sourceGuard } from './claims/source-guard';
import type { Run } from './run';
import type { LadderStep } from './events';
import { CLAIMS, type Claim, type Data, type State } from './types';

/** A rung without its own name: what all of them have in common. */
interface Rung {
  claim: Claim;
  speaks: (run: Run, channel: number) => State | null;
  because: (run: Run, channel: number) => Data;
}

/** Reasons are plain JSON by their types' own making; an interface only lacks the index that Data asks for. */
function rung<C extends Claim>({ claim, speaks, because }: ClaimRung<C>): Rung {
  return { claim, speaks, because: (run, channel) => because(run, channel) as unknown as Data };
}

/** Those that look at one channel by itself, in the middle of the ladder: hand to idle. */
const LOWER: Rung[] = [
  rung(hand),
  rung(sourceGuard),
  rung(frost),
  rung(failSafe),
  rung(rest),
  rung(band),
  rung(idle),
];
const LADDER: Rung[] = [
  rung(lockOut),
  rung(interlock),
  rung(limit),
  rung(proving),
  rung(shortCycle),
  ...LOWER,
];
const BY_CLAIM = new Map(LADDER.map((one) => [one.claim, one]));

/** Asks the claims from hand to idle; short-cycle, longest on and proving need their answer before they speak. */
export function askLower(run: Run, channel: number): void {
  for (const one of LOWER) {
    const wants = one.speaks(run, channel);
    if (wants === null) continue;
    run.lowerClaim[channel] = one.claim;
    run.lowerState[channel] = wants;
    return;
  }
}

/** What the channel asks of its interlocks: least times count for nothing there. */
export function askDemand(run: Run, channel: number): void {
  for (const one of [lockOut, limit, proving]) {
    const wants = one.speaks(run, channel);
    if (wants === null) continue;
    run.demandClaim[channel] = one.claim;
    run.demandState[channel] = wants;
    return;
  }
  run.demandClaim[channel] = run.lowerClaim[channel] ?? 'idle';
  run.demandState[channel] = run.lowerState[channel] ?? 'off';
}

/** The first claim that speaks, top to bottom, and what it wants. */
export function decide(run: Run, channel: number): { claim: Claim; state: State } {
  for (const one of LADDER) {
    const state = one.speaks(run, channel);
    if (state !== null) return { claim: one.claim, state };
  }
  throw new Error('Idle always speaks.');
}

export const becauseOf = (run: Run, channel: number, claim: Claim): Data =>
  BY_CLAIM.get(claim)?.because(run, channel) ?? {};

/** The same by names alone, of a decision that did not outlast its instant. */
export const bareLadder = (decided: Claim, wants: State): LadderStep[] => [
  ...CLAIMS.slice(0, CLAIMS.indexOf(decided)).map((claim) => ({ claim, speaks: false })),
  { claim: decided, speaks: true, wants },
];

/** The ladder down to the claim that decided, as data. */
export function ladderOf(run: Run, channel: number, decided: Claim): LadderStep[] {
  const steps: LadderStep[] = [];
  for (const one of LADDER) {
    if (one.claim !== decided) {
      steps.push({ claim: one.claim, speaks: false });
      continue;
    }
    const wants = run.channels[channel]?.wanted ?? 'off';
    steps.push({ claim: one.claim, speaks: true, wants, because: one.because(run, channel) });
    break;
  }
  return steps;
}

/** Claims under the one that decided that would speak if it did not, from short-cycle down; nothing else is no claim. */
export function ladderUnder(run: Run, channel: number, decided: Claim): LadderStep[] {
  const { wake } = run;
  const place = LADDER.findIndex((one) => one.claim === decided);
  const steps = LADDER.slice(place + 1).flatMap(({ claim, speaks, because }): LadderStep[] => {
    const wants = claim === 'idle' ? null : speaks(run, channel);
    return wants === null ? [] : [{ claim, speaks: true, wants, because: because(run, channel) }];
  });
  // asking is no reason to wake
  run.wake = wake;
  return steps;
}
