import { Problem } from '@/lib/server/errors';
import { serve } from '@/lib/server/guard';
import { faultText } from '@/lib/server/import-file';
import { getImportFaults } from '@/lib/server/operations/files';

export const GET = serve(getImportFaults, async ({ things }) => {
  const parts = await faultText(things.import.id);
  if (parts === null) throw new Problem('not-found');
  return { stream: { type: 'text/csv', name: `import-${things.import.id}-lines.csv`, parts } };
});
