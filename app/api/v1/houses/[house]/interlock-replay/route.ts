import { replayInterlock } from '@/db/queries/interlock-replay';
import { serve } from '@/lib/server/guard';
import { getInterlockReplay } from '@/lib/server/operations/setup';
import { isoIn } from '@/lib/server/wire';

export const GET = serve(getInterlockReplay, async ({ holding, things, query, now }) => {
  const { house } = things;
  const drafted = { ...query, delayS: query.delay };
  const { longest, ...told } = await replayInterlock(holding, house, drafted, now.getTime());
  const iso = (at: number) => isoIn(house.zone, at);
  return {
    body: { ...told, longest: longest && { from: iso(longest.from), to: iso(longest.to) } },
  };
});
