import { serve } from '@/lib/server/guard';
import { heapBookFile } from '@/lib/server/heap-files';
import { exportHeapBook } from '@/lib/server/operations/files';

export const GET = serve(exportHeapBook, ({ holding, things, query }) =>
  heapBookFile(holding, things.house, query),
);
