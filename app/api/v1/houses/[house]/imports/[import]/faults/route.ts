import { serve } from '@/lib/server/guard';
import { faultText } from '@/lib/server/import-file';
import { getImportFaults } from '@/lib/server/operations/files';

export const GET = serve(getImportFaults, ({ things }) => ({
  stream: {
    ...{ type: 'text/csv', name: `import-${things.import.id}-lines.csv` },
    parts: faultText(things.import.id),
  },
}));
