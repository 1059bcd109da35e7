'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Select } from '@/components/ui/field';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import { FAULT_ABOUT, FAULT_KINDS, type FaultKind, type TrainingFault } from '@/lib/schema/training';
import { FAULT_WORDS } from '@/lib/wording/training';

const MINUTES = [5, 10, 30, 60, 120];

/** Ends a fault at once. */
export function EndFault({ house, fault }: { house: string; fault: TrainingFault }) {
  const router = useRouter();
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string>();
  async function end() {
    setBusy(true);
    const { until: _until, ...about } = fault;
    const told = Object.fromEntries(Object.entries(about).filter(([, value]) => value !== null));
    const answer = await send('POST', `/houses/${house}/training`, { ...told, on: false });
    setBusy(false);
    if (!answer.ok) return setFailure(answer.message);
    say('The fault is ended.');
    router.refresh();
  }
  return (
    <div>
      <Button busy={busy} onClick={() => void end()}>
        <span>
          End it<span className="sr-only">: {FAULT_WORDS[fault.fault]?.name}</span>
        </span>
      </Button>
      <p role="alert" className="font-semibold text-alarm empty:hidden">
        {failure}
      </p>
    </div>
  );
}

/** Which fault, about what, for how long. */
export function StartFault({
  house,
  points,
  channels,
}: {
  house: string;
  points: string[];
  channels: number[];
}) {
  const router = useRouter();
  const [fault, setFault] = useState<FaultKind>('dead-sensor');
  const [chosen, setChosen] = useState({ point: '', other: '', channel: '', minutes: '30' });
  const [busy, setBusy] = useState(false);
  const [errors, setErrors] = useState<Record<string, string>>({});
  const about = FAULT_ABOUT[fault];
  const isProbe = about === 'point' || about === 'two-points';
  const choose = (name: keyof typeof chosen) => (event: { target: { value: string } }) => {
    setChosen({ ...chosen, [name]: event.target.value });
    setErrors({});
  };

  async function start() {
    setBusy(true);
    const answer = await send('POST', `/houses/${house}/training`, {
      ...{ fault, on: true, seconds: Number(chosen.minutes) * 60 },
      ...(isProbe && chosen.point !== '' ? { point: chosen.point } : {}),
      ...(about === 'two-points' && chosen.other !== '' ? { other: chosen.other } : {}),
      ...(about === 'channel' && chosen.channel !== '' ? { channel: Number(chosen.channel) } : {}),
    });
    setBusy(false);
    if (!answer.ok) {
      const isAtField = Object.keys(answer.fields).length > 0;
      return setErrors(isAtField ? answer.fields : { '': answer.message });
    }
    setErrors({});
    say(`${FAULT_WORDS[fault]?.name ?? 'The fault'} is switched on.`);
    router.refresh();
  }

  const pick = (name: 'point' | 'other' | 'channel', label: string, options: (string | number)[]) => (
    <Select label={label} value={chosen[name]} error={errors[name]} onChange={choose(name)}>
      <option value="">Choose one</option>
      {options.map((one) => (
        <option key={one}>{one}</option>
      ))}
    </Select>
  );
  return (
    <div className="flex flex-col gap-3">
      <div className="grid grid-cols-1 items-end gap-3 sm:grid-cols-2 lg:grid-cols-4">
        <Select
          label="Fault"
          value={fault}
          onChange={({ target }) => {
            setFault(FAULT_KINDS.find((one) => one === target.value) ?? fault);
            setErrors({});
          }}
        >
          {FAULT_KINDS.map((one) => (
            <option key={one} value={one}>
              {FAULT_WORDS[one]?.name}
            </option>
          ))}
        </Select>
        {isProbe ? pick('point', 'Point', points) : null}
        {about === 'two-points' ? pick('other', 'and point', points) : null}
        {about === 'channel' ? pick('channel', 'Channel', channels) : null}
        <Select label="For" value={chosen.minutes} error={errors.seconds} onChange={choose('minutes')}>
          {MINUTES.map((one) => (
            <option key={one} value={one}>
              {one} min
            </option>
          ))}
        </Select>
      </div>
      <p className="text-[0.9rem] text-soft">{FAULT_WORDS[fault]?.what}</p>
      <div className="flex flex-wrap items-center gap-3">
        <Button busy={busy} onClick={() => void start()}>
          Switch the fault on
        </Button>
        <p role="alert" className="font-semibold text-alarm empty:hidden">
          {errors['']}
        </p>
      </div>
    </div>
  );
}
