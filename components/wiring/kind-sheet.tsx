'use client';
import { useState } from 'react';
import type { UseFormReturn } from 'react-hook-form';
import { Notice } from '@/components/ui/notice';
import { Phrases } from '@/components/ui/sentence';
import type { Preferences } from '@/lib/units/preferences';
import { contactFit, isMains, safeStateWords } from '@/lib/wording/wiring-load';
import { LOOP_CAUTION, MAINS_CAUTION } from '@/lib/wording/wiring-parts';
import type { Channel } from '@/lib/schema/yard-view';
import { EntitySheet } from './entity-sheet';
import type { Yard } from './forms/options';
import { InterlockEffect } from './interlock-effect';
import { KINDS, type Kind } from './kinds';
import { PlaceRemarks } from './place-remarks';
import { ReversingEffect } from './reversing-effect';
import { at, bodyOf } from './spec';
import { TokenShown } from './token-shown';
import { Unproves } from './unproves';

/** The effect of what is being typed into a channel's form: its safe state, its contact, and the caution that goes with mains. */
function LoadEffect({
  form,
  preferences,
  yard,
  before,
}: {
  form: UseFormReturn;
  preferences: Preferences;
  yard: Yard;
  /** The channel that is changed; undefined of a new one. */
  before: Channel | undefined;
}) {
  const { body } = bodyOf(KINDS.channel.groups(yard, null), form.watch(), preferences);
  const number = (path: string) => {
    const value = at(body, path);
    return typeof value === 'number' ? value : undefined;
  };
  const supply = at(body, 'load.supply');
  const said = at(body, 'load.kind');
  const kind = typeof said === 'string' ? said : 'other';
  const load = {
    kind,
    watts: number('load.watts'),
    volts: number('load.volts'),
    contactAmps: number('load.contactAmps'),
    supply: supply === 'ac' || supply === 'dc' ? supply : undefined,
  } as const;
  const fit = contactFit(load);
  const contact = at(body, 'contact') === 'NC' ? 'NC' : 'NO';
  return (
    <>
      <p aria-live="polite" className="rounded-lg border border-line bg-paper p-3 text-[0.95rem]">
        When nothing commands it: {safeStateWords(contact, kind).toLowerCase()}.{' '}
        {fit === null ? null : (
          <>
            Its contact: <Phrases phrases={fit.words} />.
          </>
        )}
      </p>
      {before === undefined ? null : <Unproves before={before} body={body} />}
      {isMains(load) ? (
        <Notice tone="warn" title="Mains in a damp house">
          {MAINS_CAUTION}
        </Notice>
      ) : null}
    </>
  );
}

/** Adds or changes one thing of the yard. A new node's token takes the form's place until it is put away. */
export function KindSheet({
  yard,
  preferences,
  kind,
  id,
  given = {},
  onClose,
}: {
  yard: Yard;
  preferences: Preferences;
  kind: Kind;
  id: string | null;
  /** What stands in a new form at first, over the usual. */
  given?: object | undefined;
  onClose: () => void;
}) {
  const [token, setToken] = useState<{ nodeKey: string; kind: string; token: string } | null>(null);
  const of = KINDS[kind];
  // what the form began with; the page behind it may be read anew meanwhile
  const [entity] = useState(() => of.list(yard).find((one) => one.id === id) ?? null);
  if (token !== null) return <TokenShown {...token} onClose={onClose} />;
  const collection = `/houses/${yard.house.slug}/${kind}s`;
  const path =
    entity === null
      ? collection
      : kind === 'house'
        ? `/houses/${yard.house.slug}`
        : `${collection}/${entity.id}`;
  return (
    <EntitySheet
      title={entity === null ? `New ${of.word}` : `Change this ${of.word}`}
      groups={of.groups(yard, entity?.id ?? null)}
      schema={() => Promise.resolve(entity === null ? of.create : of.amend)}
      entity={entity ?? { ...of.first(yard), ...given }}
      preferences={preferences}
      method={entity === null ? 'POST' : 'PATCH'}
      path={path}
      etag={entity === null ? undefined : `"${entity.revision}"`}
      save={entity === null ? `Add the ${of.word}` : 'Save'}
      done={entity === null ? `The ${of.word} is added.` : 'Saved.'}
      removal={entity === null || of.removal === null ? null : { word: of.word, what: of.removal }}
      onClose={onClose}
      onAnswer={(answer) => {
        const given = at(answer, 'token');
        // a board has no use for a token: it is gone to
        if (kind !== 'node' || typeof given !== 'string' || at(answer, 'kind') === 'modbus') return false;
        setToken({ nodeKey: String(at(answer, 'key')), kind: String(at(answer, 'kind')), token: given });
        return true;
      }}
      beside={(form) =>
        kind === 'house' ? (
          <PlaceRemarks form={form} preferences={preferences} />
        ) : kind === 'channel' ? (
          <LoadEffect
            form={form}
            preferences={preferences}
            yard={yard}
            before={yard.channels.find((one) => one.id === id)}
          />
        ) : kind === 'reversing-vent' ? (
          <ReversingEffect {...{ form, yard, preferences }} />
        ) : kind === 'interlock' ? (
          <InterlockEffect id={entity?.id ?? null} {...{ form, yard, preferences }} />
        ) : kind === 'loop' ? (
          <Notice tone="warn" title="Air of a heap">
            {LOOP_CAUTION}
          </Notice>
        ) : null
      }
    />
  );
}
