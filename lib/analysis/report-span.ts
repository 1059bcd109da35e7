/** Weeks, months and winters of nights, for reports. */
import { DateTime } from 'luxon';
import { seasonOf } from './money-season';

export type Span = 'week' | 'month' | 'winter';

export interface SpanOfNights {
  span: Span;
  /** Names of its first and last night. */
  from: string;
  to: string;
}

/**
 * The span that holds a night. A week runs from Monday's night to Sunday's, a month over the evenings of a calendar month.
 * @example spanOfNight('week', '2026-12-01', 54) is 2026-11-30 to 2026-12-06
 */
export function spanOfNight(span: Span, night: string, latitude: number): SpanOfNights {
  const day = DateTime.fromISO(night, { zone: 'UTC' });
  if (span === 'winter') {
    const { from, to } = seasonOf(night, latitude);
    return { span, from, to };
  }
  const name = (one: DateTime) => one.toFormat('yyyy-MM-dd');
  return { span, from: name(day.startOf(span)), to: name(day.endOf(span)) };
}

/** The span that many before it, or, below nothing, after. */
export function spanBefore(of: SpanOfNights, count: number, latitude: number): SpanOfNights {
  const unit = of.span === 'winter' ? 'years' : of.span === 'month' ? 'months' : 'weeks';
  const moved = DateTime.fromISO(of.from, { zone: 'UTC' }).minus({ [unit]: count });
  return spanOfNight(of.span, moved.toFormat('yyyy-MM-dd'), latitude);
}

/** The newest span of which every night has ended. @param night the one that lasts */
export function spanEnded(span: Span, night: string, latitude: number): SpanOfNights {
  return spanBefore(spanOfNight(span, night, latitude), 1, latitude);
}
