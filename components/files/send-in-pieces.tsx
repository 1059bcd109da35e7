'use client';
import { useRef, useState } from 'react';
import { Button } from '@/components/ui/button';
import { control, Field } from '@/components/ui/field';
import type { Answer } from '@/components/ui/send';
import { megabytes } from './files-data';
import { Meter } from './meter';
import { sendPieces } from './send-pieces';

/** As the server keeps what is being sent. */
interface Begun {
  id: string;
  name: string;
  bytes: number;
  received: number;
}

/** Chooses a file and sends it, a piece at a time; one whose sending broke off goes on where it was. */
export function SendInPieces<One extends Begun>({
  field,
  most,
  unfinished,
  begin,
  pathOf,
  onSent,
  onDrop,
}: {
  field: { label: string; hint: string; accept: string };
  /** Bytes, and what to say of a file that has more. */
  most: { bytes: number; words: string };
  unfinished: One | null;
  begin: (file: { name: string; bytes: number }) => Promise<Answer<One>>;
  pathOf: (one: One) => string;
  onSent: (one: One) => void;
  onDrop: (one: One) => Promise<void>;
}) {
  const [part, setPart] = useState<number | null>(null);
  const [failure, setFailure] = useState<string | undefined>();
  const stopped = useRef<AbortController | null>(null);

  async function start(file: File) {
    setFailure(undefined);
    if (file.size === 0) return setFailure('This file is empty; choose one that is not.');
    if (file.size > most.bytes) return setFailure(`This file has ${megabytes(file.size)}; ${most.words}`);
    let one = unfinished;
    if (one !== null && (one.bytes !== file.size || one.name !== file.name))
      return setFailure(`To go on, choose ${one.name} of ${megabytes(one.bytes)} again, or drop it.`);
    if (one === null) {
      const made = await begin({ name: file.name, bytes: file.size });
      if (!made.ok) return setFailure(made.message);
      one = made.value;
    }
    stopped.current = new AbortController();
    setPart(one.received / file.size);
    const why = await sendPieces(pathOf(one), file, one.received, stopped.current.signal, setPart);
    setPart(null);
    if (why !== null && stopped.current.signal.aborted) await onDrop(one);
    else if (why !== null) setFailure(why);
    else onSent(one);
  }

  return (
    <>
      {part === null ? (
        <Field label={field.label} hint={field.hint} error={failure} className="w-full max-w-xl">
          {(links) => (
            <input
              {...links}
              type="file"
              accept={field.accept}
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
          <Meter label="Sent" part={part} />
          <Button className="mt-3" onClick={() => stopped.current?.abort()}>
            Cancel
          </Button>
        </div>
      )}
      {unfinished === null || part !== null ? null : (
        <Button onClick={() => void onDrop(unfinished)}>Drop {unfinished.name}</Button>
      )}
    </>
  );
}
