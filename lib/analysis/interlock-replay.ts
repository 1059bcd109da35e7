/** What an interlock would have prevented: the times in which two loads ran as it would not have let them. */

/** Epoch ms, `from` to before `to`. */
export interface Stretch {
  from: number;
  to: number;
}

export interface DraftedInterlock {
  kind: 'never-with' | 'needs';
  delayS: number;
}

/** Stretches in order, those that touch or overlap put together. */
export function united(stretches: readonly Stretch[]): Stretch[] {
  const one: Stretch[] = [];
  for (const next of stretches.filter(({ from, to }) => to > from).toSorted((a, b) => a.from - b.from)) {
    const last = one.at(-1);
    if (last !== undefined && next.from <= last.to) last.to = Math.max(last.to, next.to);
    else one.push({ ...next });
  }
  return one;
}

/** What lies in both. */
export function shared(some: readonly Stretch[], others: readonly Stretch[]): Stretch[] {
  return united(
    some.flatMap((one) =>
      others.map((other) => ({
        from: Math.max(one.from, other.from),
        to: Math.min(one.to, other.to),
      })),
    ),
  );
}

/** What lies in the first and not in the others. */
export function without(some: readonly Stretch[], others: readonly Stretch[]): Stretch[] {
  const taken = united(others);
  return united(some).flatMap(({ from, to }) => {
    const left: Stretch[] = [];
    let since = from;
    for (const other of taken) {
      if (other.to <= since || other.from >= to) continue;
      if (other.from > since) left.push({ from: since, to: other.from });
      since = Math.max(since, other.to);
    }
    if (since < to) left.push({ from: since, to });
    return left;
  });
}

/**
 * Times that the interlock would have prevented, in order.
 * - never-with: both ran, or one did so soon after the other that the wait between them was cut short;
 * - needs: the first ran while the other did not, or had not yet for the wait.
 * What the loads would have done instead is not played through: a run that is kept off may come later.
 */
export function prevented(
  interlock: DraftedInterlock,
  runs: readonly Stretch[],
  otherRuns: readonly Stretch[],
): Stretch[] {
  const waitMs = interlock.delayS * 1000;
  const [own, other] = [united(runs), united(otherRuns)];
  if (interlock.kind === 'needs') {
    return without(
      own,
      other.map(({ from, to }) => ({ from: from + waitMs, to })).filter(({ from, to }) => to > from),
    );
  }
  const after = (stretches: readonly Stretch[]) =>
    stretches.map(({ from, to }) => ({ from, to: to + waitMs }));
  return united([...shared(own, after(other)), ...shared(other, after(own))]);
}

export interface PreventedNight {
  /** Date of its evening. */
  night: string;
  count: number;
  seconds: number;
}

/** By night; a stretch over noon counts in both, its seconds where they fell. */
export function byNight(
  stretches: readonly Stretch[],
  nights: readonly { night: string; from: number; to: number }[],
): PreventedNight[] {
  return nights.map(({ night, from, to }) => {
    const inside = shared(stretches, [{ from, to }]);
    return {
      night,
      count: inside.length,
      seconds: Math.round(inside.reduce((sum, one) => sum + (one.to - one.from), 0) / 1000),
    };
  });
}
