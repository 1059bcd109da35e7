'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { TextField } from '@/components/ui/field';
import { Figures } from '@/components/ui/panel';
import type { ArchiveFound } from '@/lib/schema/archive';
import { count } from '@/lib/units/format';
import { moment } from '@/lib/units/time';
import { archiveHolds, AS_IT_COMES_IN, monthSpan } from '@/lib/wording/archive';
import type { FilesScene } from './files-data';

/** What is inside an archive, and what becomes of it, before anything of it is put in. */
export function ArchiveFoundPart({
  found,
  scene,
  now,
  onBring,
  onDrop,
}: {
  found: ArchiveFound;
  scene: FilesScene;
  now: number;
  /** @returns in words why not; null where it is under way */
  onBring: (name: string) => Promise<string | null>;
  onDrop: () => Promise<void>;
}) {
  const { house, preferences } = scene;
  const [name, setName] = useState(`${found.holding}, from its archive`.slice(0, 120));
  const [error, setError] = useState<string | undefined>();
  const [isBusy, setBusy] = useState(false);
  async function bring() {
    setBusy(true);
    const why = await onBring(name);
    setBusy(false);
    setError(why ?? undefined);
  }
  return (
    <div className="flex flex-col gap-4">
      <p className="max-w-prose font-serif text-[1.15rem]">
        This is {found.holding} as it stood {moment(Date.parse(found.madeAt), now, house.zone, preferences)}.
        Every row was read and every file is whole.
      </p>
      <div className="grid gap-x-8 gap-y-4 lg:grid-cols-2">
        <Figures
          rows={[
            { name: 'Houses', value: <span className="font-sans">{found.houses.join(', ') || 'none'}</span> },
            {
              name: 'Readings',
              value: count(found.readings, 'reading'),
              ...(found.months === null ? {} : { note: monthSpan(found.months) }),
            },
            { name: 'Photographs', value: String(found.photographs) },
            {
              name: 'Also',
              value: <span className="font-sans">{archiveHolds(found.rows).join(', ')}</span>,
            },
            {
              name: 'People it lists',
              value: (
                <span className="font-sans break-words">
                  {found.people.map((person) => `${person.email} (${person.role})`).join(', ') || 'none'}
                </span>
              ),
            },
          ]}
        />
        <ul className="flex list-disc flex-col gap-1 pl-5 text-[0.95rem] text-soft">
          {AS_IT_COMES_IN.map((line) => (
            <li key={line}>{line}</li>
          ))}
        </ul>
      </div>
      <TextField
        label="Name of the new holding"
        value={name}
        error={error}
        className="max-w-xl"
        onChange={(event) => setName(event.target.value)}
      />
      <div className="flex flex-wrap gap-2">
        <Button kind="primary" busy={isBusy} onClick={() => void bring()}>
          Bring it in as a new holding
        </Button>
        <Button onClick={() => void onDrop()}>Drop it</Button>
      </div>
    </div>
  );
}
