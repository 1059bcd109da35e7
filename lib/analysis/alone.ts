/** Times in which a node kept its house by itself, and what ran meanwhile. */

export interface AloneLoad {
  label: string;
  /** Key of its node. */
  node: string;
  /** What its fallback did, ascending: epoch ms, and what the load was then. */
  switchings: readonly { at: number; state: 'on' | 'off' }[];
}

export interface AloneTime {
  node: string;
  /** Epoch ms; `to` null: it is not told to be over. */
  from: number;
  to: number | null;
}

export interface Alone extends AloneTime {
  ran: { label: string; seconds: number }[];
}

/** A restart of the server takes seconds; nobody need read of it if nothing ran. */
const SHORT_MS = 60_000;
/** Runs of a node that logs no beginning: so near one another they are of one absence. */
const NEAR_MS = 2 * 3_600_000;

/**
 * @param told times by the nodes' logs; a node that logs none is known by its loads' switchings alone
 * @param from begin of what is asked for, epoch ms; times that end before are left out
 */
export function aloneTimes(
  told: readonly AloneTime[],
  loads: readonly AloneLoad[],
  from: number,
  now: number,
): Alone[] {
  const runs = loads.flatMap((load) => runsOf(load, told, now));
  const times = [...told];
  for (const run of runs) {
    if (times.some((time) => isWithin(run, time))) continue;
    const near = times.find(
      (time) => time.node === run.node && run.from - (time.to ?? now) < NEAR_MS && time.from <= run.from,
    );
    if (near === undefined) times.push({ node: run.node, from: run.from, to: run.to });
    else times[times.indexOf(near)] = { ...near, to: Math.max(near.to ?? 0, run.to) };
  }
  return times
    .map((time) => ({ ...time, ran: ranIn(time, runs) }))
    .filter(
      ({ ran, ...time }) =>
        (time.to ?? now) > from && (ran.length > 0 || (time.to ?? now) - time.from >= SHORT_MS),
    )
    .sort((one, other) => one.from - other.from);
}

interface Ran {
  label: string;
  node: string;
  from: number;
  to: number;
}

/** On until off; one whose end is not told was taken over by the command that ended the time it was in. */
function runsOf({ label, node, switchings }: AloneLoad, told: readonly AloneTime[], now: number): Ran[] {
  return switchings.flatMap(({ at, state }, place) => {
    if (state === 'off') return [];
    const ends = switchings[place + 1]?.at;
    const time = told.find((one) => one.node === node && one.from <= at && (one.to ?? now) >= at);
    return [{ label, node, from: at, to: ends ?? time?.to ?? now }];
  });
}

/** A second's slack: a node and its server round differently. */
const isWithin = (run: Ran, time: AloneTime): boolean =>
  run.node === time.node && run.from >= time.from - 1000 && run.from <= (time.to ?? Infinity);

function ranIn(time: AloneTime, runs: readonly Ran[]): Alone['ran'] {
  const seconds = new Map<string, number>();
  for (const run of runs)
    if (isWithin(run, time))
      seconds.set(run.label, (seconds.get(run.label) ?? 0) + (run.to - run.from) / 1000);
  return [...seconds].map(([label, sum]) => ({ label, seconds: sum }));
}
