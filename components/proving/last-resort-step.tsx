'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { NumberField } from '@/components/ui/field';
import { fieldUnit, fieldValue, unreadable } from '@/lib/units/fields';
import { BIG } from './big';
import { useProving } from './context';
import { Without } from './without';

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
