'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { NumberField, TextField } from '@/components/ui/field';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import { MaterialCreate } from '@/lib/schema/material';
import { numberTyped } from '@/lib/units/typed';

const EMPTY = { name: '', density: '', moisture: '', cn: '', nitrogen: '', from: '' };
type Typed = typeof EMPTY;

/** Typed as people have it, in per cent and C:N; kept as shares. */
function bodyOf(typed: Typed) {
  const number = (text: string) => numberTyped(text) ?? Number.NaN;
  const nitrogen = number(typed.nitrogen) / 100;
  return MaterialCreate.safeParse({
    ...{ name: typed.name, from: typed.from, nitrogen, moisture: number(typed.moisture) / 100 },
    density: typed.density.trim() === '' ? null : number(typed.density),
    carbon: nitrogen * number(typed.cn),
  });
}

export function OwnMaterialForm({ onClose }: { onClose: () => void }) {
  const router = useRouter();
  const [typed, setTyped] = useState<Typed>(EMPTY);
  const [errors, setErrors] = useState<Record<string, string>>({});
  const [failure, setFailure] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);

  async function save() {
    const body = bodyOf(typed);
    setErrors(
      Object.fromEntries(
        (body.error?.issues ?? []).map((issue) => [
          issue.path[0] === 'carbon' ? 'cn' : String(issue.path[0]),
          issue.message,
        ]),
      ),
    );
    if (!body.success) return setFailure('Not right yet: see what is marked.');
    setBusy(true);
    const answer = await send('POST', '/materials', body.data);
    setBusy(false);
    if (!answer.ok) {
      setErrors(answer.fields);
      return setFailure(answer.message);
    }
    router.refresh();
    say(`${typed.name} is among your materials.`);
    onClose();
  }

  const field = (name: keyof Typed, label: string, more: { unit?: string; hint?: string } = {}) => (
    <NumberField
      label={label}
      {...more}
      value={typed[name]}
      error={errors[name]}
      onChange={(event) => setTyped({ ...typed, [name]: event.target.value })}
    />
  );
  return (
    <fieldset className="flex flex-col gap-3 rounded-lg border border-line p-3">
      <legend className="px-1 font-semibold">A material of your own</legend>
      <TextField
        label="Name, as it stands in the book"
        value={typed.name}
        error={errors['name']}
        onChange={(event) => setTyped({ ...typed, name: event.target.value })}
      />
      <div className="grid grid-cols-2 items-start gap-3">
        {field('moisture', 'Water', { unit: '%', hint: 'Weigh, dry, weigh again.' })}
        {field('density', 'Loose density', { unit: 'kg/m³', hint: 'A full 10 L bucket × 100.' })}
        {field('nitrogen', 'Nitrogen, dry', { unit: '%' })}
        {field('cn', 'C:N', { unit: ': 1' })}
      </div>
      <TextField
        label="Where the figures come from"
        value={typed.from}
        error={errors['from']}
        onChange={(event) => setTyped({ ...typed, from: event.target.value })}
      />
      <div className="flex flex-wrap gap-2">
        <Button kind="primary" busy={isBusy} onClick={() => void save()}>
          Keep it
        </Button>
        <Button onClick={onClose}>Leave as it is</Button>
        <p role="alert" className="w-full font-semibold text-alarm empty:hidden">
          {failure}
        </p>
      </div>
    </fieldset>
  );
}
