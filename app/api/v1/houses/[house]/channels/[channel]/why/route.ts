import { Problem } from '@/lib/server/errors';
import { serve } from '@/lib/server/guard';
import { why } from '@/lib/server/operations/running';
import { whyNow, whyThen } from '@/lib/server/why';

/** A program's clock may run a little before ours. */
const AHEAD_MS = 120_000;

export const GET = serve(why, async ({ holding, things, query, now }) => {
  const { house, channel } = things;
  if (query.at !== undefined && Date.parse(query.at) > now.getTime() + AHEAD_MS) {
    throw new Problem('not-valid', { errors: [{ path: 'at', message: 'That is yet to come.' }] });
  }
  const answer =
    query.at === undefined
      ? await whyNow(holding, house, channel, now.getTime())
      : await whyThen(holding, house, channel, Date.parse(query.at));
  if (answer === null) {
    throw new Problem('not-found', { detail: 'Nothing was decided for this channel at that time.' });
  }
  return { body: answer };
});
