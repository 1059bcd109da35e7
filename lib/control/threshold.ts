/** A value of a reading with which a claim compares something, and the way that a point would have to go to it. */
import { valueOf } from './readings';
import type { Run } from './run';
import type { Claim } from './types';

export interface Threshold {
  /** null: the coldest point of the house. */
  point: number | null;
  side: 'above' | 'below';
  value: number;
  /** The value itself is enough. */
  orAt: boolean;
  /** The claim asks whether the point is at the value: one that passes it is as before. */
  isEqual: boolean;
  /** The claim that compares. */
  of: Claim;
  /** What is compared counts over time, so nothing need change at once. */
  overTime: boolean;
}

export interface Compared {
  of: Claim;
  /** Whether the claim counts the value itself as low: `x ≤ value`, not `x < value`. */
  lowIncludes: boolean;
  overTime?: boolean;
  /** Where only one way of passing it means anything. */
  side?: Threshold['side'];
}

/** The way a point would have to go from where it is; none for one that is not to be trusted. */
export function past(run: Run, point: number | null, value: number, compared: Compared): Threshold[] {
  const now = goodValue(run, point);
  if (point === null || now === null) return [];
  const { of, lowIncludes, overTime = false } = compared;
  const isLow = lowIncludes ? now <= value : now < value;
  const side = compared.side ?? (isLow ? 'above' : 'below');
  return [{ point, side, value, orAt: lowIncludes === (side === 'below'), isEqual: false, of, overTime }];
}

/** For who asks whether a point is at a value: the way to it, or, from it, both ways. */
export function at(
  run: Run,
  point: number | null,
  value: number,
  compared: Pick<Threshold, 'of' | 'overTime'>,
): Threshold[] {
  const now = goodValue(run, point);
  if (point === null || now === null) return [];
  if (now === value)
    return (['above', 'below'] as const).map((side) => ({
      ...{ point, side, value, orAt: false, isEqual: true },
      ...compared,
    }));
  const side = now < value ? 'above' : 'below';
  return [{ point, side, value, orAt: true, isEqual: true, ...compared }];
}

const goodValue = (run: Run, point: number | null): number | null =>
  point === null || run.usable[point] !== 'good' ? null : valueOf(run, point);
