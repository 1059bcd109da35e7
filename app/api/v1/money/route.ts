import * as money from '@/db/queries/money';
import { Problem } from '@/lib/server/errors';
import { serve } from '@/lib/server/guard';
import { getMoneyBook, writeMoneyBook } from '@/lib/server/operations/money';

export const GET = serve(getMoneyBook, async ({ holding }) => ({ body: await money.readMoneyBook(holding) }));

export const PUT = serve(writeMoneyBook, async ({ holding, body, caller, now }) => {
  const written = await money.writeMoneyBook(holding, body, { by: caller.by, now });
  if (written === null) throw new Problem('changed-meanwhile');
  return { body: written };
});
