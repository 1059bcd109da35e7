/**
 * A load that runs though it is off: its proof shows current while its relay says that it stands. A welded contact, or a
 * switch beside the relay. Only told: timers and credit go by what the relay reports, and a clamp that has slipped over
 * to another wire must not keep a house cold.
 */
import { awaitReading, isOver } from './lines';
import { timeOf, valueOf } from './readings';
import { entry, type Run } from './run';

/** A fan runs on for a while, and a clamp is read once a report: this long after the order a reading counts. */
const RUN_DOWN_MS = 30_000;

export function settleUnbidden(run: Run, channel: number): void {
  const { config, runProofPoint } = entry(run.plan.channels, channel);
  if (config.runProof === null || runProofPoint === null) return;
  const memory = entry(run.channels, channel);
  let unbidden = memory.unbidden === true;
  if (memory.counted === 'on' || run.usable[runProofPoint] === 'bad') unbidden = false;
  else if (run.usable[runProofPoint] === 'good') {
    const value = valueOf(run, runProofPoint);
    const at = timeOf(run, runProofPoint);
    const says = at !== null && at >= (memory.countedSince ?? -Infinity) + RUN_DOWN_MS;
    if (!says) awaitReading(run, runProofPoint);
    else if (value !== null) unbidden = isOver(run, runProofPoint, config.runProof.above);
  }
  if (unbidden !== (memory.unbidden === true)) run.channels[channel] = { ...memory, unbidden };
}
