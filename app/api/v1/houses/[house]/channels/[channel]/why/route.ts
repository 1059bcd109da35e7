import { firstDecisionAt } from '@/db/queries/decision';
import { Problem } from '@/lib/server/errors';
import { serve } from '@/lib/server/guard';
import { why } from '@/lib/server/operations/running';
import { whyNow, whyThen } from '@/lib/server/why';
import { isoIn } from '@/lib/server/wire';

/** A program's clock may run a little before ours. */
const AHEAD_MS = 120_000;

export const GET = serve(why, async ({ holding, things, query, now }) => {
  const { house, channel } = things;
  if (query.at !== undefined && Date.parse(query.at) > now.getTime() + AHEAD_MS) {
    throw new Problem('not-valid', { errors: [{ path: 'at', message: 'That is yet to come.' }] });
  }
  const clocks = { app: now.getTime(), real: Date.now() };
  const answer =
    query.at === undefined
      ? await whyNow(holding, house, channel, clocks)
      : await whyThen(holding, house, channel, Date.parse(query.at), clocks);
  if (answer === null) {
    const first = await firstDecisionAt(holding, channel.id);
    const detail =
      first === null
        ? 'Nothing was decided for this channel yet.'
        : `Nothing was decided for this channel before ${isoIn(house.zone, first)}.`;
    throw new Problem('not-found', { detail });
  }
  return { body: answer };
});
