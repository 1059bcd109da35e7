'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Field, Select, control } from '@/components/ui/field';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import { useAwake } from '@/components/ui/use-awake';
import type { PointPhotograph } from '@/lib/schema/point-photograph';
import { sendPicture } from './send-picture';

const SHOWS = { place: 'where the probe hangs', shield: 'its shield against the sun' } as const;

/** Pictures of a point's place and shield. What a phone writes into them, place and camera, is taken out on arrival. */
export function PointPhotographs({
  house,
  point,
  name,
  photographs,
  mayWrite,
}: {
  house: string;
  point: string;
  name: string;
  photographs: PointPhotograph[];
  mayWrite: boolean;
}) {
  const router = useRouter();
  const isAwake = useAwake();
  const [shows, setShows] = useState<keyof typeof SHOWS>('place');
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string>();
  const path = `/houses/${house}/points/${point}/photographs`;

  async function add(file: File) {
    setBusy(true);
    const failed = await sendPicture(`${path}?shows=${shows}`, file);
    setBusy(false);
    setFailure(failed ?? undefined);
    if (failed !== null) return;
    say('The photograph is kept.');
    router.refresh();
  }
  async function remove(id: string) {
    const answer = await send('DELETE', `${path}/${id}`);
    setFailure(answer.ok ? undefined : answer.message);
    if (answer.ok) router.refresh();
  }

  return (
    <div className="flex flex-col gap-3">
      {photographs.length === 0 ? (
        <p className="text-soft">
          None yet. A picture shows in a year’s time what was moved, and whether the sun reaches it.
        </p>
      ) : (
        <ul className="flex flex-wrap gap-3">
          {photographs.map((one) => (
            <li key={one.id} className="flex flex-col gap-1">
              {/* the guard serves it to this holding only: Next's own image route would fetch it without the session */}
              <a href={`/api/v1/houses/${house}/photographs/${one.id}`}>
                <img
                  src={`/api/v1/houses/${house}/photographs/${one.id}?size=thumbnail`}
                  alt={`${name}: ${SHOWS[one.shows]}`}
                  loading="lazy"
                  className="size-32 rounded-md border border-line object-cover"
                />
              </a>
              <span className="text-[0.9rem] text-soft">{SHOWS[one.shows]}</span>
              {mayWrite ? (
                <Button kind="quiet" onClick={() => void remove(one.id)}>
                  <span>
                    Take away<span className="sr-only"> the picture of {SHOWS[one.shows]}</span>
                  </span>
                </Button>
              ) : null}
            </li>
          ))}
        </ul>
      )}
      {mayWrite ? (
        <fieldset disabled={!isAwake || busy} className="grid gap-3 sm:grid-cols-2">
          <Select
            label="The picture shows"
            value={shows}
            onChange={(event) => setShows(event.target.value === 'shield' ? 'shield' : 'place')}
          >
            {Object.entries(SHOWS).map(([value, words]) => (
              <option key={value} value={value}>
                {words}
              </option>
            ))}
          </Select>
          <Field label="Picture" hint="JPEG, PNG or WebP, 10 MB at most." error={failure}>
            {(links) => (
              <input
                type="file"
                accept="image/jpeg,image/png,image/webp"
                className={control}
                onChange={(event) => {
                  const file = event.target.files?.[0];
                  event.target.value = '';
                  if (file !== undefined) void add(file);
                }}
                {...links}
              />
            )}
          </Field>
        </fieldset>
      ) : null}
    </div>
  );
}
