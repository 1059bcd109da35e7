import type { UseFormReturn } from 'react-hook-form';
import { Notice } from '@/components/ui/notice';
import { Phrases } from '@/components/ui/sentence';
import type { Preferences } from '@/lib/units/preferences';
import { contactFit, isMains } from '@/lib/wording/wiring-load';
import { MAINS_CAUTION, REVERSING_CAUTION } from '@/lib/wording/wiring-parts';
import type { Yard } from './forms/options';
import { reversingVentGroups } from './forms/reversing-vent';
import { at, bodyOf } from './spec';

/** What two relays on one motor come to: where it stands without a command, what each contact carries, the cautions. */
export function ReversingEffect({
  form,
  preferences,
  yard,
}: {
  form: UseFormReturn;
  preferences: Preferences;
  yard: Yard;
}) {
  const { body } = bodyOf(reversingVentGroups(yard), form.watch(), preferences);
  const number = (path: string) => {
    const value = at(body, path);
    return typeof value === 'number' ? value : undefined;
  };
  const supply = at(body, 'load.supply');
  const load = {
    kind: 'vent',
    watts: number('load.watts'),
    volts: number('load.volts'),
    contactAmps: number('load.contactAmps'),
    supply: supply === 'ac' || supply === 'dc' ? supply : undefined,
  } as const;
  const fit = contactFit(load);
  return (
    <>
      <p aria-live="polite" className="rounded-lg border border-line bg-paper p-3 text-[0.95rem]">
        When nothing commands it: both relays are off, and the vent stays where it stands.{' '}
        {fit === null ? null : (
          <>
            Each contact: <Phrases phrases={fit.words} />.
          </>
        )}
      </p>
      <Notice tone="warn" title="One motor, two relays">
        {REVERSING_CAUTION}
      </Notice>
      {isMains(load) ? (
        <Notice tone="warn" title="Mains in a damp house">
          {MAINS_CAUTION}
        </Notice>
      ) : null}
    </>
  );
}
