'use client';
import { useRouter } from 'next/navigation';
import { useRef, useState } from 'react';
import { Button } from '@/components/ui/button';
import { control, Field } from '@/components/ui/field';
import { send } from '@/components/ui/send';
import { type Archive, LARGEST_ARCHIVE } from '@/lib/schema/archive';
import { megabytes } from './files-data';
import { Meter } from './meter';
import { sendPieces } from './send-pieces';

/** Chooses an archive and sends it, a piece at a time; one whose sending broke off goes on where it was. */
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
  const [sent, setSent] = useState<number | null>(null);
  const [failure, setFailure] = useState<string | undefined>();
  const stopped = useRef<AbortController | null>(null);

  async function start(file: File) {
    setFailure(undefined);
    if (file.size === 0) return setFailure('This file is empty.');
    if (file.size > LARGEST_ARCHIVE)
      return setFailure(`This file has ${megabytes(file.size)}; at most 4 GiB come in.`);
    let one = unfinished;
    if (one !== null && (one.bytes !== file.size || one.name !== file.name))
      return setFailure(`To go on, choose ${one.name} of ${megabytes(one.bytes)} again, or drop it.`);
    if (one === null) {
      const made = await send<Archive>('POST', '/archives/in', { name: file.name, bytes: file.size });
      if (!made.ok) return setFailure(made.message);
      one = made.value;
    }
    const begun = one;
    stopped.current = new AbortController();
    setSent(begun.received / file.size);
    const path = `/archives/${begun.id}`;
    const why = await sendPieces(path, file, begun.received, stopped.current.signal, setSent);
    setSent(null);
    if (why !== null && stopped.current.signal.aborted) await onDrop(begun);
    else if (why !== null) setFailure(why);
    else router.push(`${files}?archive=${begun.id}`);
    router.refresh();
  }

  return (
    <div className="flex flex-col items-start gap-3">
      <h3 className="font-semibold">Bring one in</h3>
      <p className="max-w-prose text-soft">
        It becomes a new holding beside this one, with you as its owner; nothing here is changed. You see what
        is inside before anything is put in. Its houses come in laid up: no relay moves until you put each in
        service.
      </p>
      {sent === null ? (
        <Field
          label="Archive"
          hint="A zip that was made on a page like this. Up to 4 GiB."
          error={failure}
          className="w-full max-w-xl"
        >
          {(links) => (
            <input
              {...links}
              type="file"
              accept=".zip,application/zip"
              className={control}
              onChange={(event) => {
                const [file] = event.target.files ?? [];
                if (file !== undefined) void start(file);
              }}
            />
          )}
        </Field>
      ) : (
        <div className="w-full">
          <Meter label="Sent" part={sent} />
          <Button className="mt-3" onClick={() => stopped.current?.abort()}>
            Cancel
          </Button>
        </div>
      )}
      {unfinished === null || sent !== null ? null : (
        <Button onClick={() => void onDrop(unfinished)}>Drop {unfinished.name}</Button>
      )}
    </div>
  );
}
