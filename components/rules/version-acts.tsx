'use client';
import dynamic from 'next/dynamic';
import { createContext, use, useState } from 'react';
import { Button } from '@/components/ui/button';
import { useFacts } from './context';
import type { RuleWithVersions } from '@/lib/schema/rule-view';

const CompareDialog = dynamic(() => import('./compare-dialog').then((module) => module.CompareDialog));

/** What the buttons in the list of versions reach: the list itself is the server's. */
export interface VersionActs {
  rule: RuleWithVersions;
  /** Number of the version that is being brought back. */
  busy: number | null;
  failure: string | null;
  goBack: (number: number) => void;
}
const Acts = createContext<VersionActs | null>(null);
export const VersionActsProvider = Acts.Provider;

function useVersionActs(): VersionActs {
  const acts = use(Acts);
  if (acts === null) throw new Error('a button of the versions stands outside the editor');
  return acts;
}

export function GoBack({ number }: { number: number }) {
  const { rule, busy, goBack } = useVersionActs();
  return (
    <Button kind="quiet" className="-ml-4" busy={busy === number} onClick={() => goBack(number)}>
      {rule.retiredAt === null ? `Go back to version ${number}` : `Bring version ${number} back as the draft`}
    </Button>
  );
}

export function GoBackFailure() {
  return (
    <p role="alert" className="font-semibold text-alarm empty:hidden">
      {useVersionActs().failure}
    </p>
  );
}

export function Compare() {
  const { rule } = useVersionActs();
  const { names, preferences } = useFacts();
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button kind="quiet" className="-my-1" onClick={() => setOpen(true)}>
        Compare two…
      </Button>
      {isOpen ? (
        <CompareDialog versions={rule.versions} {...{ names, preferences }} onClose={() => setOpen(false)} />
      ) : null}
    </>
  );
}
