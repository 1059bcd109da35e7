/**
 * What a channel did, as spans. Two records meet here: what the relay said of itself (and the trips that its node told)
 * decides whether the load ran; the decisions say why. Where a channel has no report yet, its decisions stand for them.
 */
import type { Claim, State } from '@/lib/control/types';

/** As strips show it: run filled, rest hatched, held dotted, hand outlined, off plain. */
export type SpanKind = 'run' | 'rest' | 'held' | 'hand' | 'off';

export interface Span {
  /** Epoch ms. */
  from: number;
  to: number;
  /** The load ran. */
  on: boolean;
  kind: SpanKind;
  /** Null before the first decision that is known. */
  claim: Claim | null;
}

interface Time {
  from: number;
  to: number | null;
}

/** Ascending in time; the newest of each list before the span is asked for may, and should, be among them. */
export interface ChannelRecord {
  decisions: { at: number; state: State; claim: Claim }[];
  reports: { at: number; state: State }[];
  /** What the node did without a command, and when, by its own account: a lease that ran out, or its fallback. */
  trips: { at: number; state: State }[];
  /** Times in which the node was lost, `to` null while it is: the load then stands as its wiring says, but for what the node told later. */
  silences: Time[];
  /** Times in which its proof denied that the load ran, whatever its relay said. */
  stood: Time[];
  /** What the load falls to without its coil. */
  safe: State;
}

const HELD: ReadonlySet<Claim> = new Set(['lock-out', 'interlock', 'limit', 'source-guard', 'fail-safe']);

function kindOf(on: boolean, claim: Claim | null, isLeft: boolean): SpanKind {
  if (isLeft) return on ? 'run' : 'held';
  if (claim === 'hand') return 'hand';
  if (on) return 'run';
  if (claim === 'rest') return 'rest';
  return claim !== null && HELD.has(claim) ? 'held' : 'off';
}

/**
 * Spans of one channel without gap or overlap over [fromMs, toMs), neighbours different.
 * @example a fan decided on at 01:00 by its band and off at 01:40 by its rest gives off, run, rest
 */
export function channelSpans(record: ChannelRecord, fromMs: number, toMs: number): Span[] {
  const loads = loadTimeline(record);
  const inside = (at: number | null): at is number => at !== null && at > fromMs && at < toMs;
  const cuts = [
    fromMs,
    ...[...record.decisions, ...loads].map((row) => row.at).filter(inside),
    ...[...record.silences, ...record.stood].flatMap((time) => [time.from, time.to]).filter(inside),
    toMs,
  ].sort((a, b) => a - b);

  const spans: Span[] = [];
  const decisionAt = walker(record.decisions);
  const loadAt = walker(loads);
  const isSilent = within(record.silences);
  const stands = within(record.stood);
  for (let i = 0; i + 1 < cuts.length; i += 1) {
    const from = cuts[i] ?? fromMs;
    const to = cuts[i + 1] ?? toMs;
    if (to <= from) continue;
    const claim = decisionAt(from)?.claim ?? null;
    const load = loadAt(from);
    const silent = isSilent(from);
    const stood = stands(from);
    const state = silent && load?.isOwn !== true ? record.safe : (load?.state ?? 'off');
    const on = state === 'on' && !stood;
    const kind = kindOf(on, claim, silent || stood);
    const last = spans.at(-1);
    if (last !== undefined && last.on === on && last.kind === kind && last.claim === claim) last.to = to;
    else spans.push({ from, to, on, kind, claim });
  }
  return spans;
}

/** Decisions up to the first report, then reports and what the node told of its own doing. */
function loadTimeline(record: ChannelRecord): { at: number; state: State; isOwn: boolean }[] {
  const row = (isOwn: boolean) => (one: { at: number; state: State }) => ({
    at: one.at,
    state: one.state,
    isOwn,
  });
  const told = [...record.reports.map(row(false)), ...record.trips.map(row(true))].sort(
    (a, b) => a.at - b.at,
  );
  const first = told[0]?.at ?? Infinity;
  const decided = record.decisions.filter((decision) => decision.at < first);
  return [...decided.map(row(false)), ...told];
}

/** Whether an instant is within one of some times; asked with instants that only grow. */
function within(times: readonly Time[]): (at: number) => boolean {
  const timeAt = walker(times.map((time) => ({ ...time, at: time.from })));
  return (at) => {
    const time = timeAt(at);
    return time !== undefined && (time.to === null || time.to > at);
  };
}

/** The newest row at or before an instant; asked with instants that only grow. */
function walker<T extends { at: number }>(rows: readonly T[]): (at: number) => T | undefined {
  let next = 0;
  return (at) => {
    while (next < rows.length && (rows[next]?.at ?? Infinity) <= at) next += 1;
    return rows[next - 1];
  };
}

/** Seconds of the spans that pass a test. */
export function secondsOf(spans: readonly Span[], passes: (span: Span) => boolean): number {
  return spans.reduce((sum, span) => sum + (passes(span) ? (span.to - span.from) / 1000 : 0), 0);
}

/** Times the load began to run within the spans; one that ran already at their beginning is not a start. */
export function startsOf(spans: readonly Span[]): number {
  return spans.filter((span, i) => span.on && i > 0 && spans[i - 1]?.on === false).length;
}
