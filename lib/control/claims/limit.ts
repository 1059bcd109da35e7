/**
 * Limit: the load is over its high limit or nobody can say so, or it has run for its longest on. Off; breaks least
 * on; ends a hand on. After a longest run it keeps off for least off and until the claims from hand to idle have
 * wanted it off once; frost that may break rest does not wait for that.
 */
import type { LimitReason } from '../because';
import { isOver } from '../lines';
import { valueOf } from '../readings';
import { entry, wakeAt, type Run } from '../run';
import type { ClaimRung } from './claim';

export const AGAIN_K = 1;

export const limit: ClaimRung<'limit'> = {
  claim: 'limit',
  speaks: (run, channel) => {
    const memory = entry(run.channels, channel);
    return memory.overHighLimit || limitPointBad(run, channel) || memory.ranLongest !== null ? 'off' : null;
  },
  because: (run, channel): LimitReason => {
    const { config, highLimitPoint, minOffMs } = entry(run.plan.channels, channel);
    const memory = entry(run.channels, channel);
    if (config.highLimit !== null && (memory.overHighLimit || limitPointBad(run, channel))) {
      return {
        cause: memory.overHighLimit ? 'high-limit' : 'high-limit-point-bad',
        point: config.highLimit.point,
        value: highLimitPoint === null ? null : valueOf(run, highLimitPoint),
        above: config.highLimit.above,
        againAtOrBelow: config.highLimit.above - AGAIN_K,
      };
    }
    const offUntil =
      memory.counted === 'off' && memory.leastSince !== null ? memory.leastSince + minOffMs : null;
    return { cause: 'longest-on', longestOnS: config.longestOnS ?? 0, until: offUntil };
  },
};

function limitPointBad(run: Run, channel: number): boolean {
  const { config, highLimitPoint } = entry(run.plan.channels, channel);
  return config.highLimit !== null && (highLimitPoint === null || run.usable[highLimitPoint] === 'bad');
}

/** Settles the high limit's latch and the longest run. Asks what hand to idle want, so these are settled before. */
export function settleLimit(run: Run, channel: number): void {
  const { config, highLimitPoint } = entry(run.plan.channels, channel);
  if (config.highLimit !== null && highLimitPoint !== null && run.usable[highLimitPoint] !== 'bad') {
    const { above } = config.highLimit;
    const memory = entry(run.channels, channel);
    const over = isOver(run, highLimitPoint, memory.overHighLimit ? above - AGAIN_K : above);
    if (over !== memory.overHighLimit) run.channels[channel] = { ...memory, overHighLimit: over };
  } else if (config.highLimit === null) forgetHighLimit(run, channel);
  if (config.longestOnS !== null || entry(run.channels, channel).ranLongest !== null)
    settleLongest(run, channel);
}

/** Taken away while it was passed, nothing would end it. */
function forgetHighLimit(run: Run, channel: number): void {
  const memory = entry(run.channels, channel);
  if (memory.overHighLimit) run.channels[channel] = { ...memory, overHighLimit: false };
}

function settleLongest(run: Run, channel: number): void {
  const { config, minOffMs, frostMayBreakRest } = entry(run.plan.channels, channel);
  const memory = entry(run.channels, channel);
  let { ranLongest } = memory;
  if (
    memory.counted === 'on' &&
    memory.countedSince !== null &&
    config.longestOnS !== null &&
    ranLongest === null
  ) {
    const endsAt = memory.countedSince + config.longestOnS * 1000;
    if (run.at >= endsAt) ranLongest = { at: run.at, wantedOff: false };
    else wakeAt(run, endsAt);
  }
  if (ranLongest !== null && !ranLongest.wantedOff && run.lowerState[channel] === 'off')
    ranLongest = { ...ranLongest, wantedOff: true };
  if (ranLongest !== null && memory.counted === 'off') {
    const offTill = (memory.leastSince ?? run.at) + minOffMs;
    const frost = run.lowerClaim[channel] === 'frost' && frostMayBreakRest;
    if (run.at < offTill) wakeAt(run, offTill);
    else if (ranLongest.wantedOff || frost) ranLongest = null;
  }
  if (ranLongest !== memory.ranLongest) run.channels[channel] = { ...memory, ranLongest };
}
