/** What the points of one house have said since its last step, as the core is told it. */
import type { ObservedPoint } from '@/lib/control/types';

/** A reading as control takes it. */
export interface Seen {
  pointId: string;
  at: number;
  /** Corrected by calibration. */
  value: number;
  /** As sent. */
  raw: number;
}

/** Times of a point's readings that are remembered between two steps. */
const BETWEEN_MAX = 1000;

export class SeenPoints {
  private readonly points = new Map<string, ObservedPoint>();
  /** Points whose newest reading no step has seen yet. */
  private readonly untold = new Set<string>();

  /** Takes readings in; one older than the newest of its point only tells that there was no silence. */
  observe(readings: readonly Seen[]): void {
    for (const { pointId, at, value, raw } of readings) {
      const before = this.points.get(pointId);
      const between = before?.between ?? [];
      if (before !== undefined && at <= before.at) {
        if (at < before.at && between.length < BETWEEN_MAX)
          before.between = [...between, at].sort((a, b) => a - b);
        continue;
      }
      const times = before !== undefined && this.untold.has(pointId) ? [...between, before.at] : between;
      this.untold.add(pointId);
      this.points.set(pointId, {
        value,
        at,
        ...(raw === value ? {} : { raw }),
        between: times.slice(-BETWEEN_MAX),
      });
    }
  }

  /** Time of the newest reading of a point, believed or not. */
  newestAt(pointId: string): number | null {
    return this.points.get(pointId)?.at ?? null;
  }

  observed(): Record<string, ObservedPoint> {
    return Object.fromEntries(this.points);
  }

  /** A step has taken in what was observed. */
  told(): void {
    for (const point of this.points.values()) delete point.between;
    this.untold.clear();
  }
}
