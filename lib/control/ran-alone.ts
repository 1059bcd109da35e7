/**
 * Draws that are told afterwards: a node ran its fallback while nobody heard it, and tells from its log when it is back.
 * The rolling 24 h counts them like all draws, and the credit is reckoned anew from the draws of that day: whoever drew,
 * a heap that was drawn on has not rested. So the credit can only fall by it, never rise.
 */
import { beginRest, creditAt, drawCost, leastRestMs } from './credit';
import { addSpans } from './day';
import type { SourceMemory } from './memory';
import { entry, type Run } from './run';

interface Draw {
  from: number;
  to: number;
  /** Share a ms. */
  cost: number;
}

/** Takes in what was told of a channel since the last step; what reaches back before that counts once. */
export function takeRunsAlone(run: Run, channel: number): void {
  const memory = entry(run.channels, channel);
  const told = run.observed.relays[memory.id]?.ranAlone ?? [];
  if (told.length === 0) return;
  let till = memory.aloneTill ?? -Infinity;
  const fresh: { from: number; to: number }[] = [];
  for (const { from, to } of [...told].sort((one, other) => one.from - other.from)) {
    const begins = Math.max(from, till);
    const ends = Math.min(to, run.stepAt);
    if (ends <= begins) continue;
    fresh.push({ from: begins, to: ends });
    till = ends;
  }
  if (fresh.length === 0) return;
  run.channels[channel] = { ...memory, aloneTill: till };
  for (const { from, to } of fresh)
    run.events.push({ kind: 'ran-alone', at: run.at, channel: memory.id, from, to });
  const { source } = entry(run.plan.channels, channel);
  if (source !== null) drawAfterwards(run, source, channel, fresh);
}

function drawAfterwards(
  run: Run,
  index: number,
  channel: number,
  fresh: readonly { from: number; to: number }[],
): void {
  const source = entry(run.plan.sources, index);
  const before = entry(run.sources, index);
  // what a draw costs goes by the season, which no instant of this step has asked for yet
  for (const rule of source.rules) run.calendars[rule] = entry(run.plan.rules, rule).calendar(run.at);
  let memory = addSpans(
    before,
    fresh.map(({ from, to }) => [from, to, 1]),
    run.at,
  );
  if (source.hasRest) {
    const dearest = Math.max(...source.channels.map((one) => drawCost(run, one)));
    const known = before.spans.map(([from, to, count]) => ({
      from,
      to: to ?? run.at,
      cost: count * dearest,
    }));
    const cost = drawCost(run, channel);
    const draws = [...known, ...fresh.map((one) => ({ ...one, cost }))];
    memory = lowered(run, memory, replayed(draws, leastRestMs(run, source), run.at));
  }
  run.sources[index] = memory;
}

interface Replayed {
  credit: number;
  resting: boolean;
  restSince: number | null;
}

/** The credit at `now` after these draws, beginning full before the first of them. */
function replayed(draws: readonly Draw[], leastMs: number, now: number): Replayed {
  const edges = [...new Set([...draws.flatMap(({ from, to }) => [from, to]), now])].sort((a, b) => a - b);
  let [credit, resting, restSince]: [number, boolean, number | null] = [1, false, null];
  for (let place = 0; place + 1 < edges.length; place += 1) {
    const from = edges[place] ?? now;
    const length = (edges[place + 1] ?? now) - from;
    const during = draws.filter((draw) => draw.from <= from && draw.to > from);
    if (during.length > 0) {
      restSince = null;
      credit -= during.reduce((sum, draw) => sum + draw.cost, 0) * length;
      if (credit <= 1e-9) [credit, resting] = [0, true];
    } else if (resting) {
      restSince ??= from;
      if (from + length >= restSince + leastMs) [credit, resting, restSince] = [1, false, null];
    } else credit = Math.min(1, credit + length / Math.max(1, leastMs));
  }
  return { credit: resting ? 0 : credit, resting, restSince };
}

function lowered(run: Run, memory: SourceMemory, now: Replayed): SourceMemory {
  if (now.resting) {
    const resting = memory.resting ? memory : beginRest(run, memory, 'credit-spent');
    // a draw within a rest starts it anew
    const since = Math.max(memory.restSince ?? -Infinity, now.restSince ?? -Infinity);
    return { ...resting, restSince: since === -Infinity ? null : since };
  }
  if (memory.resting || now.credit >= creditAt(memory, run.at)) return memory;
  return { ...memory, credit: now.credit, creditAt: run.at };
}
