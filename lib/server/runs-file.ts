import 'server-only';
import { inHolding, type Holding } from '@/db/client';
import { recordsOf } from '@/db/queries/channel-records';
import { yardOfNights, type YardOfNights } from '@/db/queries/night-records';
import { channelSpans, type Span } from '@/lib/analysis/spans';
import type { House } from '@/lib/schema/yard-view';
import { csvLine } from '@/lib/units/csv';
import { isoIn } from './wire';

const SLICE_MS = 31 * 86_400_000;

const COLUMNS = [
  ...['channel', 'key', 'from', 'to', 'seconds', 'load', 'kind', 'claim'],
  ...['power_W', 'flow_L_per_s', 'intake', 'return', 'altitude_m'],
];

/**
 * What every channel's load did, and what heat and electricity of it are reckoned with: with the readings' file all that a
 * night says can be reckoned again. A line a span, channel by channel, ascending; the last one ends at `to` or now.
 * @param to epoch ms, not after now
 */
export async function* runParts(
  holdingId: string,
  house: House,
  from: number,
  to: number,
): AsyncGenerator<string> {
  yield csvLine(COLUMNS);
  const yard = await inHolding(holdingId, (holding) => yardOfNights(holding, house.id));
  for (const channel of yard?.channels ?? []) {
    const line = (span: Span) =>
      csvLine([
        ...[channel.number, channel.key, isoIn(house.zone, span.from), isoIn(house.zone, span.to)],
        ...[(span.to - span.from) / 1000, span.on ? 'on' : 'off', span.kind, span.claim],
        ...[channel.powerW, channel.flow === null ? null : channel.flow.m3PerS * 1000],
        ...[channel.loop?.intake ?? null, channel.loop?.return ?? null, yard?.house.altitudeM ?? null],
      ]);
    let last: Span[] = [];
    for (let begin = from; begin < to; begin += SLICE_MS) {
      const end = Math.min(begin + SLICE_MS, to);
      const more = await inHolding(holdingId, (holding) => spansOf(holding, house.id, channel, begin, end));
      const spans = joined([...last, ...more]);
      // the next slice may go on with it
      last = spans.slice(-1);
      if (spans.length > 1) yield spans.slice(0, -1).map(line).join('');
    }
    yield last.map(line).join('');
  }
}

async function spansOf(
  holding: Holding,
  houseId: string,
  channel: YardOfNights['channels'][number],
  from: number,
  to: number,
): Promise<Span[]> {
  const record = (await recordsOf(holding, houseId, [channel], from, to)).get(channel.id);
  return record === undefined ? [] : channelSpans(record, from, to);
}

/** Spans that a slice's end has cut, whole again. */
function joined(spans: readonly Span[]): Span[] {
  const found: Span[] = [];
  for (const span of spans) {
    const last = found.at(-1);
    const goesOn =
      last?.to === span.from && last.on === span.on && last.kind === span.kind && last.claim === span.claim;
    if (goesOn) found[found.length - 1] = { ...last, to: span.to };
    else found.push(span);
  }
  return found;
}
