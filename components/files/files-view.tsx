import { Panel } from '@/components/ui/panel';
import { Sentence } from '@/components/ui/sentence';
import type { Archive } from '@/lib/schema/archive';
import type { Import } from '@/lib/schema/import';
import type { Preferences } from '@/lib/units/preferences';
import { fileSentence } from '@/lib/wording/file-sentence';
import { ArchivePanel } from './archive-panel';
import { ArchivesTable } from './archives-table';
import { ExportPanel } from './export-panel';
import type { FilesHouse, FilesPoint } from './files-data';
import { ImportPanel } from './import-panel';
import { ImportsTable } from './imports-table';

export function FilesView({
  house,
  imports,
  open,
  points,
  heaps,
  preferences,
  now,
  mayImport,
  archives,
}: {
  house: FilesHouse;
  imports: Import[];
  open: Import | null;
  points: FilesPoint[];
  heaps: { slug: string; name: string }[];
  preferences: Preferences;
  now: number;
  mayImport: boolean;
  /** Of the whole holding; null for who may not have them. */
  archives: { list: Archive[]; open: Archive | null } | null;
}) {
  const scene = { house, preferences };
  return (
    <div className="flex flex-col gap-5">
      <Sentence phrases={fileSentence(imports, house.name)} before="Files" />
      <Panel title={open === null ? 'Bring in a logger’s file' : open.name}>
        {mayImport ? (
          <ImportPanel
            key={open === null ? 'new' : `${open.id} ${open.state}`}
            open={open}
            points={points}
            scene={scene}
          />
        ) : (
          <p className="max-w-prose text-soft">An owner or a grower can bring files in.</p>
        )}
      </Panel>
      <Panel title="Take tables away" note="CSV, for a spreadsheet">
        <ExportPanel scene={scene} points={points} heaps={heaps} now={now} />
      </Panel>
      <Panel title="Files that were brought in" note="newest first">
        <ImportsTable imports={imports} scene={scene} now={now} mayImport={mayImport} />
      </Panel>
      <Panel title="The whole holding" note="one file, out and in again">
        {archives === null ? (
          <p className="max-w-prose text-soft">An owner can take the whole holding away, and bring one in.</p>
        ) : (
          <div className="flex flex-col gap-5">
            <ArchivePanel
              key={archives.open === null ? 'new' : `${archives.open.id} ${archives.open.state}`}
              open={archives.open}
              scene={scene}
              now={now}
            />
            <ArchivesTable archives={archives.list} scene={scene} now={now} />
          </div>
        )}
      </Panel>
    </div>
  );
}
