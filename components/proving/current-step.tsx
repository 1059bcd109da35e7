'use client';
import { pointValue } from '@/lib/units/format';
import { useProving } from './context';
import { DoneButton } from './done-button';
import { RunButton } from './run-button';
import { Running } from './running';

/** The load's own sensor, as it was during a run. */
export function CurrentStep() {
  const { proof, channel, preferences } = useProving();
  const going = proof?.runs.find((one) => one.kind === 'pulse' && !one.isOver);
  if (going !== undefined) return <Running run={going} />;
  const shown = (proof?.runs ?? []).flatMap((one) =>
    one.shown === null || one.shown.greatest === null ? [] : [one.shown],
  );
  const best = shown.toSorted((a, b) => (b.greatest ?? 0) - (a.greatest ?? 0))[0];
  const above = channel.runProof?.above ?? 0;
  return (
    <div className="flex flex-col gap-3">
      <p role="status">
        {best === undefined
          ? 'No reading came while it ran. Run it for longer.'
          : `${best.point} showed ${pointValue(best.greatest, best.unit, preferences)}; it counts as running over ${pointValue(above, best.unit, preferences)}.`}
      </p>
      {best !== undefined && (best.greatest ?? 0) > above ? (
        <DoneButton step="current">Its sensor shows it</DoneButton>
      ) : null}
      <RunButton kind="pulse" seconds={60} label="Run again, 60 s" />
    </div>
  );
}
