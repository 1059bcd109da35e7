'use client';
import { useState } from 'react';
import { Age } from '@/components/ui/age';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import type { TailRecord } from '@/lib/live/frames';
import { pointValue } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { useTail, type TailLink } from './use-tail';

const LINKS: Record<TailLink, string> = {
  joining: 'Joining …',
  live: 'Waiting for its next readings.',
  lost: 'The line to the worker is lost; it is joined again.',
  closed: 'This cannot be shown: sign in again.',
};

/** What was taken stands in the reader's units; what was refused as it was sent, since that is what is wrong with it. */
function Line({ record, preferences }: { record: TailRecord; preferences: Preferences }) {
  const { name, value, unit, at, why } = record;
  const isTaken = why === null && unit !== null;
  return (
    <li className="flex flex-wrap items-baseline justify-between gap-x-3 py-1.5">
      <span className="min-w-0 font-mono wrap-anywhere">{name === '' ? 'without a name' : name}</span>
      <span className="font-mono">
        {isTaken ? pointValue(value, unit, preferences) : `${value ?? '–'} ${unit ?? ''}`}
      </span>
      <span className={why === null ? 'w-full text-[0.85rem] text-soft' : 'w-full text-[0.85rem] text-warn'}>
        {why === null ? 'taken' : `refused: ${why}`}
        {at === null ? null : <Age at={Date.parse(at)} before=", measured " />}
      </span>
    </li>
  );
}

function Tail({ houseId, node, preferences }: { houseId: string; node: string; preferences: Preferences }) {
  const { packs, link } = useTail(houseId, node);
  return (
    <div className="flex flex-col gap-3">
      <p role="status" className="text-[0.95rem] text-soft">
        {packs.length > 0 && link === 'live'
          ? 'The newest first; the last ten packs are kept here.'
          : LINKS[link]}
      </p>
      <ol className="flex flex-col gap-3">
        {packs.map(({ id, records }) => (
          <li key={id}>
            <ul className="divide-y divide-line rounded-md border border-line px-3">
              {records.map((record, place) => (
                <Line key={place} record={record} preferences={preferences} />
              ))}
            </ul>
          </li>
        ))}
      </ol>
    </div>
  );
}

/** What a node sends, as it comes; each value in the unit of its point. */
export function NodeTailButton({
  node,
  houseId,
  preferences,
}: {
  node: string;
  houseId: string;
  preferences: Preferences;
}) {
  const [open, setOpen] = useState(false);
  return (
    <>
      <Button kind="quiet" onClick={() => setOpen(true)}>
        <span>
          What comes<span className="sr-only"> from {node}</span>…
        </span>
      </Button>
      <Dialog
        as="sheet"
        open={open}
        onOpenChange={setOpen}
        title={`What ${node} sends`}
        description="Each pack as it comes: values in the unit of their point, and what is refused with its reason."
      >
        {open ? <Tail {...{ houseId, node, preferences }} /> : null}
      </Dialog>
    </>
  );
}
