'use client';
import { useState } from 'react';
import { Segmented } from '@/components/ui/segmented';
import { change } from '@/lib/units/format';
import { gainWords } from '@/lib/wording/proving';
import { useProving } from './context';
import { DoneButton } from './done-button';
import { RunButton } from './run-button';
import { Running } from './running';
import { Without } from './without';

const MINUTES = ['3', '5', '10'] as const;

export function GainStep() {
  const { proof, preferences } = useProving();
  const [minutes, setMinutes] = useState<(typeof MINUTES)[number]>('5');
  const run = proof?.runs.find((one) => one.kind === 'gain');
  if (run !== undefined && !run.isOver)
    return (
      <>
        <Running run={run} />
        {run.gain === null ? null : <p>So far: return {change(run.gain.kelvin, preferences)}.</p>}
      </>
    );
  const words = gainWords(
    run?.gain?.kelvin ?? null,
    run?.gain?.sd ?? null,
    run?.seconds ?? null,
    preferences,
  );
  return (
    <div className="flex flex-col items-start gap-3">
      {run === undefined ? null : (
        <p role="status" className="font-semibold">
          {words ?? 'No good readings of both ends of the loop came in the last third of the run.'}
        </p>
      )}
      {words === null ? null : <DoneButton step="gain">Write it down</DoneButton>}
      <Segmented
        label="For how many minutes"
        options={MINUTES.map((value) => ({ value, label: `${value} min` }))}
        value={minutes}
        onChoose={setMinutes}
      />
      <RunButton kind="gain" seconds={Number(minutes) * 60} label={`Run for ${minutes} min`} />
      <Without step="gain" word="No gain run" />
    </div>
  );
}
