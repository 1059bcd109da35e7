'use client';
import { Button } from '@/components/ui/button';
import type { ProofPicture } from '@/lib/schema/proof';
import { useProving } from './context';

const WORDS = { plate: 'Rating plate', wiring: 'Wiring' };

/** Small pictures; each opens whole. */
export function Pictures({ pictures, mayRemove = false }: { pictures: ProofPicture[]; mayRemove?: boolean }) {
  const { house, removePicture } = useProving();
  if (pictures.length === 0) return null;
  return (
    <ul className="flex flex-wrap gap-3">
      {pictures.map((one, place) => {
        const name = `${WORDS[one.shows]}, photograph ${place + 1}`;
        const address = `/api/v1/houses/${house.slug}/proof-photographs/${one.id}`;
        return (
          <li key={one.id} className="flex flex-col items-start">
            <a
              href={address}
              target="_blank"
              rel="noreferrer"
              className="block rounded-md border border-line"
            >
              {/* the guard serves it to this holding only: Next's own image route would fetch it without the session */}
              <img
                src={`${address}?size=thumbnail`}
                alt={name}
                width={88}
                height={88}
                className="size-22 rounded-md object-cover"
              />
            </a>
            {mayRemove ? (
              <Button kind="quiet" onClick={() => void removePicture(one.id)}>
                <span>
                  Take out<span className="sr-only"> {name}</span>
                </span>
              </Button>
            ) : null}
          </li>
        );
      })}
    </ul>
  );
}
