import { serve } from '@/lib/server/guard';
import { listSwitchings } from '@/lib/server/operations/running';
import { switchingsAnswer } from '@/lib/server/switchings';

export const GET = serve(listSwitchings, async ({ holding, things, query }) => ({
  body: await switchingsAnswer(holding, things.house, query),
}));
