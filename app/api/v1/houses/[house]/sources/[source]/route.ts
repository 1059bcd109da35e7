import * as sources from '@/db/queries/source';
import { SourceCreate } from '@/lib/schema/source';
import { merged } from '@/lib/server/check';
import { serve } from '@/lib/server/guard';
import { amendSource, getSource, removeSource } from '@/lib/server/operations/yard';

export const GET = serve(getSource, ({ things }) => ({ body: things.source }));

export const PATCH = serve(amendSource, async ({ holding, things, body }) => ({
  body: await sources.amendSource(
    holding,
    things.house.id,
    things.source.id,
    merged(SourceCreate, things.source, body),
  ),
}));

export const DELETE = serve(removeSource, async ({ holding, things, now }) => {
  await sources.removeSource(holding, things.house.id, things.source.id, now);
  return {};
});
