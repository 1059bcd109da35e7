import * as attachments from '@/db/queries/attachment';
import { Problem } from '@/lib/server/errors';
import { serve } from '@/lib/server/guard';
import { removePointPhotograph } from '@/lib/server/operations/points';

export const DELETE = serve(removePointPhotograph, async ({ holding, things }) => {
  const { point, photograph } = things;
  if (!(await attachments.removePointPhotograph(holding, point.id, photograph.id)))
    throw new Problem('not-found');
  return {};
});
