'use client';
import dynamic from 'next/dynamic';
import { createContext, use, useState, type ReactNode } from 'react';
import { Button } from '@/components/ui/button';
import type { Preferences } from '@/lib/units/preferences';
import type { Yard } from './forms/options';
import type { Kind } from './kinds';

/** Forms with their schemas are half of this page's script, and most visits only read. */
const KindSheet = dynamic(() => import('./kind-sheet').then((module) => module.KindSheet));
const RegistersSheet = dynamic(() => import('./registers-sheet').then((module) => module.RegistersSheet));
const TokenSheet = dynamic(() => import('./token-sheet').then((module) => module.TokenSheet));

interface Editing {
  allowed: readonly string[];
  /** @param given what stands in a new form at first, over the usual */
  edit: (kind: Kind, id: string | null, given?: object) => void;
  token: (nodeId: string, doing: 'rotate' | 'revoke') => void;
  registers: (nodeId: string) => void;
}
const nothing = () => undefined;
const Context = createContext<Editing>({ allowed: [], edit: nothing, token: nothing, registers: nothing });

/** What the page's own buttons open; nothing where it is not around them. */
export const useWiringEditing = () => use(Context);

type Open =
  | { what: 'kind'; kind: Kind; id: string | null; given?: object | undefined }
  | { what: 'token'; nodeId: string; doing: 'rotate' | 'revoke' }
  | { what: 'registers'; nodeId: string };

/** Opens the forms of the page; without the right, its buttons are not there. */
export function WiringEditing({
  yard,
  preferences,
  allowed,
  children,
}: {
  yard: Yard;
  preferences: Preferences;
  allowed: readonly string[];
  children: ReactNode;
}) {
  const [open, setOpen] = useState<Open | null>(null);
  const close = () => setOpen(null);
  return (
    <Context
      value={{
        allowed,
        edit: (kind, id, given) => setOpen({ what: 'kind', kind, id, given }),
        token: (nodeId, doing) => setOpen({ what: 'token', nodeId, doing }),
        registers: (nodeId) => setOpen({ what: 'registers', nodeId }),
      }}
    >
      {children}
      {open?.what === 'kind' ? <KindSheet {...{ yard, preferences }} {...open} onClose={close} /> : null}
      {open?.what === 'registers' ? (
        <RegistersSheet yard={yard} preferences={preferences} nodeId={open.nodeId} onClose={close} />
      ) : null}
      {open?.what === 'token' ? (
        <TokenSheet yard={yard} nodeId={open.nodeId} doing={open.doing} onClose={close} />
      ) : null}
    </Context>
  );
}

const needs = (kind: Kind) =>
  kind === 'house' || kind === 'source' || kind === 'loop' ? 'yard.write' : 'wiring.write';

export function AddButton({
  kind,
  label,
  primary = false,
  first,
}: {
  kind: Kind;
  label: string;
  primary?: boolean;
  first?: object;
}) {
  const { allowed, edit } = use(Context);
  if (!allowed.includes(needs(kind))) return null;
  return (
    <Button kind={primary ? 'primary' : 'plain'} onClick={() => edit(kind, null, first)}>
      {label}
    </Button>
  );
}

/** Opens the form of a new thing with what is known of it filled in. `of` is read out only. */
export function OfferButton({
  kind,
  label,
  of,
  given,
}: {
  kind: Kind;
  label: string;
  of: string;
  given: object;
}) {
  const { allowed, edit } = use(Context);
  if (!allowed.includes(needs(kind))) return null;
  return (
    <Button onClick={() => edit(kind, null, given)}>
      <span>
        {label}
        <span className="sr-only">: {of}</span>
      </span>
    </Button>
  );
}

/** `of` names the thing for a screen reader, since a page has many of these buttons. */
export function ChangeButton({ kind, id, of }: { kind: Kind; id: string; of: string }) {
  const { allowed, edit } = use(Context);
  if (!allowed.includes(needs(kind))) return null;
  return (
    <Button kind="quiet" onClick={() => edit(kind, id)}>
      <span>
        Change<span className="sr-only"> {of}</span>…
      </span>
    </Button>
  );
}
