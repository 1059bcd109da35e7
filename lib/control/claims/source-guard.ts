/** Source guard: the core is under its floor (1 K to begin again), or the heap is not ready yet. Off. */
import type { SourceGuardReason } from '../because';
import { isOver, isUnder } from '../lines';
import { valueOf } from '../readings';
import { entry, wakeAt, type Run } from '../run';
import type { ClaimRung } from './claim';

export const AGAIN_K = 1;

export const sourceGuard: ClaimRung<'source-guard'> = {
  claim: 'source-guard',
  speaks: (run, channel) => {
    const { source } = entry(run.plan.channels, channel);
    return source !== null && (isUnderFloor(run, source) || !isReady(run, source)) ? 'off' : null;
  },
  because: (run, channel): SourceGuardReason => {
    const place = entry(run.plan.channels, channel).source;
    if (place === null) throw new Error('This channel has no source.');
    const { config, core, slug } = entry(run.plan.sources, place);
    const common = {
      source: slug,
      point: config.corePoint,
      value: core === null ? null : valueOf(run, core),
    };
    if (isUnderFloor(run, place)) {
      const floor = config.coreFloor ?? 0;
      return { cause: 'core-floor', ...common, floor, againAtOrAbove: floor + AGAIN_K };
    }
    const { aboveSince } = entry(run.sources, place);
    const { level, forS } = config.ready ?? { level: 0, forS: 0 };
    const until = aboveSince === null ? null : aboveSince + forS * 1000;
    return { cause: 'not-ready', ...common, level, forS, aboveSince, until };
  },
};

/** A core that is not good silences its floor; the latch stays for when it is good again. */
export function isUnderFloor(run: Run, source: number): boolean {
  const { core, config } = entry(run.plan.sources, source);
  if (core === null || config.coreFloor === null) return false;
  return entry(run.sources, source).underFloor && run.usable[core] === 'good';
}

export const isReady = (run: Run, source: number): boolean =>
  entry(run.plan.sources, source).config.ready === null || entry(run.sources, source).ready;

/** Settles the floor's latch and how long the core has been above the ready level. */
export function settleGuard(run: Run, source: number): void {
  const { config, core } = entry(run.plan.sources, source);
  if (core === null) return;
  const before = entry(run.sources, source);
  let { underFloor, aboveSince, ready } = before;
  if (config.coreFloor !== null && run.usable[core] === 'good')
    underFloor = isUnder(run, core, underFloor ? config.coreFloor + AGAIN_K : config.coreFloor);
  if (config.ready !== null && !ready) {
    // a reading in doubt keeps the last plausible value; a core that nobody knows breaks the stretch
    const above = run.usable[core] !== 'bad' && isOver(run, core, config.ready.level);
    aboveSince = above ? (aboveSince ?? run.at) : null;
    if (aboveSince !== null) {
      const readyAt = aboveSince + config.ready.forS * 1000;
      if (run.at >= readyAt) ready = true;
      else wakeAt(run, readyAt);
    }
  }
  if (underFloor !== before.underFloor || aboveSince !== before.aboveSince || ready !== before.ready)
    run.sources[source] = { ...before, underFloor, aboveSince, ready };
}
