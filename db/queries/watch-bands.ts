/** The bands that were and will be in force over a night, from the versions of the rules that stood then. */
import { and, asc, eq, gt, isNull, lt, or } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { rule, ruleVersion } from '@/db/schema/rule';
import { compileCalendar, place } from '@/lib/control/calendar';
import type { RuleBody } from '@/lib/control/types';
import type { WatchBand } from '@/lib/schema/watch-view';

interface Where {
  id: string;
  zone: string;
  latitude: number;
  longitude: number;
}
interface Span {
  from: number;
  to: number;
}

/** @param labels of the house's channels, by id */
export async function readBands(
  holding: Holding,
  house: Where,
  night: Span,
  labels: ReadonlyMap<string, string>,
): Promise<WatchBand[]> {
  const rows = await holding.db
    .select({ version: ruleVersion, rule })
    .from(ruleVersion)
    .innerJoin(rule, and(eq(rule.holdingId, ruleVersion.holdingId), eq(rule.id, ruleVersion.ruleId)))
    .where(
      and(
        eq(ruleVersion.holdingId, holding.id),
        eq(rule.houseId, house.id),
        lt(ruleVersion.forcedAt, new Date(night.to)),
        or(isNull(ruleVersion.endedAt), gt(ruleVersion.endedAt, new Date(night.from))),
      ),
    )
    .orderBy(asc(rule.createdAt), asc(rule.id), asc(ruleVersion.number));
  const bands: WatchBand[] = [];
  for (const { version, rule: of } of rows) {
    const channel = labels.get(of.channelId);
    if (channel === undefined || version.forcedAt === null) continue;
    const span = {
      from: Math.max(night.from, version.forcedAt.getTime()),
      to: Math.min(night.to, version.endedAt?.getTime() ?? of.retiredAt?.getTime() ?? Infinity),
    };
    const periods = periodsOf(version.body, house, span);
    if (periods.length > 0)
      bands.push({ point: version.body.point, channel, purpose: version.body.purpose, periods });
  }
  return bands;
}

/** Stretches with one pair of thresholds, out of season and hours left out: there the band does not decide. */
function periodsOf(body: RuleBody, house: Where, span: Span): WatchBand['periods'] {
  const calendar = compileCalendar(body, place(house));
  const periods: WatchBand['periods'] = [];
  for (let at = span.from; at < span.to;) {
    const { until, inSeason, inHours, low, high } = calendar(at);
    const to = Math.min(until, span.to);
    const last = periods.at(-1);
    if (inSeason && inHours) {
      if (last !== undefined && last.to === at && last.low === low && last.high === high) last.to = to;
      else periods.push({ from: at, to, low, high });
    }
    at = to;
  }
  return periods;
}
