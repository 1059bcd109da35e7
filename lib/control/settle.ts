/** Brings a house to rest at one instant: looks at everything again until nothing more follows from it. */
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
import { settlePoints } from './quality';
import { entry, type Run } from './run';
import { settleUnbidden } from './unbidden';
import type { Explanation } from './events';
import type { Claim, State } from './types';

/** Settles `run.at`; afterwards `nextWake(run)` is the earliest instant at which something changes by itself. */
export function settle(run: Run): void {
  settleReadings(run);
  settleDecisions(run);
}

/** How good every point is, and what the derived ones are. */
export function settleReadings(run: Run): void {
  run.readingsWake = Infinity;
  settlePoints(run);
  settleDerived(run);
}

/** Everything that follows from the readings. */
export function settleDecisions(run: Run): void {
  const { plan } = run;
  run.wake = Infinity;
  run.due = Infinity;
  run.over.fill(-Infinity);
  run.under.fill(Infinity);
  for (let rule = 0; rule < plan.rules.length; rule += 1)
    run.calendars[rule] = entry(plan.rules, rule).calendar(run.at);
  if (plan.usesTimeFacts) run.wake = Math.min(run.wake, plan.timeFacts(run.at).until);
  const wake = run.wake;
  const firstEvent = run.events.length;
  // each round can only let a channel follow another, so a chain through all of them is the longest
  for (let round = 0; round < plan.channels.length + 4; round += 1) {
    run.wake = wake;
    settleSources(run);
    const handsEnded = settleDemands(run);
    if (!decideAll(run) && !handsEnded) break;
  }
  explainDecisions(run, firstEvent);
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

function settleSources(run: Run): void {
  const { channels, sources, rules } = run.plan;
  for (let channel = 0; channel < channels.length; channel += 1) {
    settleCounted(run, channel);
    settleProof(run, channel);
    settleUnbidden(run, channel);
  }
  for (let source = 0; source < sources.length; source += 1) {
    settleSource(run, source);
    settleGuard(run, source);
  }
  for (let channel = 0; channel < channels.length; channel += 1) settleGain(run, channel);
  for (let rule = 0; rule < rules.length; rule += 1) settleRule(run, rule);
  settleFrost(run);
}

/** Whether a limit ended a hand on: its end is then no longer waited for. */
function settleDemands(run: Run): boolean {
  let handsEnded = false;
  for (let channel = 0; channel < run.plan.channels.length; channel += 1) {
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
  settleInterlocks(run);
  return handsEnded;
}

/** Whether any load is to change. Channels are asked by number, so the first has the last of a credit. */
function decideAll(run: Run): boolean {
  let changed = false;
  for (const channel of run.plan.order) {
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
function explainDecisions(run: Run, firstEvent: number): void {
  if (!run.explains) return;
  for (let place = firstEvent; place < run.events.length; place += 1) {
    const event = entry(run.events, place);
    if (event.kind !== 'switching' && event.kind !== 'decision') continue;
    const channel = run.channels.findIndex((one) => one.id === event.channel);
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
