'use client';
import { useEffect, useState, type ReactNode } from 'react';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { send } from '@/components/ui/send';
import { Skeleton } from '@/components/ui/states';
import type { Import, ImportPreview } from '@/lib/schema/import';
import { ColumnsTable } from './columns-table';
import type { FilesPoint, FilesScene } from './files-data';
import { LayoutFields } from './layout-fields';
import { isoMinute } from './iso-minute';

/** The file's first lines as they are understood; every change asks the server anew, so what is shown is what will be read. */
export function LayoutPart({
  one,
  points,
  scene,
  onChecking,
  drop,
}: {
  one: Import;
  points: FilesPoint[];
  scene: FilesScene;
  onChecking: (told: Import) => void;
  drop: ReactNode;
}) {
  const [preview, setPreview] = useState<ImportPreview | null>(null);
  const [failure, setFailure] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);
  const at = `/houses/${scene.house.slug}/imports/${one.id}`;

  async function show(layout: ImportPreview['layout'] | undefined) {
    const answer = await send<ImportPreview>('POST', `${at}/preview`, layout === undefined ? {} : { layout });
    if (!answer.ok) return setFailure(Object.values(answer.fields)[0] ?? answer.message);
    setFailure(null);
    setPreview(answer.value);
  }
  useEffect(() => {
    void show(one.layout ?? undefined);
    // once for a file: afterwards each change asks by itself
  }, [one.id]);

  async function check(layout: ImportPreview['layout']) {
    setBusy(true);
    const answer = await send<Import>('PUT', `${at}/layout`, layout);
    setBusy(false);
    if (answer.ok) onChecking(answer.value);
    else setFailure(Object.values(answer.fields)[0] ?? answer.message);
  }

  if (preview === null)
    return failure === null ? (
      <Skeleton className="h-64" />
    ) : (
      <>
        <Notice tone="warn" role="alert" title="This file cannot be read as it is">
          {failure}
        </Notice>
        <div>{drop}</div>
      </>
    );
  const { layout, columns, heads, times, faults, doubts } = preview;
  return (
    <div className="flex flex-col gap-4">
      <p className="max-w-prose text-soft">
        This is how the file is understood. Put each column to its point or leave it out; nothing is written
        yet.
      </p>
      {[...doubts, ...faults.slice(0, 3).map((fault) => `Line ${fault.line}: ${fault.why}`)].map((text) => (
        <Notice key={text} tone="warn" title="Look here">
          {text}
        </Notice>
      ))}
      <LayoutFields layout={layout} heads={heads} onChange={show} />
      <ColumnsTable
        layout={layout}
        columns={columns}
        times={times.map((time) => isoMinute(time, scene.house.zone))}
        points={points}
        onChange={show}
      />
      <div className="flex flex-wrap gap-2">
        <Button
          kind="primary"
          busy={isBusy}
          disabled={layout.columns.length === 0}
          onClick={() => check(layout)}
        >
          Look the whole file through
        </Button>
        {drop}
      </div>
      <p role="alert" className="font-semibold text-alarm empty:hidden">
        {failure}
      </p>
    </div>
  );
}
