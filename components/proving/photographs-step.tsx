'use client';
import { buttonLook } from '@/components/ui/button-look';
import type { ProofPicture } from '@/lib/schema/proof';
import { BIG } from './big';
import { useProving } from './context';
import { DoneButton } from './done-button';
import { Pictures } from './pictures';
import { Without } from './without';

const SHOWN = [
  ['plate', 'rating plate'],
  ['wiring', 'wiring'],
] as const;

/** The phone's own camera opens. Plate and wiring are told apart, since the sheet asks for both. */
export function PhotographsStep() {
  const { proof } = useProving();
  const pictures = proof?.pictures ?? [];
  return (
    <div className="flex flex-col gap-3">
      {SHOWN.map(([shows, label]) => (
        <Shown
          key={shows}
          shows={shows}
          label={label}
          pictures={pictures.filter((one) => one.shows === shows)}
        />
      ))}
      <DoneButton step="photographs">Both are photographed</DoneButton>
      <Without step="photographs" word="No photograph" />
    </div>
  );
}

function Shown({
  shows,
  label,
  pictures,
}: {
  shows: ProofPicture['shows'];
  label: string;
  pictures: ProofPicture[];
}) {
  const { addPicture, busy } = useProving();
  return (
    <div className="flex flex-col gap-2">
      <label className={buttonLook('plain', `${BIG} cursor-pointer focus-within:outline-2`)}>
        Photograph the {label}
        <input
          type="file"
          accept="image/jpeg,image/png,image/webp"
          capture="environment"
          disabled={busy}
          className="sr-only"
          onChange={(event) => {
            const [file] = event.target.files ?? [];
            if (file !== undefined) void addPicture(shows, file);
            event.target.value = '';
          }}
        />
      </label>
      <Pictures pictures={pictures} mayRemove />
    </div>
  );
}
