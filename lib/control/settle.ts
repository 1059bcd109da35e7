/** Brings a house to rest at one instant: looks at it part by part, at each until nothing more follows from it. */
import { settleRule } from './claims/band';
import { settleFrost } from './claims/frost';
import { endHand, settleHand } from './claims/hand';
import { settleInterlocks } from './claims/interlock';
import { limit, settleLimit } from './claims/limit';
import { settleProving } from './claims/proving';
import { settleGuard } from './claims/source-guard';
import { settleCounted } from './counting';
import { drawCost, settleSource } from './credit';
import { settleDerived } from './derived';
import { explainSettled } from './explanation';
import { askDemand, askLower, bareLadder, decide } from './ladder';
import { settleGain, settleProof } from './least-gain';
import { stir, stirAll } from './lull';
import { settlePoints } from './quality';
import { entry, type Run } from './run';
import { settleUnbidden } from './unbidden';
import type { Explanation } from './events';
import type { PlanPart } from './plan';
import type { Claim, State } from './types';

/** How good every point is, and what the derived ones are. */
export function settleReadings(run: Run): void {
  run.readingsWake = Infinity;
  settlePoints(run);
  settleDerived(run);
}

/**
 * All that follows at `run.at`, from readings of these points that say something else than before, and from what falls
 * due. Afterwards `nextWake(run)` is the earliest instant at which something changes by itself.
 */
export function settleDecisions(run: Run, points: readonly number[]): void {
  const { plan, frost } = run;
  const stirred = run.at >= run.houseWake ? stirAll(run) : stir(run, points);
  if (stirred === null || stirred.house) settleHouse(run);
  let wake = run.houseWake;
  let due = Infinity;
  for (let part = 0; part < plan.parts.length; part += 1) {
    if (stirred === null || run.frost !== frost || stirred.parts.has(part)) settlePart(run, part);
    wake = Math.min(wake, run.partWake[part] ?? Infinity);
    due = Math.min(due, run.partDue[part] ?? Infinity);
  }
  run.wake = wake;
  run.due = due;
}

/** Frost, and until when the facts of the time hold. */
function settleHouse(run: Run): void {
  run.wake = run.plan.usesTimeFacts ? run.plan.timeFacts(run.at).until : Infinity;
  settleFrost(run);
  run.houseWake = run.wake;
}

function settlePart(run: Run, index: number): void {
  const part = entry(run.plan.parts, index);
  run.due = Infinity;
  for (const rule of part.rules) run.calendars[rule] = entry(run.plan.rules, rule).calendar(run.at);
  const firstEvent = run.events.length;
  // each round can only let a channel follow another, so a chain through all of them is the longest
  for (let round = 0; round < run.plan.channels.length + 4; round += 1) {
    run.wake = Infinity;
    const drawsEnded = settleSources(run, part);
    const handsEnded = settleDemands(run, part);
    if (!decideAll(run, part) && !handsEnded && !drawsEnded) break;
  }
  explainDecisions(run, part, firstEvent);
  run.partWake[index] = run.wake;
  run.partDue[index] = run.due;
}

/** While nobody drove: loads dropped with their leases, time went on, and that is all that can be said. */
export function settleUndriven(run: Run): void {
  run.wake = Infinity;
  run.readingsWake = Infinity;
  for (let rule = 0; rule < run.plan.rules.length; rule += 1)
    run.calendars[rule] = entry(run.plan.rules, rule).calendar(run.at);
  for (let channel = 0; channel < run.plan.channels.length; channel += 1) settleCounted(run, channel);
  for (let source = 0; source < run.plan.sources.length; source += 1) settleSource(run, source);
  for (let channel = 0; channel < run.plan.channels.length; channel += 1) {
    settleHand(run, channel);
    settleProving(run, channel);
  }
}

