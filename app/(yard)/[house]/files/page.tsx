import type { Metadata } from 'next';
import { FilesView } from '@/components/files/files-view';
import { inHolding } from '@/db/client';
import { readArchives } from '@/db/queries/archive';
import { findImport, listImports } from '@/db/queries/import';
import { listPoints } from '@/db/queries/point';
import { listSources } from '@/db/queries/source';
import { requireViewer, viewerHouse } from '@/lib/server/next-session';
import { shellFacts } from '@/lib/server/shell';

export const metadata: Metadata = { title: 'Files' };

export default async function FilesPage({
  params,
  searchParams,
}: {
  params: Promise<{ house: string }>;
  searchParams: Promise<{ import?: string | string[]; archive?: string | string[] }>;
}) {
  const house = await viewerHouse((await params).house);
  const viewer = await requireViewer();
  const { import: asked, archive } = await searchParams;
  const { allowed } = viewer;
  const { preferences, now } = await shellFacts(viewer);
  const data = await inHolding(viewer.holdingId, async (holding) => ({
    imports: await listImports(holding, house.id),
    open: typeof asked === 'string' ? await findImport(holding, house.id, asked) : null,
    points: (await listPoints(holding, house.id)).filter((point) => point.derived === null),
    archives: allowed.includes('holding.archive') ? await readArchives(holding, archive) : null,
    heaps: (await listSources(holding, house.id)).filter((source) => source.kind === 'heap'),
  }));
  return (
    <FilesView
      {...data}
      house={{ slug: house.slug, name: house.name, zone: house.zone }}
      preferences={preferences}
      now={now}
      mayImport={allowed.includes('import.write')}
    />
  );
}
