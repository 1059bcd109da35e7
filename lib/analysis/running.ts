/** When a load ran, and whether it is known or only supposed. */
import type { Extent, Series } from './series';

/** s that a proof may need to follow its load: a fan comes up to speed, a clamp is read once a report. */
const PROOF_LAG_S = 5;

export interface Running {
  /** In which the load ran, or is taken to have run. */
  ran: Extent[];
  standingS: number;
  /** Some of it was not proved: no proof, or one that was silent. */
  assumed: boolean;
}

/**
 * One run of a relay, less the time in which its proof says that the load stood. Only readings of the run itself judge it:
 * the one before was taken with the fan off, and would take half a report from every draw. The first judges backwards.
 */
export function running(run: Extent, proof: { series: Series | undefined; above: number } | null): Running {
  const { series } = proof ?? {};
  if (proof === null || series === undefined) return { ran: [run], standingS: 0, assumed: true };
  const heldMs = series.holdS * 1000;
  const seen = series.good.filter(({ at }) => at >= run.from + PROOF_LAG_S * 1000 && at < run.to);
  const ran: Extent[] = [];
  let standingMs = 0;
  let assumed = false;
  const put = (from: number, to: number, runs: boolean) => {
    if (to <= from) return;
    if (!runs) standingMs += to - from;
    else if (ran.at(-1)?.to === from) (ran.at(-1) ?? run).to = to;
    else ran.push({ from, to });
  };
  let at = run.from;
  seen.forEach((reading, i) => {
    const runs = reading.value > proof.above;
    const begin = i === 0 ? Math.max(run.from, reading.at - heldMs) : reading.at;
    const end = Math.min(seen[i + 1]?.at ?? Infinity, reading.at + heldMs, run.to);
    if (begin > at) {
      assumed = true;
      put(at, begin, true);
    }
    put(begin, end, runs);
    at = end;
  });
  if (at < run.to) {
    assumed = true;
    put(at, run.to, true);
  }
  return { ran, standingS: standingMs / 1000, assumed };
}
