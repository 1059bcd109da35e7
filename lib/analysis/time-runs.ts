/**
 * Times as runs of even steps, three numbers each: the first, the step to the next and how many there are. A logger writes
 * every few minutes for months, and what an import brought must be kept for as long as it may be taken back.
 * @example timeRuns([0, 60, 120, 500]) equals [0, 60, 3, 500, 0, 1]
 */
export function timeRuns(times: readonly number[]): number[] {
  const runs: number[] = [];
  let [first, step, many] = [0, 0, 0];
  let next = 0;
  for (const at of times) {
    if (many === 1) step = at - first;
    else if (many === 0 || at !== next) {
      if (many > 0) runs.push(first, step, many);
      [first, step, many] = [at, 0, 0];
    }
    many += 1;
    next = at + step;
  }
  if (many > 0) runs.push(first, step, many);
  return runs;
}

/** The times again, in their order. */
export function timesOfRuns(runs: readonly number[]): number[] {
  const times: number[] = [];
  for (let place = 0; place < runs.length; place += 3) {
    const [first = 0, step = 0, many = 0] = runs.slice(place, place + 3);
    for (let count = 0; count < many; count += 1) times.push(first + count * step);
  }
  return times;
}
