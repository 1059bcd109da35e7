/** Two looks at whether a running fan really brings heat: its least gain, and the proof that it turns. */
import { beginRest, counts, draws, leastRestMs } from './credit';
import { awaitReading, isDifferenceUnder, isOver } from './lines';
import type { ChannelMemory } from './memory';
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
 * Each rule that counts (those in season; of all, if none is) asks for its own gain: the first that has been without it
 * for 2 min ends the draw, and its figure is kept with the end, whatever the rules are when somebody asks why.
 * @returns whether it ends just now, so that what its source found before must be found once more
 */
export function settleGain(run: Run, channel: number): boolean {
  const { source, rules } = entry(run.plan.channels, channel);
  if (source === null) return false;
  const memory = entry(run.channels, channel);
  let { noGainUntil } = memory;
  if (noGainUntil !== null && run.at >= noGainUntil) noGainUntil = null;
  if (noGainUntil !== null) dueAt(run, noGainUntil);
  const isDrawing = draws(run, channel);
  let gainLowSince: number | null = null;
  let noGainK: number | null = null;
  for (const rule of rules) {
    const gain = isDrawing ? gainAsked(run, channel, rule) : null;
    const since = gain === null ? null : lowSince(run, memory, rule, gain);
    keepLow(run, rule, since);
    if (since === null || gain === null) continue;
    gainLowSince = Math.min(gainLowSince ?? since, since);
    // of two in the same instant the greater says more
    if (run.at >= since + LOW_MS) noGainK = Math.max(noGainK ?? gain.kelvin, gain.kelvin);
  }
  if (gainLowSince !== null && noGainK !== null) {
    // where frost draws on all the same, the two minutes begin anew now, not at whatever step comes next
    gainLowSince = run.at;
    for (const rule of rules)
      if (typeof entry(run.rules, rule).gainLowSince === 'number') keepLow(run, rule, run.at);
    noGainUntil = run.at + leastRestMs(run, entry(run.plan.sources, source));
    spendAll(run, source, channel, noGainK);
  }
  if (gainLowSince !== null) wakeAt(run, gainLowSince + LOW_MS);
  if (gainLowSince !== memory.gainLowSince || noGainUntil !== memory.noGainUntil)
    run.channels[channel] = {
      ...{ ...memory, gainLowSince, noGainUntil },
      ...(noGainK === null ? {} : { noGainK }),
    };
  return noGainK !== null;
}

type Gain = NonNullable<NonNullable<Run['plan']['rules'][number]['rest']>['leastGain']>;

/** What a rule asks of its channel's draw now: the gains of rules in season count; of all, if none is. */
export function gainAsked(run: Run, channel: number, rule: number): Gain | null {
  const gain = entry(run.plan.rules, rule).rest?.leastGain ?? null;
  return gain !== null && counts(run, entry(run.plan.channels, channel).rules, rule) ? gain : null;
}

/** Since when a rule's draw has been without its gain; null: it is not, or it is too early to say. */
function lowSince(run: Run, memory: ChannelMemory, rule: number, gain: Gain): number | null {
  const looksAt = (memory.countedSince ?? -Infinity) + gain.afterMs;
  if (run.at < looksAt) {
    wakeAt(run, looksAt);
    return null;
  }
  if (!isLow(run, gain)) return null;
  const { gainLowSince: before } = entry(run.rules, rule);
  // memories of before this was kept by rule have it of the channel
  return (before === undefined ? memory.gainLowSince : before) ?? run.at;
}

function keepLow(run: Run, rule: number, since: number | null): void {
  const memory = entry(run.rules, rule);
  if (since !== memory.gainLowSince) run.rules[rule] = { ...memory, gainLowSince: since };
}

function isLow(run: Run, { intake, return: back, kelvin }: Gain): boolean {
  if (intake === null || back === null) return false;
  if (run.usable[intake] !== 'good' || run.usable[back] !== 'good') return false;
  return isDifferenceUnder(run, back, intake, kelvin);
}

/** Nothing else draws but what ends in this very instant for the same reason. */
function spendAll(run: Run, source: number, channel: number, kelvin: number): void {
  const memory = entry(run.sources, source);
  if (memory.resting) return;
  const others = entry(run.plan.sources, source).channels.filter((one) => one !== channel);
  if (!others.some((one) => draws(run, one) && !endsNow(run, one)))
    run.sources[source] = { ...beginRest(run, memory, 'no-gain'), restGainK: kelvin };
}

function endsNow(run: Run, channel: number): boolean {
  const { source } = entry(run.plan.channels, channel);
  const { noGainUntil } = entry(run.channels, channel);
  return source !== null && noGainUntil === run.at + leastRestMs(run, entry(run.plan.sources, source));
}
