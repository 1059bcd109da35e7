import { Panel } from '@/components/ui/panel';
import { Sentence } from '@/components/ui/sentence';
import type { Import } from '@/lib/schema/import';
import type { Preferences } from '@/lib/units/preferences';
import { fileSentence } from '@/lib/wording/file-sentence';
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
}: {
  house: FilesHouse;
  imports: Import[];
  open: Import | null;
  points: FilesPoint[];
  heaps: { slug: string; name: string }[];
  preferences: Preferences;
  now: number;
  mayImport: boolean;
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
    </div>
  );
}
