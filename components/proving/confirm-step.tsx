'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Checkbox } from '@/components/ui/check';
import { BIG } from './big';
import { useProving } from './context';

const ASKED = {
  dead: {
    parts: [
      ['testerBefore', 'The tester shows a known live source'],
      ['circuitDead', 'This circuit is dead: every pole, to earth and to each other'],
      ['testerAfter', 'The tester shows the live source again'],
    ],
    press: 'The circuit is dead',
  },
  clear: {
    parts: [
      ['peopleClear', 'I see the load, and nobody is at it'],
      ['isolatorOn', 'Covers are on, the isolator is on'],
    ],
    press: 'Clear to run',
  },
} as const;

/** Things that a person looked at, one by one; each must be so. */
export function ConfirmStep({ step }: { step: keyof typeof ASKED }) {
  const { act, busy, failure } = useProving();
  const [ticked, setTicked] = useState<readonly string[]>([]);
  const { parts, press } = ASKED[step];
  const take = () =>
    act('POST', 'steps', {
      step,
      ...Object.fromEntries(parts.map(([name]) => [name, ticked.includes(name)])),
    });
  return (
    <div className="flex flex-col gap-2">
      {parts.map(([name, label]) => (
        <Checkbox
          key={name}
          label={label}
          checked={ticked.includes(name)}
          error={failure?.fields[name]}
          onChange={(event) =>
            setTicked(event.target.checked ? [...ticked, name] : ticked.filter((one) => one !== name))
          }
        />
      ))}
      <Button kind="primary" className={BIG} busy={busy} onClick={() => void take()}>
        {press}
      </Button>
    </div>
  );
}
