/** The temperatures of a night as lines; what its loads did as strips. */
import type { Holding } from '@/db/client';
import type { Night } from '@/lib/analysis/night';
import { channelSpans } from '@/lib/analysis/spans';
import type { HouseState } from '@/lib/schema/house-state';
import type { WatchLine, WatchLoop, WatchStrip } from '@/lib/schema/watch-view';
import { recordsOf } from './channel-records';
import type { HouseRecord } from './plan';
import { readSeries, type SteppedSeries } from './reading';

const STEP_S = 300;
/** Two steps without a reading are a break; one may be an unlucky report. */
const BREAK_MS = 2.5 * STEP_S * 1000;

const DRAWN = ['house-air', 'bench', 'outdoors', 'loop-return'];

export async function readStrips(
  holding: Holding,
  record: HouseRecord,
  night: Night,
  now: number,
): Promise<WatchStrip[]> {
  const nodes = new Map(record.nodes.map((node) => [node.id, node.key]));
  const channels = record.channels.map((one) => ({
    ...one,
    nodeKey: nodes.get(one.nodeId) ?? '',
    safe: one.contact === 'NC' ? ('on' as const) : ('off' as const),
  }));
  const to = Math.min(now, night.to);
  const records = await recordsOf(holding, record.id, channels, night.from, to);
  return channels.map(({ id, number, key, label }) => {
    const known = records.get(id);
    const spans = known === undefined ? [] : channelSpans(known, night.from, to);
    return { channel: number, key, label, spans: spans.map(({ claim: _claim, ...span }) => span) };
  });
}

export async function readLines(
  holding: Holding,
  record: HouseRecord,
  night: Night,
  now: number,
  state: HouseState | null,
): Promise<WatchLine[]> {
  const points = record.points
    .filter((point) => DRAWN.includes(point.role) && point.unit === 'Cel')
    .sort((one, other) => DRAWN.indexOf(one.role) - DRAWN.indexOf(other.role));
  const numbers = points.map((point) => point.number);
  const series = await readSeries(holding, numbers, night.from, Math.min(now, night.to), STEP_S);
  return points.map(({ number, key, name, role }) => {
    const line = lineOf(series.get(number), now);
    const newest = state?.points.find((point) => point.key === key);
    // the line ends at the very figure that the sentence says
    const at = typeof newest?.at === 'string' ? Date.parse(newest.at) : null;
    if (
      at !== null &&
      typeof newest?.value === 'number' &&
      at > (line.at.at(-1) ?? 0) &&
      at < night.to &&
      at >= night.from
    )
      append(line, at, newest.value);
    return { key, name, role, ...line };
  });
}

function lineOf(series: SteppedSeries | undefined, now: number): Pick<WatchLine, 'at' | 'value'> {
  const line: Pick<WatchLine, 'at' | 'value'> = { at: [], value: [] };
  // a mean stands for its whole step, so it is drawn in the middle
  series?.at.forEach((at, place) =>
    append(line, Math.min(at + STEP_S * 500, now), series.mean[place] ?? null),
  );
  return line;
}

function append(line: Pick<WatchLine, 'at' | 'value'>, at: number, value: number | null): void {
  const before = line.at.at(-1);
  if (before !== undefined && at - before > BREAK_MS) {
    line.at.push(before + 1);
    line.value.push(null);
  }
  line.at.push(at);
  line.value.push(value === null ? null : Math.round(value * 100) / 100);
}

/** What comes back through a loop says something only while air moves in it. */
export function whileRunning(lines: WatchLine[], loops: WatchLoop[], strips: WatchStrip[]): WatchLine[] {
  return lines.flatMap((line) => {
    if (line.role !== 'loop-return') return [line];
    const channel = loops.find((loop) => loop.return === line.key)?.channel;
    const runs = strips.find((strip) => strip.key === channel)?.spans.filter((span) => span.on) ?? [];
    if (runs.length === 0) return [];
    const value = line.value.map((one, place) => {
      const at = line.at[place] ?? 0;
      return runs.some((run) => at >= run.from && at <= run.to) ? one : null;
    });
    return [{ ...line, value }];
  });
}
