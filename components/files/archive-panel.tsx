'use client';
import { useRouter } from 'next/navigation';
import { useEffect, useState } from 'react';
import type { Archive } from '@/lib/schema/archive';
import { ArchiveEnded } from './archive-ended';
import { ArchiveFoundPart } from './archive-found';
import { ArchiveOut } from './archive-out';
import { Button } from '@/components/ui/button';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import type { FilesScene } from './files-data';
import { Meter } from './meter';
import { SendArchive } from './send-archive';

const MOVING: Partial<Record<Archive['state'], string>> = {
  sending: 'Packed',
  'to-check': 'Looked through',
  'to-bring': 'Brought in',
};

/** The whole holding, out as one file and in again. What it shows follows the archive's state on the server. */
export function ArchivePanel({ open, scene, now }: { open: Archive | null; scene: FilesScene; now: number }) {
  const router = useRouter();
  const [one, setOne] = useState(open);
  const [failure, setFailure] = useState('');
  const label = one === null ? undefined : MOVING[one.state];
  const isFollowed = label !== undefined || one?.state === 'asked';
  const files = `/${scene.house.slug}/files`;
  useEffect(() => {
    if (!isFollowed || one === null) return;
    const timer = setInterval(() => {
      void fetch(`/api/v1/archives/${one.id}`).then(async (answer) => {
        if (!answer.ok) return;
        // our own interface, of the same release
        const told = (await answer.json()) as Archive;
        setOne(told);
        if (told.state !== one.state) router.refresh();
      }, ignore);
    }, 1000);
    return () => clearInterval(timer);
  }, [isFollowed, one, router]);

  async function drop(told: Archive) {
    const answer = await send('DELETE', `/archives/${told.id}`);
    if (!answer.ok) return setFailure(answer.message);
    say('Dropped; nothing was put in.');
    setOne(null);
    router.replace(files);
    router.refresh();
  }
  async function bring(told: Archive, name: string): Promise<string | null> {
    const answer = await send<Archive>('POST', `/archives/${told.id}/bring`, { name });
    if (!answer.ok) return answer.fields['name'] ?? answer.message;
    setOne(answer.value);
    router.refresh();
    return null;
  }
  const isIn = one?.way === 'in';
  return (
    <div className="flex flex-col gap-4">
      {!isIn || one.state === 'receiving' ? (
        <div className="grid gap-x-8 gap-y-5 lg:grid-cols-2">
          <ArchiveOut one={isIn ? null : one} onAsked={setOne} />
          <SendArchive files={files} unfinished={isIn ? one : null} onDrop={drop} />
        </div>
      ) : null}
      {label === undefined || one === null ? null : (
        <>
          <Meter label={label} part={one.progress} />
          {isIn ? (
            <div>
              <Button onClick={() => drop(one)}>Cancel</Button>
            </div>
          ) : null}
        </>
      )}
      {isIn && one.state === 'checked' && one.found !== null ? (
        <ArchiveFoundPart
          found={one.found}
          scene={scene}
          now={now}
          onBring={(name) => bring(one, name)}
          onDrop={() => drop(one)}
        />
      ) : null}
      {isIn && (one.state === 'done' || one.state === 'failed') ? (
        <ArchiveEnded one={one} files={files} />
      ) : null}
      <p role="alert" className="font-semibold text-alarm empty:hidden">
        {failure}
      </p>
    </div>
  );
}

const ignore = () => undefined;
