'use client';
import { useRouter } from 'next/navigation';
import { useEffect, useState } from 'react';
import { Button, ButtonLink } from '@/components/ui/button';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import type { Import } from '@/lib/schema/import';
import { count } from '@/lib/units/format';
import type { FilesPoint, FilesScene } from './files-data';
import { FoundPart } from './found-part';
import { LayoutPart } from './layout-part';
import { Meter } from './meter';
import { SendFile } from './send-file';

const MOVING = { 'to-check': 'Looked through', 'to-bring': 'Brought in', 'to-undo': 'Taken back' } as const;

/** One file on its way in. What it shows follows the import's state on the server, so that a reload goes on from there. */
export function ImportPanel({
  open,
  points,
  scene,
}: {
  open: Import | null;
  points: FilesPoint[];
  scene: FilesScene;
}) {
  const router = useRouter();
  const [one, setOne] = useState(open);
  const [isCorrecting, setCorrecting] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  const at = `/houses/${scene.house.slug}/imports/${one?.id ?? ''}`;
  const label = one === null ? undefined : Object.entries(MOVING).find(([state]) => state === one.state)?.[1];
  useEffect(() => {
    if (label === undefined) return;
    const timer = setInterval(() => {
      void fetch(`/api/v1${at}`).then(async (answer) => {
        if (!answer.ok) return;
        // our own interface, of the same release
        const told = (await answer.json()) as Import;
        setOne(told);
        if (told.state !== one?.state) router.refresh();
      }, ignore);
    }, 1000);
    return () => clearInterval(timer);
  }, [label, at, one?.state, router]);

  async function act(method: 'POST' | 'DELETE', path: string) {
    const answer = await send<Import | null>(method, path);
    if (!answer.ok) return setFailure(answer.message);
    setFailure(null);
    if (answer.value !== null) setOne(answer.value);
    else {
      say('The file is dropped; nothing was written.');
      router.replace(`/${scene.house.slug}/files`);
    }
    router.refresh();
  }
  if (one === null || one.state === 'receiving')
    return <SendFile house={scene.house.slug} unfinished={one} />;
  const drop = (
    <Button onClick={() => act('DELETE', at)}>
      {one.state === 'to-bring' ? 'Cancel' : 'Drop this file'}
    </Button>
  );
  return (
    <div className="flex flex-col gap-4">
      {label === undefined ? null : (
        <>
          <Meter label={label} part={one.progress} />
          <div>{one.state === 'to-undo' ? null : drop}</div>
        </>
      )}
      {one.state === 'received' || (one.state === 'checked' && isCorrecting) ? (
        <LayoutPart
          one={one}
          points={points}
          scene={scene}
          onChecking={(told) => {
            setCorrecting(false);
            setOne(told);
          }}
          drop={drop}
        />
      ) : null}
      {one.state === 'checked' && !isCorrecting && one.found !== null ? (
        <FoundPart
          found={one.found}
          scene={scene}
          drop={drop}
          onBring={() => act('POST', `${at}/bring`)}
          onCorrect={() => setCorrecting(true)}
        />
      ) : null}
      {['done', 'undone', 'failed'].includes(one.state) ? <Ended one={one} house={scene.house.slug} /> : null}
      <p role="alert" className="font-semibold text-alarm empty:hidden">
        {failure}
      </p>
    </div>
  );
}

const ignore = () => undefined;

function Ended({ one, house }: { one: Import; house: string }) {
  return (
    <div className="flex flex-col items-start gap-3">
      <p role="status" className="max-w-prose">
        {one.state === 'failed'
          ? one.problem
          : one.state === 'undone'
            ? 'This file was taken back: the readings that it had brought are gone, and no others.'
            : `${count(one.brought, 'reading')} came in. ${count(one.duplicates, 'reading')} of the same point and time stood there already and were left as they were. Roll-ups and nights are made anew in the next minutes.`}
      </p>
      {one.faults === 0 ? null : (
        <a
          className="inline-flex min-h-11 items-center underline underline-offset-4"
          href={`/api/v1/houses/${house}/imports/${one.id}/faults`}
        >
          Fetch the {count(one.faults, 'line')} that could not be read
        </a>
      )}
      <ButtonLink href={`/${house}/files`}>Bring in another file</ButtonLink>
    </div>
  );
}
