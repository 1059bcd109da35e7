'use client';
import { useState } from 'react';
import { Segmented } from '@/components/ui/segmented';
import { BIG } from './big';
import { useProving } from './context';
import { RunButton } from './run-button';
import { Running } from './running';
import { Button } from '@/components/ui/button';
import { TextField } from '@/components/ui/field';

const SECONDS = ['5', '10', '30', '60'] as const;

/** Long enough that a reading of what shows the run falls into it. */
function usualSeconds(hasRunProof: boolean, reportEvery: number): (typeof SECONDS)[number] {
  if (!hasRunProof) return '10';
  return reportEvery * 2 <= 30 ? '30' : '60';
}

export function RunStep() {
  const { proof, channel, reportEvery } = useProving();
  const [seconds, setSeconds] = useState(usualSeconds(channel.runProof !== null, reportEvery));
  const run = proof?.runs.find((one) => one.kind === 'pulse');
  if (run !== undefined && !run.isOver) return <Running run={run} />;
  return (
    <div className="flex flex-col items-start gap-3">
      {run !== undefined && run.startedAt === null ? (
        <p role="status" className="font-semibold text-warn">
          The relay never reported it on. See whether the node is heard, and what stood in its way; then run
          it again.
        </p>
      ) : null}
      <Segmented
        label="For how many seconds"
        options={SECONDS.map((value) => ({ value, label: `${value} s` }))}
        value={seconds}
        onChoose={setSeconds}
      />
      <RunButton kind="pulse" seconds={Number(seconds)} label={`Run for ${seconds} s`} />
    </div>
  );
}

const SAW = [
  ['right', 'It moved the right way'],
  ['wrong-way', 'It moved the wrong way'],
  ['nothing', 'Nothing moved'],
] as const;

/** What the person who stood there saw. Anything but right takes the proof back to a dead circuit. */
export function SeenStep() {
  const { act, busy, isHeapFan } = useProving();
  const [note, setNote] = useState('');
  const say = (saw: string) =>
    act('POST', 'steps', { step: 'seen', saw, ...(note.trim() === '' ? {} : { note }) });
  return (
    <div className="flex flex-col gap-2">
      <TextField
        label="Note, if there is one"
        value={note}
        onChange={(event) => setNote(event.target.value)}
      />
      {SAW.map(([saw, label]) => (
        <Button
          key={saw}
          kind={saw === 'right' ? 'primary' : 'plain'}
          className={BIG}
          busy={busy}
          onClick={() => void say(saw)}
        >
          {saw === 'right' && isHeapFan ? 'It blows into the heap’s pipe' : label}
        </Button>
      ))}
      <RunButton kind="pulse" seconds={10} label="Run once more, 10 s" isAgain />
    </div>
  );
}
