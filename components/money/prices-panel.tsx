'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { TextField } from '@/components/ui/field';
import { Panel } from '@/components/ui/panel';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import type { MoneyBook } from '@/lib/schema/money';
import { FuelFields } from './fuel-fields';
import { bodyOfPrices, draftOf } from './prices-draft';
import { TariffFields } from './tariff-fields';

/** Prices of the holding: all see them, who may writes them. */
export function PricesPanel({
  book,
  today,
  mayWrite,
}: {
  book: MoneyBook;
  today: string;
  mayWrite: boolean;
}) {
  const router = useRouter();
  const [draft, setDraft] = useState(() => draftOf(book));
  const [errors, setErrors] = useState<Record<string, string>>({});
  const [failure, setFailure] = useState('');
  const [isBusy, setBusy] = useState(false);
  async function save() {
    const told = bodyOfPrices(draft, book.revision);
    setErrors(told.ok ? {} : told.fields);
    setFailure(told.ok ? '' : 'Not right yet: see what is marked.');
    if (!told.ok) return;
    setBusy(true);
    const answer = await send('PUT', '/money', told.body);
    setBusy(false);
    if (!answer.ok) return setFailure(answer.message);
    say('The prices are kept.');
    router.refresh();
  }
  const currency = draft.currency.trim().toUpperCase();
  return (
    <Panel title="Prices" note="for all houses of the holding">
      <fieldset disabled={!mayWrite} className="flex min-w-0 flex-col gap-4">
        <legend className="sr-only">Prices</legend>
        <TextField
          label="Currency"
          hint="Three letters, such as EUR, GBP or USD."
          maxLength={3}
          value={draft.currency}
          error={errors['currency']}
          onChange={(event) => setDraft({ ...draft, currency: event.target.value })}
        />
        <TariffFields
          {...{ currency, today, errors }}
          tariffs={draft.tariffs}
          onChange={(tariffs) => setDraft({ ...draft, tariffs })}
        />
        <FuelFields
          {...{ currency, errors }}
          fuels={draft.fuels}
          onChange={(fuels) => setDraft({ ...draft, fuels })}
        />
      </fieldset>
      {mayWrite ? (
        <Button kind="primary" className="mt-4" busy={isBusy} onClick={() => void save()}>
          Keep the prices
        </Button>
      ) : (
        <p className="pt-2 text-soft">An owner of the holding can change them.</p>
      )}
      <p role="alert" className="pt-2 font-semibold text-alarm empty:hidden">
        {failure}
      </p>
    </Panel>
  );
}
