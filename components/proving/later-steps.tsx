'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { NumberField } from '@/components/ui/field';
import { Segmented } from '@/components/ui/segmented';
import { fieldUnit, fieldValue, unreadable } from '@/lib/units/fields';
import { change, pointValue } from '@/lib/units/format';
import { fellWords, gainWords } from '@/lib/wording/proving';
import { BIG } from './big';
import { useProving } from './context';
import { RunButton } from './run-button';
import { Running } from './running';
import { Without } from './without';

/** The load's own sensor, as it was during a run. */
export function CurrentStep() {
  const { act, busy, proof, channel, preferences } = useProving();
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
        <Button
          kind="primary"
          className={BIG}
          busy={busy}
          onClick={() => void act('POST', 'steps', { step: 'current' })}
        >
          Its sensor shows it
        </Button>
      ) : null}
      <RunButton kind="pulse" seconds={60} label="Run again, 60 s" />
    </div>
  );
}

const MINUTES = ['3', '5', '10'] as const;

export function GainStep() {
  const { act, busy, proof, preferences } = useProving();
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
      {words === null ? null : (
        <Button
          kind="primary"
          className={BIG}
          busy={busy}
          onClick={() => void act('POST', 'steps', { step: 'gain' })}
        >
          Write it down
        </Button>
      )}
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

/** The run outlasts a lease, so that it is the lease, or the lost power, that ends it. */
export function UnpluggedStep() {
  const { act, busy, proof, channel } = useProving();
  const run = proof?.runs.find((one) => one.kind === 'unplug');
  const say = (fell: boolean) => act('POST', 'steps', { step: 'unplugged', fell });
  const words = fellWords(run?.fell?.how ?? null, run?.fell?.awayS ?? null);
  return (
    <div className="flex flex-col gap-3">
      {run !== undefined && !run.isOver && words === null ? (
        <>
          <Running run={run} isOrdered={channel.contact === 'NO'} />
          <p className="text-[1.05rem] font-semibold">
            Pull the network of {channel.node} NOW. Watch the load. Put it back after a minute.
          </p>
        </>
      ) : null}
      {run === undefined ? null : (
        <p role="status" className={words === null ? '' : 'font-semibold'}>
          {words ?? `Waiting for ${channel.node} to tell of it. It speaks when its network is back.`}
        </p>
      )}
      {words === null ? null : (
        <Button kind="primary" className={BIG} busy={busy} onClick={() => void say(true)}>
          {channel.contact === 'NO' ? 'The load stopped' : 'The load started'}
        </Button>
      )}
      {run === undefined || run.isOver || words !== null ? (
        <RunButton
          kind="unplug"
          label={run === undefined ? 'Begin: the load runs for 60 s' : 'Begin once more, 60 s'}
        />
      ) : null}
      {run === undefined ? null : (
        <Button className={BIG} busy={busy} onClick={() => void say(false)}>
          It did not fall to its safe state
        </Button>
      )}
    </div>
  );
}

export function FallbackStep() {
  const { act, busy } = useProving();
  const say = (ran: boolean) => act('POST', 'steps', { step: 'fallback', ran });
  return (
    <div className="flex flex-col gap-2">
      <Button kind="primary" className={BIG} busy={busy} onClick={() => void say(true)}>
        It ran by its fallback
      </Button>
      <Button className={BIG} busy={busy} onClick={() => void say(false)}>
        It did not
      </Button>
    </div>
  );
}

const ASKED = [
  ['below', 'It is set to'],
  ['cameOnAt', 'It came on at'],
] as const;

export function LastResortStep() {
  const { act, busy, failure, preferences } = useProving();
  const [typed, setTyped] = useState({ below: '', cameOnAt: '' });
  const [errors, setErrors] = useState<Partial<Record<keyof typeof typed, string>>>({});
  const unit = fieldUnit('temperature', preferences);
  function take() {
    const read = ASKED.map(([name]) => [name, fieldValue(typed[name], 'temperature', preferences)] as const);
    const wrong = read.flatMap(([name, value]) =>
      value === null ? [[name, unreadable('temperature', preferences)] as const] : [],
    );
    setErrors(Object.fromEntries(wrong));
    if (wrong.length === 0) void act('POST', 'steps', { step: 'last-resort', ...Object.fromEntries(read) });
  }
  return (
    <div className="flex flex-col gap-3">
      <div className="grid grid-cols-2 gap-3">
        {ASKED.map(([name, label]) => (
          <NumberField
            key={name}
            label={label}
            {...(unit === undefined ? {} : { unit })}
            value={typed[name]}
            error={errors[name] ?? failure?.fields[name]}
            onChange={(event) => setTyped({ ...typed, [name]: event.target.value })}
          />
        ))}
      </div>
      <Button kind="primary" className={BIG} busy={busy} onClick={take}>
        It came on
      </Button>
      <Without step="last-resort" word="Nobody has seen one come on" />
    </div>
  );
}
