'use client';
import dynamic from 'next/dynamic';
import { useState } from 'react';
import type { Photograph } from '@/lib/schema/heap-view';

const PhotographDialog = dynamic(() =>
  import('./photograph-dialog').then((module) => module.PhotographDialog),
);

/** Small pictures beside the entry; pressed, one opens whole. */
export function Photographs({
  house,
  photographs,
  mayWrite,
  of,
}: {
  house: string;
  photographs: Photograph[];
  mayWrite: boolean;
  /** Day of the entry, for who hears the page. */
  of: string;
}) {
  const [open, setOpen] = useState<number | null>(null);
  const shown = open === null ? undefined : photographs[open];
  if (photographs.length === 0) return null;
  return (
    <>
      <ul className="flex flex-wrap gap-2 py-1.5">
        {photographs.map((one, place) => {
          const label = `Photograph ${place + 1} of ${photographs.length}, ${of}`;
          return (
            <li key={one.id}>
              <button
                type="button"
                aria-haspopup="dialog"
                onClick={() => setOpen(place)}
                className="block rounded-md border border-line bg-faint hover:border-edge"
              >
                {/* the guard serves it to this holding only: Next's own image route would fetch it without the session */}
                <img
                  src={`/api/v1/houses/${house}/photographs/${one.id}?size=thumbnail`}
                  alt={label}
                  loading="lazy"
                  width={88}
                  height={88}
                  className="size-22 rounded-md object-cover"
                />
              </button>
            </li>
          );
        })}
      </ul>
      {shown === undefined ? null : (
        <PhotographDialog
          house={house}
          photograph={shown}
          label={`Photograph, ${of}`}
          mayWrite={mayWrite}
          onClose={() => setOpen(null)}
        />
      )}
    </>
  );
}
