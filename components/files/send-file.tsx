'use client';
import { useRouter } from 'next/navigation';
import { useRef, useState } from 'react';
import { Button } from '@/components/ui/button';
import { Field, control } from '@/components/ui/field';
import { send } from '@/components/ui/send';
import { type Import, LARGEST_FILE } from '@/lib/schema/import';
import { megabytes } from './files-data';
import { Meter } from './meter';
import { sendPieces } from './send-pieces';

/** Chooses a file and sends it, a piece at a time; a file whose sending broke off goes on where it was. */
export function SendFile({ house, unfinished }: { house: string; unfinished: Import | null }) {
  const router = useRouter();
  const [sent, setSent] = useState<{ part: number } | null>(null);
  const [failure, setFailure] = useState<string | undefined>();
  const stopped = useRef<AbortController | null>(null);

  async function start(file: File) {
    setFailure(undefined);
    if (file.size === 0) return setFailure('This file is empty.');
    if (file.size > LARGEST_FILE)
      return setFailure(
        `This file has ${megabytes(file.size)}; at most 200 MiB come in at once. Split it by seasons.`,
      );
    let one = unfinished;
    if (one !== null && (one.bytes !== file.size || one.name !== file.name))
      return setFailure(`To go on, choose ${one.name} of ${megabytes(one.bytes)} again, or drop it.`);
    if (one === null) {
      const made = await send<Import>('POST', `/houses/${house}/imports`, {
        name: file.name,
        bytes: file.size,
      });
      if (!made.ok) return setFailure(made.message);
      one = made.value;
    }
    stopped.current = new AbortController();
    setSent({ part: one.received / file.size });
    const path = `/houses/${house}/imports/${one.id}`;
    const why = await sendPieces(path, file, one.received, stopped.current.signal, (part) =>
      setSent({ part }),
    );
    setSent(null);
    if (why !== null && stopped.current.signal.aborted) await send('DELETE', path);
    else if (why !== null) setFailure(why);
    else router.push(`/${house}/files?import=${one.id}`);
    router.refresh();
  }

  async function drop(one: Import) {
    await send('DELETE', `/houses/${house}/imports/${one.id}`);
    router.push(`/${house}/files`);
    router.refresh();
  }

  return (
    <div className="flex flex-col items-start gap-4">
      <p className="max-w-prose text-soft">
        A table of any make, as CSV or text: one column with the time, others with values. You see what is
        understood of it before anything is written, and can take it back whole afterwards.
      </p>
      {sent === null ? (
        <Field
          label="File"
          hint="Up to 200 MiB. Readings of the last day are left out: those come from the nodes alone."
          error={failure}
          className="w-full max-w-xl"
        >
          {(links) => (
            <input
              {...links}
              type="file"
              accept=".csv,.txt,.tsv,.asc,.dat,text/csv,text/plain"
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
          <Meter label="Sent" part={sent.part} />
          <Button className="mt-3" onClick={() => stopped.current?.abort()}>
            Cancel
          </Button>
        </div>
      )}
      {unfinished === null || sent !== null ? null : (
        <Button onClick={() => drop(unfinished)}>Drop {unfinished.name}</Button>
      )}
    </div>
  );
}
