'use client';
import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { ConfirmDialog } from '@/components/ui/dialog';
import { send } from '@/components/ui/send';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import { say } from '@/components/ui/toast';
import type { Import } from '@/lib/schema/import';
import { count, grouped } from '@/lib/units/format';
import { moment } from '@/lib/units/time';
import type { FilesScene } from './files-data';

const STATES: Record<Import['state'], string> = {
  receiving: 'not sent whole',
  received: 'waits to be looked at',
  'to-check': 'is looked through',
  checked: 'waits to be brought in',
  'to-bring': 'is brought in',
  done: 'brought in',
  'to-undo': 'is taken back',
  undone: 'taken back',
  failed: 'failed',
};

/** Every file there was, each to be opened, and taken back while it has brought anything. */
export function ImportsTable({
  imports,
  scene,
  now,
  mayImport,
}: {
  imports: Import[];
  scene: FilesScene;
  now: number;
  mayImport: boolean;
}) {
  const router = useRouter();
  const { house, preferences } = scene;
  const [undoing, setUndoing] = useState<Import | null>(null);
  const [isBusy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | undefined>();
  if (imports.length === 0) return <p className="text-soft">No file has come in yet.</p>;

  async function undo(one: Import) {
    setBusy(true);
    const answer = await send('DELETE', `/houses/${house.slug}/imports/${one.id}`);
    setBusy(false);
    if (!answer.ok) return setFailure(answer.message);
    setUndoing(null);
    say(`${one.name} is being taken back.`);
    router.push(`/${house.slug}/files?import=${one.id}`);
    router.refresh();
  }

  return (
    <>
      <Table
        caption="Files that were brought in"
        captionHidden
        columns={[
          { key: 'name', label: 'File' },
          { key: 'state', label: 'State' },
          { key: 'brought', label: 'Readings', figure: true },
          { key: 'by', label: 'By', wideOnly: true },
          { key: 'undo', label: 'Take back', labelHidden: true },
        ]}
      >
        {imports.map((one) => (
          <Row key={one.id}>
            <RowHead className="break-all">
              <Link
                href={`/${house.slug}/files?import=${one.id}`}
                className="inline-flex min-h-11 items-center underline underline-offset-4"
              >
                {one.name}
              </Link>
            </RowHead>
            <Cell className="py-4">{STATES[one.state]}</Cell>
            <Cell figure className="py-4">
              {grouped(one.brought)}
            </Cell>
            <Cell wideOnly className="break-all py-4">
              {one.by}, {moment(Date.parse(one.createdAt), now, house.zone, preferences)}
            </Cell>
            <Cell className="py-1 text-right">
              {mayImport && one.state === 'done' && one.brought > 0 ? (
                <Button
                  aria-label={`Take back ${one.name}`}
                  onClick={() => {
                    setFailure(undefined);
                    setUndoing(one);
                  }}
                >
                  Take back
                </Button>
              ) : null}
            </Cell>
          </Row>
        ))}
      </Table>
      <ConfirmDialog
        open={undoing !== null}
        onOpenChange={(isOpen) => {
          if (!isOpen) setUndoing(null);
        }}
        title={`Take back ${undoing?.name ?? ''}?`}
        description={`The ${count(undoing?.brought ?? 0, 'reading')} that this file brought go; readings that were there before it stay. Nights are made anew without them.`}
        confirm="Take it back"
        kind="alarm"
        busy={isBusy}
        error={failure}
        onConfirm={() => {
          if (undoing !== null) void undo(undoing);
        }}
      />
    </>
  );
}
