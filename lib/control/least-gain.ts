/** Two looks at whether a running fan really brings heat: its least gain, and the proof that it turns. */
import { beginRest, draws, leastRestMs } from './credit';
import { awaitReading, isDifferenceUnder, isOver } from './lines';
import { timeOf, valueOf } from './readings';
import { dueAt, entry, wakeAt, type Run } from './run';

const LOW_MS = 120_000;
/** A fan has this long to come up to speed before a reading of its proof counts. */
const SPIN_UP_MS = 15_000;

/** A load that is ordered on and whose proof shows nothing counts as not drawing. */
export function settleProof(run: Run, channel: number): void {
  const { config, runProofPoint } = entry(run.plan.channels, channel);
  const memory = entry(run.channels, channel);
  let { standing } = memory;
  if (config.runProof === null || runProofPoint === null) {
    // a proof that was taken away denies nothing any more
    if (standing) run.channels[channel] = { ...memory, standing: false };
    return;
  }
  if (memory.counted === 'off' || run.usable[runProofPoint] === 'bad') standing = false;
  else if (run.usable[runProofPoint] === 'good') {
    const value = valueOf(run, runProofPoint);
    const at = timeOf(run, runProofPoint);
    const says = at !== null && at >= (memory.countedSince ?? -Infinity) + SPIN_UP_MS;
    if (!says) awaitReading(run, runProofPoint);
    else if (value !== null) standing = !isOver(run, runProofPoint, config.runProof.above);
  }
  if (standing !== memory.standing) run.channels[channel] = { ...memory, standing };
}

/**
 * After `after` of a draw, return minus intake under the least gain for 2 min by good readings alone ends the
 * channel's draw: it is moving air, not heat. If nothing else draws, the source's credit is spent with it.
 * @returns whether it ends just now, so that what its source found before must be found once more
 */
export function settleGain(run: Run, channel: number): boolean {
  const { source, rules } = entry(run.plan.channels, channel);
  if (source === null) return false;
  const memory = entry(run.channels, channel);
  const wanted = draws(run, channel) ? gainWanted(run, rules) : null;
  let { gainLowSince, noGainUntil } = memory;
  let ends = false;
  if (noGainUntil !== null && run.at >= noGainUntil) noGainUntil = null;
  if (noGainUntil !== null) dueAt(run, noGainUntil);
  if (wanted === null) gainLowSince = null;
  else {
    const looksAt = (memory.countedSince ?? -Infinity) + wanted.afterMs;
    if (run.at < looksAt) {
      wakeAt(run, looksAt);
      gainLowSince = null;
    } else if (isLow(run, wanted)) {
      gainLowSince ??= run.at;
      if (run.at >= gainLowSince + LOW_MS) {
        // where frost draws on all the same, the two minutes begin anew now, not at whatever step comes next
        gainLowSince = run.at;
        noGainUntil = run.at + leastRestMs(run, entry(run.plan.sources, source));
        spendAll(run, source, channel);
        ends = true;
      }
      wakeAt(run, gainLowSince + LOW_MS);
    } else gainLowSince = null;
  }
  if (gainLowSince !== memory.gainLowSince || noGainUntil !== memory.noGainUntil)
    run.channels[channel] = { ...memory, gainLowSince, noGainUntil };
  return ends;
}

type Gain = NonNullable<NonNullable<Run['plan']['rules'][number]['rest']>['leastGain']>;

function gainWanted(run: Run, rules: readonly number[]): Gain | null {
  for (const rule of rules) {
    const gain = entry(run.plan.rules, rule).rest?.leastGain ?? null;
    if (gain !== null && run.calendars[rule]?.inSeason === true) return gain;
  }
  return null;
}

function isLow(run: Run, { intake, return: back, kelvin }: Gain): boolean {
  if (intake === null || back === null) return false;
  if (run.usable[intake] !== 'good' || run.usable[back] !== 'good') return false;
  return isDifferenceUnder(run, back, intake, kelvin);
}

/** Nothing else draws but what ends in this very instant for the same reason. */
function spendAll(run: Run, source: number, channel: number): void {
  const memory = entry(run.sources, source);
  if (memory.resting) return;
  const others = entry(run.plan.sources, source).channels.filter((one) => one !== channel);
  if (!others.some((one) => draws(run, one) && !endsNow(run, one)))
    run.sources[source] = beginRest(run, memory, 'no-gain');
}

function endsNow(run: Run, channel: number): boolean {
  const { gainLowSince, noGainUntil } = entry(run.channels, channel);
  return noGainUntil !== null && gainLowSince === run.at;
}