/** Whether a draw ended for want of gain: its source was settled as if it went on. */
function settleSources(run: Run, { channels, sources, rules }: PlanPart): boolean {
  for (const channel of channels) {
    settleCounted(run, channel);
    settleProof(run, channel);
    settleUnbidden(run, channel);
  }
  for (const source of sources) {
    settleSource(run, source);
    settleGuard(run, source);
  }
  let drawsEnded = false;
  for (const channel of channels) drawsEnded = settleGain(run, channel) || drawsEnded;
  for (const rule of rules) settleRule(run, rule);
  return drawsEnded;
}

/** Whether a limit ended a hand on: its end is then no longer waited for. */
function settleDemands(run: Run, part: PlanPart): boolean {
  let handsEnded = false;
  for (const channel of part.channels) {
    settleHand(run, channel);
    askLower(run, channel);
    settleLimit(run, channel);
    if (run.channels[channel]?.hand?.state === 'on' && limit.speaks(run, channel) !== null) {
      endHand(run, channel, 'limit');
      handsEnded = true;
      askLower(run, channel);
      settleLimit(run, channel);
    }
    settleProving(run, channel);
    askDemand(run, channel);
  }
  settleInterlocks(run, part);
  return handsEnded;
}

/** Whether any load is to change. Channels are asked by number, so the first has the last of a credit. */
function decideAll(run: Run, { order }: PlanPart): boolean {
  let changed = false;
  for (const channel of order) {
    // what the channels before it were just given is no longer there for this one
    if (changed) askLower(run, channel);
    const { claim, state } = decide(run, channel);
    changed = keep(run, channel, claim, state) || changed;
  }
  return changed;
}

function keep(run: Run, channel: number, claim: Claim, state: State): boolean {
  const memory = entry(run.channels, channel);
  if (state === memory.wanted) {
    if (claim === memory.claim) return false;
    const { id, claim: before } = memory;
    const explanation = unexplained(id, run.at, state, claim);
    run.events.push({ kind: 'decision', at: run.at, channel: id, state, claim, before, explanation });
    run.channels[channel] = { ...memory, claim };
    return false;
  }
  countDraw(run, channel, state);
  run.channels[channel] = { ...memory, wanted: state, claim, orderedAt: run.stepAt };
  const explanation = unexplained(memory.id, run.at, state, claim);
  run.events.push({
    kind: 'switching',
    at: run.at,
    channel: memory.id,
    from: memory.wanted,
    to: state,
    claim,
    explanation,
  });
  return true;
}

const unexplained = (channel: string, at: number, state: State, claim: Claim): Explanation => ({
  channel,
  at,
  state,
  claim,
  until: null,
  ladder: [],
  next: [],
  rule: null,
});

function countDraw(run: Run, channel: number, state: State): void {
  const { source } = entry(run.plan.channels, channel);
  if (source === null || entry(run.channels, channel).counted === state) return;
  const sign = state === 'on' ? 1 : -1;
  run.drawRate[source] = Math.max(0, (run.drawRate[source] ?? 0) + sign * drawCost(run, channel));
  run.drawCount[source] = Math.max(0, (run.drawCount[source] ?? 0) + sign);
}

/** A decision's ladder is taken once the instant is settled, so that what follows it can be foreseen. */
function explainDecisions(run: Run, { channels }: PlanPart, firstEvent: number): void {
  if (!run.explains) return;
  for (let place = firstEvent; place < run.events.length; place += 1) {
    const event = entry(run.events, place);
    if (event.kind !== 'switching' && event.kind !== 'decision') continue;
    const channel = channels.find((one) => run.channels[one]?.id === event.channel);
    if (channel === undefined) continue;
    const explanation = explainSettled(run, channel);
    const isOvertaken =
      event.kind === 'switching'
        ? event.to !== explanation.state
        : event.claim !== explanation.claim || event.state !== explanation.state;
    // what a later round of the same instant overtook has the names of its ladder alone
    if (isOvertaken) event.explanation.ladder = bareLadder(event.claim, event.explanation.state);
    else run.events[place] = { ...event, claim: explanation.claim, explanation };
  }
}
