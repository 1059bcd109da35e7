import type { ReactNode } from 'react';
import { Button } from '@/components/ui/button';
import { Figures } from '@/components/ui/panel';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { ImportFound } from '@/lib/schema/import';
import { count, grouped } from '@/lib/units/format';
import { isoMinute } from './iso-minute';
import type { FilesScene } from './files-data';

/** What looking the whole file through found, before anything is written. */
export function FoundPart({
  found,
  scene,
  drop,
  onBring,
  onCorrect,
}: {
  found: ImportFound;
  scene: FilesScene;
  drop: ReactNode;
  onBring: () => void;
  onCorrect: () => void;
}) {
  const time = (iso: string | null) => (iso === null ? 'none' : isoMinute(iso, scene.house.zone));
  return (
    <div className="flex flex-col gap-4">
      <div className="max-w-xl">
        <Figures
          rows={[
            { name: 'Readings', value: grouped(found.readings) },
            { name: 'From', value: time(found.from) },
            { name: 'To', value: time(found.to) },
            {
              name: 'Outside what the point can show',
              value: found.outside,
              ...(found.outside === 0 ? {} : { note: 'kept as bad: no figure is made of them' }),
            },
            { name: 'Lines that cannot be read', value: found.faults },
            { name: 'Times that the clock has twice or skips', value: found.doubts },
          ]}
        />
      </div>
      {found.doubts === 0 ? null : (
        <Table
          caption={`Where the clock changes: ${shown(found.firstDoubts.length, found.doubts)}`}
          columns={[
            { key: 'line', label: 'Line' },
            { key: 'text', label: 'What it says' },
            { key: 'kind', label: 'The time' },
            { key: 'read', label: 'Read as', figure: true },
          ]}
        >
          {found.firstDoubts.map((doubt) => (
            <Row key={doubt.line}>
              <RowHead className="font-mono">{doubt.line}</RowHead>
              <Cell className="break-all font-mono">{doubt.text}</Cell>
              <Cell>{doubt.kind === 'twice' ? 'comes twice' : 'is skipped'}</Cell>
              <Cell figure>{doubt.readAs === null ? 'left out' : time(doubt.readAs)}</Cell>
            </Row>
          ))}
        </Table>
      )}
      {found.faults === 0 ? null : (
        <Table
          caption={`Lines that cannot be read: ${shown(found.firstFaults.length, found.faults)}`}
          columns={[
            { key: 'line', label: 'Line' },
            { key: 'why', label: 'What is wrong, and what to do' },
            { key: 'text', label: 'What it says', wideOnly: true },
          ]}
        >
          {found.firstFaults.map((fault, place) => (
            <Row key={place}>
              <RowHead className="font-mono">{fault.line}</RowHead>
              <Cell>{fault.why}</Cell>
              <Cell wideOnly className="break-all font-mono">
                {fault.text.slice(0, 60)}
              </Cell>
            </Row>
          ))}
        </Table>
      )}
      <div className="flex flex-wrap gap-2">
        <Button kind="primary" disabled={found.readings === 0} onClick={onBring}>
          Bring in {count(found.readings, 'reading')}
        </Button>
        <Button onClick={onCorrect}>Correct how it is read</Button>
        {drop}
      </div>
    </div>
  );
}

const shown = (few: number, all: number) => (few === all ? `all ${all}` : `the first ${few} of ${all}`);
