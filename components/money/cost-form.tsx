'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { NumberField, Select, TextField } from '@/components/ui/field';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import { COST_KINDS, type HeapCost, HeapCostCreate } from '@/lib/schema/money';
import { COST_WORDS } from './cost-words';

const EMPTY = { kind: 'materials', on: '', text: '', amount: '', hours: '', rate: '', years: '1' };
type Typed = typeof EMPTY;
const plain = (text: string) => text.trim().replace(',', '.');

function bodyOf(typed: Typed, source: string) {
  const isWork = typed.kind === 'work';
  return HeapCostCreate.safeParse({
    ...{ source, kind: typed.kind, on: typed.on, text: typed.text, years: Number(plain(typed.years) || 'x') },
    amount: isWork ? null : plain(typed.amount),
    work: isWork ? { hours: plain(typed.hours), rate: plain(typed.rate) } : null,
  });
}

const typedOf = (cost: HeapCost): Typed => ({
  ...{ kind: cost.kind, on: cost.on, text: cost.text, years: String(cost.years) },
  ...{
    amount: cost.work === null ? cost.amount : '',
    hours: cost.work?.hours ?? '',
    rate: cost.work?.rate ?? '',
  },
});

/** Enters a cost, or writes one anew. */
export function CostForm({
  house,
  source,
  currency,
  today,
  cost,
  onDone,
}: {
  house: string;
  source: string;
  currency: string;
  today: string;
  cost?: HeapCost;
  onDone?: () => void;
}) {
  const router = useRouter();
  const [typed, setTyped] = useState<Typed>(cost === undefined ? { ...EMPTY, on: today } : typedOf(cost));
  const [errors, setErrors] = useState<Record<string, string>>({});
  const [failure, setFailure] = useState('');
  const [isBusy, setBusy] = useState(false);
  const at = (name: keyof Typed) => ({
    value: typed[name],
    onChange: (event: { target: { value: string } }) => setTyped({ ...typed, [name]: event.target.value }),
  });
  async function save() {
    const body = bodyOf(typed, source);
    setErrors(
      Object.fromEntries((body.error?.issues ?? []).map((one) => [String(one.path.at(-1)), one.message])),
    );
    setFailure(body.success ? '' : 'Not right yet: see what is marked.');
    if (!body.success) return;
    setBusy(true);
    const path = `/houses/${house}/heap-costs`;
    const answer = await (cost === undefined
      ? send('POST', path, body.data)
      : send('PUT', `${path}/${cost.id}`, body.data));
    setBusy(false);
    if (!answer.ok) {
      setErrors(
        Object.fromEntries(
          Object.entries(answer.fields).map(([path, why]) => [path.split('.').at(-1) ?? path, why]),
        ),
      );
      return setFailure(answer.message);
    }
    if (cost === undefined) setTyped({ ...EMPTY, on: typed.on });
    say(cost === undefined ? 'The cost is entered.' : 'The cost is changed.');
    onDone?.();
    router.refresh();
  }
  return (
    <fieldset
      className={
        cost === undefined ? 'mt-3 flex flex-col gap-3 border-t border-line pt-3' : 'flex flex-col gap-3'
      }
    >
      <legend className="sr-only">{cost === undefined ? 'One more cost' : 'This cost'}</legend>
      <div className={`grid items-start gap-3 ${cost === undefined ? 'sm:grid-cols-3' : 'sm:grid-cols-2'}`}>
        <Select label="Cost of" {...at('kind')}>
          {COST_KINDS.map((kind) => (
            <option key={kind} value={kind}>
              {COST_WORDS[kind]}
            </option>
          ))}
        </Select>
        {typed.kind === 'work' ? (
          <>
            <NumberField label="Time" unit="h" error={errors['hours']} {...at('hours')} />
            <NumberField label="An hour costs" unit={currency} error={errors['rate']} {...at('rate')} />
          </>
        ) : (
          <NumberField label="Paid" unit={currency} error={errors['amount']} {...at('amount')} />
        )}
        <TextField label="Day" type="date" error={errors['on']} {...at('on')} />
        <NumberField label="Serves for" unit="years" error={errors['years']} {...at('years')} />
        <TextField label="Note" error={errors['text']} {...at('text')} />
      </div>
      <Button className="self-start" busy={isBusy} onClick={() => void save()}>
        {cost === undefined ? 'Enter this cost' : 'Change this cost'}
      </Button>
      <p role="alert" className="font-semibold text-alarm empty:hidden">
        {failure}
      </p>
    </fieldset>
  );
}
