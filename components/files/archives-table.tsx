import Link from 'next/link';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { Archive } from '@/lib/schema/archive';
import { moment } from '@/lib/units/time';
import { megabytes, type FilesScene } from './files-data';

const STATES: Record<Archive['state'], string> = {
  asked: 'asked for',
  sending: 'goes out',
  sent: 'went out',
  'broken-off': 'broke off',
  receiving: 'not sent whole',
  'to-check': 'is looked through',
  checked: 'waits to be brought in',
  'to-bring': 'is brought in',
  done: 'brought in',
  failed: 'failed',
};

/** Every archive that went out or came in, newest first. */
export function ArchivesTable({
  archives,
  scene,
  now,
}: {
  archives: Archive[];
  scene: FilesScene;
  now: number;
}) {
  const { house, preferences } = scene;
  if (archives.length === 0) return null;
  return (
    <Table
      caption="Archives of the whole holding"
      captionHidden
      columns={[
        { key: 'name', label: 'Archive' },
        { key: 'state', label: 'State' },
        { key: 'size', label: 'Size', figure: true },
        { key: 'by', label: 'By', wideOnly: true },
      ]}
    >
      {archives.map((one) => (
        <Row key={one.id}>
          <RowHead className="break-all">
            <Link
              href={`/${house.slug}/files?archive=${one.id}`}
              className="inline-flex min-h-11 items-center underline underline-offset-4"
            >
              {one.name}
            </Link>
          </RowHead>
          <Cell className="py-4">
            {STATES[one.state]}
            {one.into === null ? '' : ` as ${one.into.name}`}
          </Cell>
          <Cell figure className="py-4">
            {one.bytes === 0 ? '' : megabytes(one.bytes)}
          </Cell>
          <Cell wideOnly className="break-all py-4">
            {one.by}, {moment(Date.parse(one.createdAt), now, house.zone, preferences)}
          </Cell>
        </Row>
      ))}
    </Table>
  );
}
