'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { ConfirmDialog } from '@/components/ui/dialog';
import { send } from '@/components/ui/send';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import { say } from '@/components/ui/toast';
import { day } from '@/lib/units/time';
import { capital } from '@/lib/wording/counts';

export interface Key {
  id: string;
  name: string;
  role: string;
  createdBy: string;
  createdAt: string;
  lastUsedAt: string | null;
}

/** Keys of programs. A key itself is never shown again: only its hash is kept. */
export function Keys({ keys, zone }: { keys: Key[]; zone: string }) {
  const router = useRouter();
  const [ending, setEnding] = useState<Key | null>(null);
  const [isBusy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | undefined>();
  if (keys.length === 0)
    return (
      <p className="max-w-prose text-soft">
        No program has a key. One that reads or commands through the interface needs one of its own, with no
        more rights than its work.
      </p>
    );

  async function end(key: Key) {
    setBusy(true);
    const answer = await send('DELETE', `/api-keys/${key.id}`);
    setBusy(false);
    if (!answer.ok) return setFailure(answer.message);
    setEnding(null);
    say(`The key ${key.name} is ended.`);
    router.refresh();
  }

  return (
    <>
      <Table
        caption="Keys of programs"
        captionHidden
        columns={[
          { key: 'name', label: 'Name' },
          { key: 'role', label: 'Role' },
          { key: 'used', label: 'Last used', figure: true },
          { key: 'by', label: 'Made by', wideOnly: true },
          { key: 'end', label: 'End', labelHidden: true },
        ]}
      >
        {keys.map((key) => (
          <Row key={key.id}>
            <RowHead className="break-words">{key.name}</RowHead>
            <Cell>{capital(key.role)}</Cell>
            <Cell figure>{key.lastUsedAt === null ? 'never' : day(Date.parse(key.lastUsedAt), zone)}</Cell>
            <Cell wideOnly className="break-all">
              {key.createdBy}, {day(Date.parse(key.createdAt), zone)}
            </Cell>
            <Cell className="py-1 text-right">
              <Button
                onClick={() => {
                  setFailure(undefined);
                  setEnding(key);
                }}
              >
                End…<span className="sr-only"> the key {key.name}</span>
              </Button>
            </Cell>
          </Row>
        ))}
      </Table>
      <ConfirmDialog
        open={ending !== null}
        onOpenChange={(open) => (open ? undefined : setEnding(null))}
        title={`End the key ${ending?.name ?? ''}?`}
        description="The program that uses it is refused from now on. A key that was ended does not come back."
        confirm="End it"
        kind="alarm"
        busy={isBusy}
        error={failure}
        onConfirm={() => (ending === null ? undefined : void end(ending))}
      />
    </>
  );
}
