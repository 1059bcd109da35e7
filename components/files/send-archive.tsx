'use client';
import { useRouter } from 'next/navigation';
import { send } from '@/components/ui/send';
import { type Archive, LARGEST_ARCHIVE } from '@/lib/schema/archive';
import { SendInPieces } from './send-in-pieces';

/** An archive that is to come in. */
export function SendArchive({
  files,
  unfinished,
  onDrop,
}: {
  /** The page of files. */
  files: string;
  unfinished: Archive | null;
  onDrop: (one: Archive) => Promise<void>;
}) {
  const router = useRouter();
  return (
    <div className="flex flex-col items-start gap-3">
      <h3 className="font-semibold">Bring one in</h3>
      <p className="max-w-prose text-soft">
        It becomes a new holding beside this one, with you as its owner; nothing here is changed. You see what
        is inside before anything is put in. Its houses come in laid up: no relay moves until you put each in
        service.
      </p>
      <SendInPieces
        field={{
          label: 'Archive',
          hint: 'A zip that was made on a page like this. Up to 4 GiB.',
          accept: '.zip,application/zip',
        }}
        most={{ bytes: LARGEST_ARCHIVE, words: 'at most 4 GiB come in.' }}
        unfinished={unfinished}
        begin={(file) => send<Archive>('POST', '/archives/in', file)}
        pathOf={(one) => `/archives/${one.id}`}
        onDrop={onDrop}
        onSent={(one) => {
          router.push(`${files}?archive=${one.id}`);
          router.refresh();
        }}
      />
    </div>
  );
}
